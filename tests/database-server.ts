import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { startDatabase } from '../simulator/database';

declare module 'vitest' {
  interface ProvidedContext {
    databaseAdminUrl: string;
  }
}

/** One private MariaDB server for the whole run; each test file makes databases of its own in it. */
export default async function startTestDatabase(project: TestProject): Promise<() => Promise<void>> {
  const dir = await mkdtemp(join(tmpdir(), 'tareline-test-'));
  const database = await startDatabase({ dir, port: 0 });
  project.provide('databaseAdminUrl', database.adminUrl);
  return async () => {
    await database.stop();
    await rm(dir, { recursive: true, force: true });
  };
}
