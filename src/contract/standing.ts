import { z } from 'zod';
import { compositionSchema, estimateSchema } from './composition';
import { keySchema } from './key';
import { phaseNameSchema } from './phase';
import { creepSchema, forecastDatesSchema } from './warning';

export const CAUSES = ['charging', 'ratio mismatch', 'angle mismatch', 'rest', 'not told'] as const;
export const causeSchema = z.enum(CAUSES);
export type Cause = z.infer<typeof causeSchema>;

/** Where a mismatch is: at a terminal, or somewhere between it and another one where that can’t be told. */
export const causePlaceSchema = z.object({ terminal: keySchema, against: keySchema.nullable() });
export type CausePlace = z.infer<typeof causePlaceSchema>;

export const MARK_KINDS = [
  'settings changed',
  'channel path changed',
  'work recorded',
  'terminals changed',
  'step',
] as const;

/** A day that no trend and no composition is taken across. */
export const standingMarkSchema = z.object({ on: z.iso.date(), kind: z.enum(MARK_KINDS) });
export type StandingMark = z.infer<typeof standingMarkSchema>;

/** A sudden change of a standing level. */
export const stepSchema = z.object({
  /** the minute in which it came, or the start of its hour where there are no minutes */
  at: z.iso.datetime(),
  fromAmps: z.number(),
  toAmps: z.number(),
  /** the term of the composition that moved */
  cause: causeSchema,
  /** where a mismatch moved */
  place: causePlaceSchema.nullable(),
  /** an angle that moved alike in all three phases: that is time, not a transformer */
  isTime: z.boolean(),
  /** the path of a channel changed at the same time: an angle step then points to the channel */
  channelPathChanged: z.boolean(),
});
export type StepOnWire = z.infer<typeof stepSchema>;

/** The drift of the level at one and the same load: load cycle, seasons and growth of load are not in it. */
export const creepAtReferenceSchema = z.object({
  creep: creepSchema,
  referenceThroughAmps: z.number(),
});

/** A mismatch that is another at light load than at heavy load, and what the charging may be if it is. */
export const loadDependenceSchema = z.object({
  terminal: keySchema,
  against: keySchema,
  /** at light load less at heavy load */
  ratioChange: z.number(),
  angleChangeDeg: z.number(),
  lightAmps: z.number(),
  heavyAmps: z.number(),
  /** with and without such a change, whichever reaches further */
  chargingAmps: estimateSchema,
});

/** The significant drift of utilisation at emergency rating, a ratio of the threshold; as `creepSchema` otherwise. */
export const emergencyCreepSchema = z.object({
  verdict: z.enum(['creep', 'within margin']),
  utilisationNow: z.number(),
  slopePerMonth: z.number(),
  slopeLowPerMonth: z.number(),
  slopeHighPerMonth: z.number(),
  near: forecastDatesSchema,
  /** when utilisation at emergency rating reaches 1 */
  over: forecastDatesSchema,
});

/** What the worker last found of one phase's standing level: renewed every hour. */
export const standingVerdictSchema = z.object({
  line: keySchema,
  phase: phaseNameSchema,
  computedAt: z.iso.datetime(),
  /** 24-hour standing level */
  levelAmps: z.number().nullable(),
  pickupAmps: z.number().nullable(),
  shareOfPickup: z.number().nullable(),
  /** expected by line constants, class budget and channel, taken as independent */
  expectedAmps: z.number().nullable(),
  utilisationP95: z.number().nullable(),
  /** worst over power-factor angles within ±30°, from the composition; null where it is not separable */
  emergencyUtilisation: z.number().nullable(),
  /** the last 30 days, and the 30 days that ended 60 days before */
  composition: compositionSchema,
  compositionBefore: compositionSchema.nullable(),
  loadDependence: loadDependenceSchema.nullable(),
  creep: creepSchema.nullable(),
  creepAtReference: creepAtReferenceSchema.nullable(),
  /** how the load was taken out of the levels: by their composition, by what magnitudes do with load, or not at all */
  loadTakenOutBy: z.enum(['composition', 'magnitudes']).nullable(),
  /** the drift as measured counts: nothing takes the load out, and the load has stood still */
  measuredCounts: z.boolean(),
  /** of utilisation at emergency rating, where the composition separates */
  emergencyCreep: emergencyCreepSchema.nullable(),
  /** what parts the history, newest first */
  marks: z.array(standingMarkSchema),
  /** the mark that the drifts are taken since, where one parted the levels */
  driftSince: standingMarkSchema.nullable(),
  step: stepSchema.nullable(),
  /** the term that is growing, or else the largest one */
  likelyCause: causeSchema,
  causePlace: causePlaceSchema.nullable(),
  /** an angle that is alike in all three phases: that is time, not a transformer */
  causeIsTime: z.boolean(),
  /** the forecast that counts: by the level at reference load where there is one */
  near: forecastDatesSchema.nullable(),
  pickup: forecastDatesSchema.nullable(),
});
export type StandingVerdict = z.infer<typeof standingVerdictSchema>;

