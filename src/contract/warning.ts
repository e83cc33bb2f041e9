import { z } from 'zod';
import { keySchema } from './key';
import { phaseNameSchema } from './phase';

export const WARNING_KINDS = ['over', 'near', 'rising', 'blind'] as const;
export const warningKindSchema = z.enum(WARNING_KINDS);
export type WarningKind = z.infer<typeof warningKindSchema>;

/** States of ISA-18.2 / IEC 62682 that Tareline uses so far. */
export const WARNING_STATES = [
  'unacknowledged',
  'acknowledged',
  'returned to normal, unacknowledged',
  'normal',
] as const;
export const warningStateSchema = z.enum(WARNING_STATES);
export type WarningState = z.infer<typeof warningStateSchema>;

const day = z.iso.date().nullable();
export const forecastDatesSchema = z.object({ earliest: day, likely: day, latest: day });
export type ForecastDatesOnWire = z.infer<typeof forecastDatesSchema>;

/** The significant drift of one phase's standing level; dates are null when not within five years. */
export const creepSchema = z.object({
  phase: phaseNameSchema,
  verdict: z.enum(['creep', 'within margin']),
  slopeAmpsPerMonth: z.number(),
  slopeLowAmpsPerMonth: z.number(),
  slopeHighAmpsPerMonth: z.number(),
  pTwoSided: z.number(),
  days: z.int(),
  levelNowAmps: z.number(),
  near: forecastDatesSchema,
  pickup: forecastDatesSchema,
});
export type Creep = z.infer<typeof creepSchema>;

/** What raised a warning, with the figures that did. */
export const warningCauseSchema = z.discriminatedUnion('basis', [
  z.object({
    basis: z.literal('utilisation'),
    phase: phaseNameSchema,
    utilisation: z.number(),
    limit: z.number(),
    differentialAmps: z.number(),
    /** null under a scheme that judges by a region, not by a threshold */
    thresholdAmps: z.number().nullable(),
  }),
  z.object({
    basis: z.literal('standing level'),
    phase: phaseNameSchema,
    levelAmps: z.number(),
    pickupAmps: z.number(),
    limit: z.number(),
  }),
  z.object({ basis: z.literal('creep'), creep: creepSchema }),
  z.object({
    basis: z.literal('step'),
    phase: phaseNameSchema,
    at: z.iso.datetime(),
    fromAmps: z.number(),
    toAmps: z.number(),
    channelPathChanged: z.boolean(),
  }),
  z.object({ basis: z.literal('terminal silent'), terminals: z.array(keySchema) }),
  z.object({ basis: z.literal('validity'), terminals: z.array(keySchema) }),
  z.object({ basis: z.literal('clock'), terminals: z.array(keySchema) }),
]);
export type WarningCause = z.infer<typeof warningCauseSchema>;

export const warningSchema = z.object({
  id: z.int(),
  line: keySchema,
  lineName: z.string(),
  kind: warningKindSchema,
  state: warningStateSchema,
  cause: warningCauseSchema,
  openedAt: z.iso.datetime(),
  returnedAt: z.iso.datetime().nullable(),
  acknowledgedAt: z.iso.datetime().nullable(),
  acknowledgedBy: z.string().nullable(),
  note: z.string().nullable(),
  /** when anything of it last changed; clients keep the newest */
  changedAt: z.iso.datetime(),
});
export type Warning = z.infer<typeof warningSchema>;

export const acknowledgeSchema = z.object({
  note: z
    .string()
    .trim()
    .min(1, 'Write a note: what you saw or did.')
    .max(1000, 'A note has at most 1000 characters.'),
});
