import { index, int, mysqlEnum, mysqlTable, varchar } from 'drizzle-orm/mysql-core';
import { IMPORT_KINDS } from '../../contract/register-import';
import { instant } from './columns';

/** One file that was written into the register: what of it was new, what changed, and what was already so. */
export const importBatch = mysqlTable(
  'import_batch',
  {
    id: int('id').autoincrement().primaryKey(),
    importedAt: instant('imported_at').notNull(),
    /** the person's name as it then was; who it was stands in the audit trail too */
    importedBy: varchar('imported_by', { length: 80 }).notNull(),
    kind: mysqlEnum('kind', IMPORT_KINDS).notNull(),
    fileName: varchar('file_name', { length: 120 }).notNull(),
    addedCount: int('added_count').notNull(),
    changedCount: int('changed_count').notNull(),
    leftCount: int('left_count').notNull(),
  },
  (table) => [index('import_batch_imported_at').on(table.importedAt)],
);
