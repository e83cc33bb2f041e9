import { z } from 'zod';
import { compensationSchema } from './compensation';
import { conditionSchema } from './condition';
import { breakerSchema, channelSchema, clockSchema, validitySchema } from './feed';
import { keySchema } from './key';
import { perPhaseSchema } from './phase';

export const resultTopic = (line: string): string => `tareline/result/${line}`;
export const RESULT_TOPICS = 'tareline/result/+';

const amps = z.number().nonnegative().nullable();

/** One phase of a computed snapshot; null where it cannot be computed (the result's reason says why). */
export const phaseResultSchema = z.object({
  differentialAmps: amps,
  restraintAmps: amps,
  thresholdAmps: amps,
  /** differential over threshold at the present restraint, as a ratio */
  utilisation: z.number().nonnegative().nullable(),
});
export type PhaseResult = z.infer<typeof phaseResultSchema>;

const polar = z.tuple([z.number(), z.number()]);

/** What one terminal sent for the instant; magnitudes in amperes and kilovolts rms, angles in degrees. */
export const terminalResultSchema = z.object({
  key: keySchema,
  present: z.boolean(),
  current: perPhaseSchema(polar).nullable(),
  voltage: perPhaseSchema(polar).nullable(),
  frequencyHz: z.number().nullable(),
  breaker: breakerSchema.nullable(),
  clock: clockSchema.nullable(),
  channel: channelSchema.nullable(),
  validity: validitySchema.nullable(),
  test: z.boolean(),
});
export type TerminalResult = z.infer<typeof terminalResultSchema>;

/** The computed snapshot of a line, as it is published, retained, for browsers and for a historian. */
export const resultSchema = z.object({
  line: keySchema,
  /** snapshot instant; null while nothing has been heard of the line */
  at: z.iso.datetime().nullable(),
  /** when the worker published this */
  publishedAt: z.iso.datetime(),
  condition: conditionSchema,
  /** why the line cannot be evaluated; null when it can */
  reason: z.string().nullable(),
  phases: perPhaseSchema(phaseResultSchema),
  /** mean through current of the three phases */
  throughAmps: amps,
  /** through current over the line's rating */
  throughRatio: z.number().nonnegative().nullable(),
  /** what became of the charging current; "fallen back" means that it stands in the differential after all */
  compensation: compensationSchema,
  settingsVersion: z.int().nullable(),
  terminals: z.array(terminalResultSchema),
});
export type Result = z.infer<typeof resultSchema>;
