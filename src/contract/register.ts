import { z } from 'zod';
import { keySchema } from './key';
import { characteristicSchema, restraintSchema, settingsVersionSchema } from './settings-version';

export const LINE_KINDS = ['overhead', 'cable', 'mixed'] as const;
export const lineKindSchema = z.enum(LINE_KINDS);
export const goesBySchema = z.enum(['phasors', 'reported']);

const name = z.string().trim().min(1, 'Give a name.').max(80, 'A name has at most 80 characters.');
const positive = (what: string, most: number) =>
  z.number(`${what} is a number.`).positive(`${what} is above 0.`).max(most, `${what} is at most ${most}.`);

/**
 * A transformer of two windings inside the zone (IEC 60076-1). Currents of the terminals behind it are brought to
 * the line's own voltage by ratio and clock number; zero sequence is taken out per winding where the scheme does so.
 */
export const inZoneTransformerSchema = z.object({
  /** voltage of the winding away from the line, kV phase to phase */
  otherVoltageKv: positive('The other voltage', 1200),
  clockNumber: z.int().min(0, 'The clock number is 0 to 11.').max(11, 'The clock number is 0 to 11.'),
  /** terminals behind the transformer, measured at its other voltage */
  otherTerminals: z.array(keySchema).max(5).default([]),
  removesZeroSequence: z
    .object({ line: z.boolean(), other: z.boolean() })
    .default({ line: true, other: true }),
});
export type InZoneTransformer = z.infer<typeof inZoneTransformerSchema>;

const lineFields = {
  name,
  /** who owns the line and answers for its protection; null when not recorded */
  owner: z
    .string()
    .trim()
    .min(1, 'Give the owner’s name.')
    .max(80, 'A name has at most 80 characters.')
    .nullable(),
  voltageKv: positive('The voltage', 1200),
  ratingAmps: positive('The rating', 20_000),
  emergencyRatingAmps: positive('The emergency rating', 40_000),
  lengthKm: positive('The length', 2_000),
  kind: lineKindSchema,
  /** positive-sequence capacitance, nF per km; null when not known */
  capacitanceNfPerKm: positive('The capacitance', 2_000).nullable(),
  /** least current of a fault inside the zone, from the owner's short-circuit study; null when not recorded */
  leastInternalFaultAmps: positive('The least internal fault current', 100_000).nullable(),
  goesBy: goesBySchema,
  inService: z.boolean(),
  seriesCompensated: z.boolean(),
  inZoneTransformer: inZoneTransformerSchema.nullable(),
};

const terminalFields = {
  substation: keySchema,
  substationName: name,
  ctPrimaryAmps: positive('The transformer primary', 20_000),
  ctClass: z.string().trim().max(20),
  inService: z.boolean(),
};

export const newTerminalSchema = z.object({
  key: keySchema,
  ...terminalFields,
  inService: z.boolean().default(true),
});
export const terminalPatchSchema = z.object(terminalFields).partial();
export const terminalSchema = z.object({ key: keySchema, position: z.int(), ...terminalFields });
export type Terminal = z.infer<typeof terminalSchema>;
export type NewTerminal = z.infer<typeof newTerminalSchema>;

export const newSettingsVersionSchema = z.object({
  validFrom: z.iso.datetime({ offset: true }),
  characteristic: characteristicSchema,
  restraint: restraintSchema,
  chargingCompensation: z.boolean().default(false),
  note: z.string().trim().min(1, 'Say why these settings are recorded.').max(500),
});
export type NewSettingsVersion = z.infer<typeof newSettingsVersionSchema>;

const ratingsInOrder = {
  check: (line: { ratingAmps?: number | undefined; emergencyRatingAmps?: number | undefined }) =>
    line.ratingAmps === undefined ||
    line.emergencyRatingAmps === undefined ||
    line.emergencyRatingAmps >= line.ratingAmps,
  says: { message: 'The emergency rating is at least the rating.', path: ['emergencyRatingAmps'] },
};

export const newLineSchema = z
  .object({
    key: keySchema,
    ...lineFields,
    owner: lineFields.owner.default(null),
    capacitanceNfPerKm: lineFields.capacitanceNfPerKm.default(null),
    leastInternalFaultAmps: lineFields.leastInternalFaultAmps.default(null),
    goesBy: goesBySchema.default('phasors'),
    inService: z.boolean().default(true),
    seriesCompensated: z.boolean().default(false),
    inZoneTransformer: inZoneTransformerSchema.nullable().default(null),
    terminals: z.array(newTerminalSchema).max(6, 'A line has at most 6 terminals.').default([]),
    settings: z.array(newSettingsVersionSchema).default([]),
  })
  .refine(ratingsInOrder.check, ratingsInOrder.says);
export type NewLine = z.infer<typeof newLineSchema>;

export const linePatchSchema = z
  .object(lineFields)
  .partial()
  .refine(ratingsInOrder.check, ratingsInOrder.says);
export type LinePatch = z.infer<typeof linePatchSchema>;

export const registerLineSchema = z.object({
  key: keySchema,
  ...lineFields,
  terminals: z.array(terminalSchema),
  settings: z.array(settingsVersionSchema),
});
export type RegisterLine = z.infer<typeof registerLineSchema>;
