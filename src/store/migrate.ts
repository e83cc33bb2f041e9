import { migrate } from 'drizzle-orm/mysql2/migrator';
import { fileURLToPath } from 'node:url';
import type { Store } from './client';

const MIGRATIONS = fileURLToPath(new URL('../../drizzle', import.meta.url));

/** Brings the database to the schema of this release; does nothing where it is there already. */
export async function migrateStore(store: Store): Promise<void> {
  await migrate(store.db, { migrationsFolder: MIGRATIONS });
}
