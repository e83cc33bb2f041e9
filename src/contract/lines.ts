import { z } from 'zod';
import { keySchema } from './key';
import { perPhaseSchema, phaseNameSchema } from './phase';
import { goesBySchema, inZoneTransformerSchema, lineKindSchema, terminalSchema } from './register';
import { resultSchema } from './result';
import { standingVerdictSchema } from './standing';
import { settingsVersionSchema } from './settings-version';
import { creepSchema, warningSchema } from './warning';
import { workSchema } from './works';

/** The last 24 hours of one phase: the 24-hour standing level, and the lowest 5th and highest 95th hourly percentile. */
export const dayBandSchema = z.object({
  standingAmps: z.number().nullable(),
  p05Amps: z.number(),
  p95Amps: z.number(),
});

/** Everything a list says of one line: GET /api/lines. */
export const lineSummarySchema = resultSchema
  .omit({ line: true, terminals: true, publishedAt: true })
  .extend({
    key: keySchema,
    name: z.string(),
    substations: z.array(z.object({ key: keySchema, name: z.string() })),
    voltageKv: z.number(),
    kind: lineKindSchema,
    lengthKm: z.number(),
    goesBy: goesBySchema,
    ratingAmps: z.number(),
    emergencyRatingAmps: z.number(),
    owner: z.string().nullable(),
    seriesCompensated: z.boolean(),
    inZoneTransformer: inZoneTransformerSchema.nullable(),
    /** recorded pickup in force, amperes primary; null without settings */
    pickupAmps: z.number().nullable(),
    /** expected charging current from the line constants at nominal voltage; null when a constant is missing */
    chargingAmps: z.number().nullable(),
    lastDay: perPhaseSchema(dayBandSchema.nullable()),
    /** daily standing level of the phase with the highest one, oldest first; null for days without */
    dailyLevels: z.array(z.object({ day: z.iso.date(), levelAmps: z.number().nullable() })),
    creep: z.array(creepSchema),
    warnings: z.array(warningSchema),
  });
export type LineSummary = z.infer<typeof lineSummarySchema>;

export const lineListSchema = z.object({
  at: z.iso.datetime(),
  nearRatio: z.number(),
  lines: z.array(lineSummarySchema),
});
export type LineList = z.infer<typeof lineListSchema>;

/** GET /api/lines/<key> */
export const lineDetailSchema = z.object({
  at: z.iso.datetime(),
  nearRatio: z.number(),
  line: lineSummarySchema,
  terminals: z.array(terminalSchema),
  result: resultSchema.nullable(),
  settings: z.array(settingsVersionSchema),
  /** the newest findings on each phase's standing level; empty until the first look */
  standing: z.array(standingVerdictSchema),
  /** past and open, newest first */
  warnings: z.array(warningSchema),
  /** recorded works that were not withdrawn, oldest first */
  works: z.array(workSchema),
});
export type LineDetail = z.infer<typeof lineDetailSchema>;

/** One raw row: GET /api/lines/<key>/snapshots */
export const snapshotSchema = resultSchema
  .pick({ phases: true, throughAmps: true, compensation: true, settingsVersion: true, terminals: true })
  .extend({ at: z.iso.datetime(), complete: z.boolean(), reason: z.string().nullable() });
export type Snapshot = z.infer<typeof snapshotSchema>;
export const snapshotListSchema = z.object({
  line: keySchema,
  /** true when the window held more rows than one answer carries; ask again from the last instant */
  truncated: z.boolean(),
  snapshots: z.array(snapshotSchema),
});
export type SnapshotList = z.infer<typeof snapshotListSchema>;

/** One phase of an hour or day row; levels are null when no snapshot qualified. */
export const levelSchema = z.object({
  start: z.iso.datetime(),
  phase: phaseNameSchema,
  leastAmps: z.number().nullable(),
  p05Amps: z.number().nullable(),
  medianAmps: z.number().nullable(),
  p95Amps: z.number().nullable(),
  greatestAmps: z.number().nullable(),
  meanRestraintAmps: z.number().nullable(),
  meanThroughAmps: z.number().nullable(),
  greatestUtilisation: z.number().nullable(),
  qualifiedCount: z.int(),
  allCount: z.int(),
  /** how many snapshots each rule kept from counting; null on rows of before this was counted */
  disqualified: z.record(z.string(), z.int()).nullable(),
});
export type Level = z.infer<typeof levelSchema>;
export const rungSchema = z.enum(['minute', 'hour', 'day']);
export type Rung = z.infer<typeof rungSchema>;
export const levelListSchema = z.object({
  line: keySchema,
  rung: rungSchema,
  levels: z.array(levelSchema),
  /** Sen line per phase over the daily levels, where the drift is significant */
  creep: z.array(creepSchema),
});
export type LevelList = z.infer<typeof levelListSchema>;
