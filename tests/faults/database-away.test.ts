import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import { type PrivateDatabase, startDatabase } from '../../simulator/database';
import { createStore } from '../../src/store/client';
import { migrateStore } from '../../src/store/migrate';
import { snapshot } from '../../src/store/schema/snapshots';
import { until } from '../until';
import {
  ACCOUNTS,
  connectTerminals,
  insertMadeUpLine,
  instantsBefore,
  publishInstants,
  spawnWorker,
} from './site-under-test';

const INSTANTS = 10_000;
const AWAY_MS = 20_000;
const PATIENCE_MS = 90_000;

let dir: string;
let database: PrivateDatabase;
let broker: Broker;

beforeAll(async () => {
  dir = await mkdtemp(join(tmpdir(), 'tareline-away-'));
  database = await startDatabase({ dir, port: 0 });
  broker = await startBroker({ port: 0, accounts: ACCOUNTS });
});
afterAll(async () => {
  await broker.close();
  await database.stop();
  await rm(dir, { recursive: true, force: true });
});

it(
  'a database that loses its power for 20 s amid 20,000 measurements loses none of them',
  { timeout: 240_000 },
  async () => {
    const store = createStore(database.url);
    await migrateStore(store);
    await insertMadeUpLine(store);
    const count = async () => {
      const [row] = await store.db
        .select({
          complete: sql<number>`coalesce(sum(${snapshot.differentialAAmps} = 10), 0)`,
          all: sql<number>`count(*)`,
        })
        .from(snapshot);
      return { all: Number(row!.all), complete: Number(row!.complete) };
    };
    const worker = spawnWorker({
      DATABASE_URL: database.url,
      BROKER_URL: broker.url,
      BROKER_USERNAME: 'ingest',
      BROKER_PASSWORD: 'ingest-secret',
    });
    const terminals = await connectTerminals(broker.url);
    try {
      await until(() => worker.output().includes('listening'), PATIENCE_MS, worker.output);
      const publishing = publishInstants(terminals, instantsBefore(Date.now(), INSTANTS));
      await until(async () => (await count()).all > 0.2 * INSTANTS, PATIENCE_MS, worker.output);
      const { port } = database;
      await database.killHard();
      // the outage itself is what is waited for here, not a guess at how long something takes
      await new Promise((resolve) => setTimeout(resolve, AWAY_MS));
      expect(worker.child.exitCode).toBeNull();
      database = await startDatabase({ dir, port });
      await publishing;
      await until(async () => (await count()).complete === INSTANTS, PATIENCE_MS, worker.output);
      expect(await count()).toEqual({ all: INSTANTS, complete: INSTANTS });
      const said = worker.output().match(/Database: waiting/g) ?? [];
      expect(said.length).toBeGreaterThan(0);
      // three loops may each meet the outage, and each says so once
      expect(said.length).toBeLessThanOrEqual(3);
    } finally {
      await worker.stop();
      await terminals.close();
      await store.close();
    }
  },
);
