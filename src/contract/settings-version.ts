import { z } from 'zod';

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
export const characteristicSchema = z.discriminatedUnion('kind', [twoSlopeSchema]);

export const restraintSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('scaled-sum'), factor: finite.positive().max(2) }),
  z.object({ kind: z.literal('maximum') }),
]);

/** One version of a line's recorded settings: a copy for comparison, never sent to a device. */
export const settingsVersionSchema = z.object({
  id: z.int(),
  validFrom: z.iso.datetime(),
  characteristic: characteristicSchema,
  restraint: restraintSchema,
  note: z.string(),
  recordedBy: z.string(),
  recordedAt: z.iso.datetime(),
});
export type SettingsVersion = z.infer<typeof settingsVersionSchema>;
