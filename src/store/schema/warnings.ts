import { index, int, json, mysqlEnum, mysqlTable, varchar } from 'drizzle-orm/mysql-core';
import { WARNING_KINDS, type WarningCause } from '../../contract/warning';
import { instant } from './columns';
import { line } from './register';

export const warning = mysqlTable(
  'warning',
  {
    id: int('id').autoincrement().primaryKey(),
    lineId: int('line_id')
      .notNull()
      .references(() => line.id, { onDelete: 'cascade' }),
    kind: mysqlEnum('kind', WARNING_KINDS).notNull(),
    cause: json('cause').$type<WarningCause>().notNull(),
    openedAt: instant('opened_at').notNull(),
    returnedAt: instant('returned_at'),
    acknowledgedAt: instant('acknowledged_at'),
    acknowledgedBy: varchar('acknowledged_by', { length: 80 }),
    note: varchar('note', { length: 1000 }),
    changedAt: instant('changed_at').notNull(),
  },
  (table) => [
    index('warning_line_opened').on(table.lineId, table.openedAt),
    index('warning_changed').on(table.changedAt),
  ],
);
