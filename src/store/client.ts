import { drizzle, type MySql2Database } from 'drizzle-orm/mysql2';
import { createPool, type Pool, type PoolConnection } from 'mysql2/promise';

export interface Store {
  readonly db: MySql2Database;
  /** for the worker's hot path only, which writes batches without the query builder */
  readonly pool: Pool;
  close(): Promise<void>;
}

const CONNECTIONS = 8;
const CONNECT_TIMEOUT_MS = 5_000;

export function createStore(databaseUrl: string): Store {
  const pool = createPool({
    uri: databaseUrl.replace(/^mariadb:/, 'mysql:'),
    connectionLimit: CONNECTIONS,
    connectTimeout: CONNECT_TIMEOUT_MS,
    timezone: 'Z',
    supportBigNumbers: true,
  });
  return { db: drizzleOver(pool), pool, close: () => pool.end() };
}

// MariaDB knows no LATERAL joins, which is what this mode leaves out; without a schema it types as the default mode
const drizzleOver = (client: Pool | PoolConnection): MySql2Database =>
  drizzle(client as Pool, { mode: 'planetscale' }) as unknown as MySql2Database;

/** One transaction on one connection, for the driver's batches and the query builder alike. */
export async function inTransaction<T>(
  store: Store,
  work: (connection: PoolConnection, db: MySql2Database) => Promise<T>,
): Promise<T> {
  const connection = await store.pool.getConnection();
  try {
    await connection.beginTransaction();
    const outcome = await work(connection, drizzleOver(connection));
    await connection.commit();
    connection.release();
    return outcome;
  } catch (error) {
    // a connection that failed in mid-transaction is not given back: closing it rolls back for certain
    connection.destroy();
    throw error;
  }
}