/** One row of the fleet's lists: GET /api/margins */
export const marginRowSchema = standingVerdictSchema
  .omit({
    composition: true,
    compositionBefore: true,
    loadDependence: true,
    creep: true,
    creepAtReference: true,
    marks: true,
  })
  .extend({
    lineName: z.string(),
    /** null when not recorded */
    owner: z.string().nullable(),
    voltageKv: z.number(),
    substations: z.array(z.object({ key: keySchema, name: z.string() })),
    utilisation: z.number().nullable(),
    chargingAmps: z.number().nullable(),
    mismatchAmps: z.number().nullable(),
    restAmps: z.number().nullable(),
    creepAmpsPerMonth: z.number().nullable(),
    creepVerdict: z.enum(['creep', 'within margin']).nullable(),
  });
export type MarginRow = z.infer<typeof marginRowSchema>;

export const MARGIN_SORTS = [
  'shareOfPickup',
  'levelAmps',
  'expectedAmps',
  'utilisation',
  'utilisationP95',
  'emergencyUtilisation',
  'creepAmpsPerMonth',
  'nearLikely',
  'chargingAmps',
  'mismatchAmps',
  'restAmps',
  'lineName',
  'owner',
] as const;
export const marginSortSchema = z.enum(MARGIN_SORTS);
export type MarginSort = z.infer<typeof marginSortSchema>;

/** A page of the fleet; `next` is asked for with ?after= */
export const marginListSchema = z.object({
  at: z.iso.datetime(),
  total: z.int(),
  rows: z.array(marginRowSchema),
  next: z.string().nullable(),
});
export type MarginList = z.infer<typeof marginListSchema>;

/** A planner's piece of work for a line, kept simply. */
export const followUpSchema = z.object({
  id: z.int(),
  line: keySchema,
  lineName: z.string(),
  phase: phaseNameSchema.nullable(),
  cause: causeSchema,
  due: z.iso.date().nullable(),
  note: z.string(),
  state: z.enum(['open', 'done']),
  openedBy: z.string(),
  openedAt: z.iso.datetime(),
  doneAt: z.iso.datetime().nullable(),
});
export type FollowUp = z.infer<typeof followUpSchema>;
export const newFollowUpSchema = z.object({
  line: keySchema,
  phase: phaseNameSchema.nullable().default(null),
  cause: causeSchema.default('not told'),
  due: z.iso.date().nullable().default(null),
  note: z.string().trim().min(1, 'Say what is to be done.').max(1000, 'A note has at most 1000 characters.'),
});

const comparedSideSchema = z.object({
  days: z.int(),
  medianAmps: z.number().nullable(),
  composition: compositionSchema,
});

/**
 * Mann–Whitney on daily levels, allowed for days that are like their neighbours; null with too few days on a side, or
 * where they drift so much that a shift can’t be told from it.
 */
const shiftTestSchema = z
  .object({
    pTwoSided: z.number(),
    /** Hodges–Lehmann shift, after less before */
    shiftAmps: z.object({ value: z.number(), low: z.number(), high: z.number() }),
  })
  .nullable();

/**
 * GET /api/lines/<key>/comparison?at: both sides of a date, for each phase. A side reaches no further than the next
 * mark of the phase's history.
 */
export const comparisonSchema = z.object({
  line: keySchema,
  at: z.iso.date(),
  phases: z.array(
    z.object({
      phase: phaseNameSchema,
      before: comparedSideSchema,
      after: comparedSideSchema,
      /** of the levels as measured, the load of each side in them */
      test: shiftTestSchema,
      /** of the levels at one load, where both sides are separable */
      atReference: z
        .object({
          throughAmps: z.number(),
          beforeAmps: z.number(),
          afterAmps: z.number(),
          test: shiftTestSchema,
        })
        .nullable(),
    }),
  ),
});
export type Comparison = z.infer<typeof comparisonSchema>;
