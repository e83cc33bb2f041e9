import { randomBytes } from 'node:crypto';
import { createConnection } from 'mysql2/promise';
import { afterAll, inject } from 'vitest';
import { createStore, type Store } from '../src/store/client';
import { migrateStore } from '../src/store/migrate';

/** The address of a database of its own, empty, dropped when the test file ends. */
export async function testDatabaseUrl(): Promise<string> {
  const adminUrl = inject('databaseAdminUrl');
  const name = `test_${randomBytes(6).toString('hex')}`;
  await onServer(adminUrl, `CREATE DATABASE ${name}`);
  afterAll(() => onServer(adminUrl, `DROP DATABASE ${name}`));
  const url = new URL(adminUrl);
  url.pathname = `/${name}`;
  return url.href;
}

/** A store over a database of its own at the schema of this release, closed when the test file ends. */
export async function testStore(): Promise<Store> {
  const store = createStore(await testDatabaseUrl());
  afterAll(() => store.close());
  await migrateStore(store);
  return store;
}

async function onServer(adminUrl: string, statement: string): Promise<void> {
  const connection = await createConnection(adminUrl);
  try {
    await connection.query(statement);
  } finally {
    await connection.end();
  }
}
