import { z } from 'zod';
import { keySchema } from './key';
import { perPhaseSchema } from './phase';
import { characteristicSchema, restraintSchema, settingsVersionSchema } from './settings-version';

/** The settings a replay judges by: what a version holds, without being one. */
export const replaySettingsSchema = z.object({
  characteristic: characteristicSchema,
  restraint: restraintSchema,
  chargingCompensation: z.boolean().default(false),
});
export type ReplaySettings = z.infer<typeof replaySettingsSchema>;

export const REPLAY_DAYS_MOST = 31;
const DAY_MS = 86_400_000;

const instant = z.iso.datetime({
  offset: true,
  error: 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.',
});
const spanMs = ({ from, to }: { from: string; to: string }): number => Date.parse(to) - Date.parse(from);

/** POST /api/lines/<key>/replay */
export const replayRequestSchema = z
  .object({ settings: replaySettingsSchema, from: instant, to: instant })
  .refine((asked) => spanMs(asked) > 0, { message: 'The period begins before it ends.', path: ['to'] })
  .refine((asked) => !(spanMs(asked) > REPLAY_DAYS_MOST * DAY_MS), {
    message: `A replay covers at most ${REPLAY_DAYS_MOST} days.`,
    path: ['from'],
  });
export type ReplayRequest = z.infer<typeof replayRequestSchema>;
export const replayStartedSchema = z.object({ id: z.string() });

const amps = z.number().nonnegative().nullable();
const count = z.int().nonnegative();

/** Where a phase stands under a scheme that has a region in place of a threshold; angles in degrees. */
export const regionPlaceSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('alpha-plane'), ratio: z.number(), angleDeg: z.number() }),
  z.object({ kind: z.literal('phase-comparison'), deviationDeg: z.number() }),
]);

/** The operating point at one instant, and what it was judged by. */
export const replayPointSchema = z.object({
  at: z.iso.datetime(),
  utilisation: z.number().nonnegative(),
  differentialAmps: z.number().nonnegative(),
  restraintAmps: amps,
  thresholdAmps: amps,
  region: regionPlaceSchema.nullable(),
  /** the recorded version that was in force; null for the settings that were tried */
  settingsVersion: z.int().nullable(),
});
export type ReplayPoint = z.infer<typeof replayPointSchema>;

const atMarkSchema = z.object({
  snapshots: count,
  /** each snapshot lasts until the next one, and at most three periods */
  durationMs: z.number().nonnegative(),
});
export type AtMark = z.infer<typeof atMarkSchema>;

export const replayPhaseSchema = z.object({
  evaluated: count,
  /** null when nothing could be evaluated */
  greatest: replayPointSchema.nullable(),
  /** at or above the near mark, 100 % and more included */
  near: atMarkSchema,
  over: atMarkSchema,
});
export type ReplayPhase = z.infer<typeof replayPhaseSchema>;

/** What one side of the comparison came to. */
export const replaySideSchema = z.object({
  /** snapshots of which all three phases were evaluated */
  evaluated: count,
  notComputable: z.array(z.object({ reason: z.string(), snapshots: count })),
  /** evaluated with the charging current left in, since the voltages were not valid */
  compensationFellBack: count,
  phases: perPhaseSchema(replayPhaseSchema),
});
export type ReplaySide = z.infer<typeof replaySideSchema>;

/** All of the answer but its distributions: what a proposal keeps. */
export const replaySummarySchema = z.object({
  line: keySchema,
  settings: replaySettingsSchema,
  from: z.iso.datetime({ offset: true }),
  to: z.iso.datetime({ offset: true }),
  nearRatio: z.number(),
  /** raw rows of the period, evaluated or not */
  snapshots: count,
  /** first and last of them; null when there was none */
  firstAt: z.iso.datetime().nullable(),
  lastAt: z.iso.datetime().nullable(),
  /** set aside: a terminal was under test */
  underTest: count,
  recorded: replaySideSchema,
  replayed: replaySideSchema,
});
export type ReplaySummary = z.infer<typeof replaySummarySchema>;

const binCountsSchema = perPhaseSchema(z.array(count));

/** Counts of utilisation in bins of one width from zero; the last bin holds everything from its lower edge on. */
export const distributionSchema = z.object({
  binRatio: z.number().positive(),
  recorded: binCountsSchema,
  replayed: binCountsSchema,
});
export type Distribution = z.infer<typeof distributionSchema>;

export const replayResultSchema = replaySummarySchema.extend({ distribution: distributionSchema });
export type ReplayResult = z.infer<typeof replayResultSchema>;

/** GET /api/replays/<id> */
export const replayStateSchema = z.object({
  id: z.string(),
  line: keySchema,
  state: z.enum(['running', 'done', 'cancelled', 'failed']),
  /** 0 to 1 */
  progress: z.number().min(0).max(1),
  /** raw rows evaluated so far */
  snapshots: count,
  result: replayResultSchema.nullable(),
  /** why it failed, as a sentence */
  problem: z.string().nullable(),
});
export type ReplayState = z.infer<typeof replayStateSchema>;

/** POST /api/lines/<key>/proposals: the figures are taken from the replay itself and not from whoever keeps it. */
export const newProposalSchema = z.object({
  replay: z.string().min(1).max(60),
  note: z
    .string()
    .trim()
    .min(1, 'Say what the proposal is for.')
    .max(500, 'A note has at most 500 characters.'),
});

/** Settings that somebody proposes, with what a replay says of them. No device is set from here. */
export const proposalSchema = z.object({
  id: z.int(),
  line: keySchema,
  lineName: z.string(),
  /** the version in force when it was kept, as it was then; null when none was */
  recorded: settingsVersionSchema.nullable(),
  summary: replaySummarySchema,
  note: z.string(),
  keptBy: z.string(),
  keptAt: z.iso.datetime(),
});
export type Proposal = z.infer<typeof proposalSchema>;
export const proposalListSchema = z.object({ proposals: z.array(proposalSchema) });
