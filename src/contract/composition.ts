import { z } from 'zod';
import { keySchema } from './key';
import { phaseNameSchema } from './phase';

/** A value with its 95 % interval. */
export const estimateSchema = z.object({ value: z.number(), low: z.number(), high: z.number() });
export type EstimateOnWire = z.infer<typeof estimateSchema>;

/** Real and imaginary part. */
const complex = z.tuple([z.number(), z.number()]);

/** Amperes rms primary, against the direction of the reference terminal's current. */
const phasor = complex;

/** Against the class of the two transformers; null where a class is not known. */
export const budgetVerdictSchema = z.enum(['within', 'beyond', 'undecided']).nullable();

export const mismatchSchema = z.object({
  terminal: keySchema,
  /** the line's first terminal, which it is measured against */
  against: keySchema,
  /** per unit of the current, above 0 where this terminal measures more */
  ratio: estimateSchema,
  ratioBudget: budgetVerdictSchema,
  angleDeg: estimateSchema,
  angleBudget: budgetVerdictSchema,
  /** the difference of the channel's delays that would look the same */
  asymmetryMs: estimateSchema,
});

/** The causes laid head to tail at the window's typical load; their sum is the differential. */
export const polygonSchema = z.object({
  chargingAmps: phasor,
  leakageAmps: phasor,
  ratioAmps: phasor,
  angleAmps: phasor,
  restAmps: phasor,
  differentialAmps: phasor,
});
export type PolygonOnWire = z.infer<typeof polygonSchema>;

/** What the differential takes of the mean voltage at whatever load: charging and leakage. */
export const admittanceSchema = z.object({
  /** against the voltage, siemens/1000: what the scheme in force was left with */
  leftMillisiemens: complex,
  /** susceptance that this scheme had taken out before by compensation, siemens/1000; 0 where it does not */
  compensatedMillisiemens: z.number(),
});

const window = { from: z.iso.date(), to: z.iso.date(), days: z.int(), snapshotCount: z.int() };

/** What a standing level consists of over a window of days, or why that can't be told. */
export const compositionSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('separated'),
    ...window,
    polygon: polygonSchema.nullable(),
    /** null without a voltage: the mismatches then hold the charging */
    chargingAmps: estimateSchema.nullable(),
    expectedChargingAmps: z.number().nullable(),
    leakageAmps: estimateSchema.nullable(),
    /** missing from findings that were kept before it was */
    admittance: admittanceSchema.optional(),
    mismatches: z.array(mismatchSchema),
    residualRmsAmps: z.number(),
    /** condition number of the scaled normal matrix */
    condition: z.number(),
  }),
  z.object({
    kind: z.literal('not separable'),
    ...window,
    /** whole sentences: why, and what would make it so */
    reason: z.string(),
  }),
]);
export type CompositionOnWire = z.infer<typeof compositionSchema>;

/** GET /api/lines/<key>/composition?from&to: every phase over the window, and the causes day by day. */
export const lineCompositionSchema = z.object({
  line: keySchema,
  phases: z.object({ a: compositionSchema, b: compositionSchema, c: compositionSchema }),
  /** magnitudes of the causes on each day, by the window's composition; empty where it is not separable */
  history: z.array(
    z.object({
      day: z.iso.date(),
      phase: phaseNameSchema,
      chargingAmps: z.number(),
      ratioAmps: z.number(),
      angleAmps: z.number(),
      restAmps: z.number(),
      differentialAmps: z.number(),
    }),
  ),
});
export type LineComposition = z.infer<typeof lineCompositionSchema>;
