import { double, int, json, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core';
import type { Creep } from '../../contract/warning';
import type { Disqualification } from '../../standing/qualification';
import { amps, bytes, instant } from './columns';

const levelColumns = () => ({
  lineId: int('line_id').notNull(),
  phase: mysqlEnum('phase', ['a', 'b', 'c']).notNull(),
  start: instant('start').notNull(),
  leastAmps: amps('least_amps'),
  p05Amps: amps('p05_amps'),
  medianAmps: amps('median_amps'),
  p95Amps: amps('p95_amps'),
  greatestAmps: amps('greatest_amps'),
  meanRestraintAmps: amps('mean_restraint_amps'),
  meanThroughAmps: amps('mean_through_amps'),
  greatestUtilisation: double('greatest_utilisation'),
  qualifiedCount: int('qualified_count').notNull(),
  allCount: int('all_count').notNull(),
  /** how many snapshots each rule kept from counting, one may fail several; null on rows of before this was counted */
  disqualified: json('disqualified').$type<Partial<Record<Disqualification, number>>>(),
  /** what the composition needs, packed by store/composition-packing; they add over any window */
  sums: bytes('sums', { length: 1024 }),
  /** the paths that the terminals' channels took at the end of the window; null where no terminal says */
  channelPath: varchar('channel_path', { length: 300 }),
});

/** Partitioned by day in a hand-written migration, as the raw rows are. */
export const minuteLevel = mysqlTable('minute_level', levelColumns(), (table) => [
  primaryKey({ columns: [table.lineId, table.phase, table.start] }),
]);

export const hourLevel = mysqlTable('hour_level', levelColumns(), (table) => [
  primaryKey({ columns: [table.lineId, table.phase, table.start] }),
]);

export const dayLevel = mysqlTable('day_level', levelColumns(), (table) => [
  primaryKey({ columns: [table.lineId, table.phase, table.start] }),
]);

/** The newest verdict on the drift of each phase's daily levels; only significant ones are kept. */
export const creepVerdict = mysqlTable(
  'creep_verdict',
  {
    lineId: int('line_id').notNull(),
    phase: mysqlEnum('phase', ['a', 'b', 'c']).notNull(),
    computedAt: instant('computed_at').notNull(),
    creep: json('creep').$type<Creep>().notNull(),
  },
  (table) => [primaryKey({ columns: [table.lineId, table.phase] })],
);

/** Closed hours whose raw rows have changed since their level row was built: work to do that outlives a worker. */
export const staleHour = mysqlTable(
  'stale_hour',
  { lineId: int('line_id').notNull(), start: instant('start').notNull() },
  (table) => [primaryKey({ columns: [table.lineId, table.start] })],
);
