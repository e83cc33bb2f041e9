import { databaseSettings, SettingsError } from '../settings';
import { createStore } from './client';
import { migrateStore } from './migrate';

try {
  const store = createStore(databaseSettings().DATABASE_URL);
  try {
    await migrateStore(store);
    console.log('The database is at the schema of this release.');
  } finally {
    await store.close();
  }
} catch (error) {
  const cause = (error as Error).cause as Error | undefined;
  console.error(
    error instanceof SettingsError
      ? error.message
      : `The migration failed: ${(cause ?? (error as Error)).message}`,
  );
  process.exitCode = 1;
}
