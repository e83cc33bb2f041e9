import {
  date,
  double,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  varchar,
} from 'drizzle-orm/mysql-core';
import { CAUSES, type StandingVerdict } from '../../contract/standing';
import { amps, instant } from './columns';
import { line } from './register';

/**
 * The newest findings on each phase's standing level, renewed every hour: what a fleet is sorted by in columns of its
 * own, everything else in one piece.
 */
export const standingVerdict = mysqlTable(
  'standing_verdict',
  {
    lineId: int('line_id').notNull(),
    phase: mysqlEnum('phase', ['a', 'b', 'c']).notNull(),
    computedAt: instant('computed_at').notNull(),
    levelAmps: amps('level_amps'),
    shareOfPickup: double('share_of_pickup'),
    utilisationP95: double('utilisation_p95'),
    emergencyUtilisation: double('emergency_utilisation'),
    chargingAmps: amps('charging_amps'),
    mismatchAmps: amps('mismatch_amps'),
    restAmps: amps('rest_amps'),
    creepAmpsPerMonth: double('creep_amps_per_month'),
    creepVerdict: mysqlEnum('creep_verdict', ['creep', 'within margin']),
    nearEarliest: date('near_earliest', { mode: 'string' }),
    nearLikely: date('near_likely', { mode: 'string' }),
    likelyCause: mysqlEnum('likely_cause', CAUSES).notNull(),
    verdict: json('verdict').$type<StandingVerdict>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.lineId, table.phase] }),
    index('standing_verdict_share').on(table.shareOfPickup),
    index('standing_verdict_near').on(table.nearLikely),
  ],
);

export const followUp = mysqlTable(
  'follow_up',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    phase: mysqlEnum('phase', ['a', 'b', 'c']),
    cause: mysqlEnum('cause', CAUSES).notNull(),
    due: date('due', { mode: 'string' }),
    note: varchar('note', { length: 1000 }).notNull(),
    openedBy: varchar('opened_by', { length: 80 }).notNull(),
    openedAt: instant('opened_at').notNull(),
    doneAt: instant('done_at'),
  },
  (table) => [index('follow_up_line').on(table.lineId, table.openedAt)],
);

/** Work done on a line that may have moved its standing level: no trend is fitted across its day. */
export const recordedWork = mysqlTable(
  'recorded_work',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    /** where it was done; null for the line itself or more than one terminal */
    terminal: varchar('terminal', { length: 40 }),
    doneOn: date('done_on', { mode: 'string' }).notNull(),
    what: varchar('what', { length: 500 }).notNull(),
    /** the follow-up that it ended, if one did */
    followUpId: int('follow_up_id').references(() => followUp.id, { onDelete: 'set null' }),
    recordedBy: varchar('recorded_by', { length: 80 }).notNull(),
    recordedAt: instant('recorded_at').notNull(),
    /** a record made in error is withdrawn, not deleted */
    withdrawnBy: varchar('withdrawn_by', { length: 80 }),
    withdrawnAt: instant('withdrawn_at'),
  },
  (table) => [index('recorded_work_line').on(table.lineId, table.doneOn)],
);
