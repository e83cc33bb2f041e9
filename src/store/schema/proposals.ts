import { index, int, json, mysqlTable, varchar } from 'drizzle-orm/mysql-core';
import type { ReplaySummary } from '../../contract/replay';
import type { SettingsVersion } from '../../contract/settings-version';
import { instant } from './columns';
import { line } from './register';

/** Settings that an engineer proposes. Nothing reads them but the pages that show them. */
export const settingProposal = mysqlTable(
  'setting_proposal',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    /** a copy, so that the sheet shows later what stood beside it then */
    recorded: json('recorded').$type<SettingsVersion>(),
    /** the settings tried, the period, and the figures */
    summary: json('summary').$type<ReplaySummary>().notNull(),
    note: varchar('note', { length: 500 }).notNull(),
    keptBy: varchar('kept_by', { length: 80 }).notNull(),
    keptAt: instant('kept_at').notNull(),
  },
  (table) => [index('setting_proposal_line_kept').on(table.lineId, table.keptAt)],
);
