import {
  boolean,
  double,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core';
import type { z } from 'zod';
import { LINE_KINDS, type inZoneTransformerSchema } from '../../contract/register';
import type { characteristicSchema, restraintSchema } from '../../contract/settings-version';
import { amps, instant } from './columns';

export const substation = mysqlTable('substation', {
  key: varchar('key', { length: 40 }).primaryKey(),
  name: varchar('name', { length: 80 }).notNull(),
});

export const line = mysqlTable('line', {
  id: int('id').autoincrement().primaryKey(),
  key: varchar('key', { length: 40 }).notNull().unique(),
  name: varchar('name', { length: 80 }).notNull(),
  /** who owns the line and answers for its protection; null when not recorded */
  owner: varchar('owner', { length: 80 }),
  voltageKv: double('voltage_kv').notNull(),
  ratingAmps: amps('rating_amps').notNull(),
  emergencyRatingAmps: amps('emergency_rating_amps').notNull(),
  lengthKm: double('length_km').notNull(),
  kind: mysqlEnum('kind', LINE_KINDS).notNull(),
  capacitanceNfPerKm: double('capacitance_nf_per_km'),
  leastInternalFaultAmps: amps('least_internal_fault_amps'),
  goesBy: mysqlEnum('goes_by', ['phasors', 'reported']).notNull(),
  inService: boolean('in_service').notNull(),
  seriesCompensated: boolean('series_compensated').notNull(),
  inZoneTransformer: json('in_zone_transformer').$type<z.infer<typeof inZoneTransformerSchema>>(),
});

export const terminal = mysqlTable(
  'terminal',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    key: varchar('key', { length: 40 }).notNull(),
    /** 0 is the reference terminal; the one whose reported quantities are taken on a line that goes by them */
    position: int('position').notNull(),
    substation: varchar('substation', { length: 40 })
      .notNull()
      .references(() => substation.key),
    ctPrimaryAmps: amps('ct_primary_amps').notNull(),
    ctClass: varchar('ct_class', { length: 20 }).notNull(),
    inService: boolean('in_service').notNull(),
  },
  (table) => [uniqueIndex('terminal_line_key').on(table.lineId, table.key)],
);

export const settingRecord = mysqlTable(
  'setting_record',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    validFrom: instant('valid_from').notNull(),
    characteristic: json('characteristic').$type<z.infer<typeof characteristicSchema>>().notNull(),
    restraint: json('restraint').$type<z.infer<typeof restraintSchema>>().notNull(),
    chargingCompensation: boolean('charging_compensation').notNull().default(false),
    note: varchar('note', { length: 500 }).notNull(),
    recordedBy: varchar('recorded_by', { length: 80 }).notNull(),
    recordedAt: instant('recorded_at').notNull(),
  },
  (table) => [index('setting_record_line_from').on(table.lineId, table.validFrom)],
);

/** One row; counts every change of the register, so that workers notice one by reading a single number. */
export const registerRevision = mysqlTable('register_revision', {
  id: int('id').primaryKey(),
  revision: int('revision').notNull(),
});
