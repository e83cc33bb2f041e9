import { double, int, mysqlTable, primaryKey, smallint } from 'drizzle-orm/mysql-core';
import { amps, bytes, instant } from './columns';

/** Raw: one row a line and instant. Partitioned by day in a hand-written migration, so it carries no foreign keys. */
export const snapshot = mysqlTable(
  'snapshot',
  {
    lineId: int('line_id').notNull(),
    at: instant('at').notNull(),
    /** bits named in store/snapshot-flags.ts */
    flags: smallint('flags').notNull(),
    differentialAAmps: amps('differential_a_amps'),
    differentialBAmps: amps('differential_b_amps'),
    differentialCAmps: amps('differential_c_amps'),
    restraintAAmps: amps('restraint_a_amps'),
    restraintBAmps: amps('restraint_b_amps'),
    restraintCAmps: amps('restraint_c_amps'),
    thresholdAAmps: amps('threshold_a_amps'),
    thresholdBAmps: amps('threshold_b_amps'),
    thresholdCAmps: amps('threshold_c_amps'),
    utilisationA: double('utilisation_a'),
    utilisationB: double('utilisation_b'),
    utilisationC: double('utilisation_c'),
    throughAmps: amps('through_amps'),
    settingRecordId: int('setting_record_id'),
    /** the terminals' measurements, packed by store/packing; every derived figure can be computed again from them */
    phasors: bytes('phasors', { length: 4096 }).notNull(),
  },
  (table) => [primaryKey({ columns: [table.lineId, table.at] })],
);
