import { z } from 'zod';
import { keySchema } from './key';

const finite = z.number();

/** Two-slope percentage restraint; slopes as ratios (0.3 = 30 %), amperes primary. Impossible combinations are judged by protection/. */
export const twoSlopeSchema = z.object({
  kind: z.literal('two-slope'),
  pickupAmps: finite,
  slope1: finite,
  kneeAmps: finite,
  slope2: finite,
  slopeStart: z.enum(['from-zero', 'from-pickup']),
});
/** Adaptive restraint by the sum of errors; errors as ratios, one allowance for each terminal. */
export const adaptiveSchema = z.object({
  kind: z.literal('adaptive'),
  pickupAmps: finite,
  ctErrors: z
    .array(z.object({ terminal: keySchema, errorBelow: finite, errorAbove: finite, limitAmps: finite }))
    .max(6),
  timeErrorMs: finite,
});

/** Alpha plane: restrains between 1/radius and radius, within half the angle around 180°. */
export const alphaPlaneSchema = z.object({
  kind: z.literal('alpha-plane'),
  pickupAmps: finite,
  radius: finite,
  angleDeg: finite,
});

/** Phase comparison of two terminals. */
export const phaseComparisonSchema = z.object({
  kind: z.literal('phase-comparison'),
  toleranceDeg: finite,
  releaseAmps: finite,
});

export const characteristicSchema = z.discriminatedUnion('kind', [
  twoSlopeSchema,
  adaptiveSchema,
  alphaPlaneSchema,
  phaseComparisonSchema,
]);
export type CharacteristicOnWire = z.infer<typeof characteristicSchema>;

export const restraintSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('scaled-sum'), factor: finite.positive().max(2) }),
  z.object({ kind: z.literal('maximum') }),
  z.object({ kind: z.literal('error-sum') }),
  z.object({ kind: z.literal('none') }),
]);
export type RestraintOnWire = z.infer<typeof restraintSchema>;

/** One version of a line's recorded settings: a copy for comparison, never sent to a device. */
export const settingsVersionSchema = z.object({
  id: z.int(),
  validFrom: z.iso.datetime(),
  characteristic: characteristicSchema,
  restraint: restraintSchema,
  /** the scheme takes the line's charging current out of the differential, from the measured voltages */
  chargingCompensation: z.boolean(),
  note: z.string(),
  recordedBy: z.string(),
  recordedAt: z.iso.datetime(),
});
export type SettingsVersion = z.infer<typeof settingsVersionSchema>;
