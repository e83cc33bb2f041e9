import { afterAll, beforeAll, expect, it } from 'vitest';
import { sql } from 'drizzle-orm';
import { type Broker, startBroker } from '../../simulator/broker';
import { createStore, type Store } from '../../src/store/client';
import { migrateStore } from '../../src/store/migrate';
import { snapshot } from '../../src/store/schema/snapshots';
import { testDatabaseUrl } from '../database';
import { until } from '../until';
import {
  ACCOUNTS,
  connectTerminals,
  insertMadeUpLine,
  instantsBefore,
  publishInstants,
  spawnWorker,
} from './site-under-test';

const PATIENCE_MS = 60_000;
const INSTANTS = 200;

let databaseUrl: string;
let store: Store;
let broker: Broker;

beforeAll(async () => {
  databaseUrl = await testDatabaseUrl();
  store = createStore(databaseUrl);
  await migrateStore(store);
  await insertMadeUpLine(store);
  broker = await startBroker({ port: 0, accounts: ACCOUNTS });
});
afterAll(async () => {
  await store.close();
  await broker.close();
});

const complete = async () => {
  const [row] = await store.db
    .select({ complete: sql<number>`coalesce(sum(${snapshot.differentialAAmps} = 10), 0)` })
    .from(snapshot);
  return Number(row!.complete);
};

it(
  'a worker finds a broker again that was away, and goes on with the feed',
  { timeout: 180_000 },
  async () => {
    const worker = spawnWorker({
      DATABASE_URL: databaseUrl,
      BROKER_URL: broker.url,
      BROKER_USERNAME: 'ingest',
      BROKER_PASSWORD: 'ingest-secret',
    });
    const terminals = await connectTerminals(broker.url);
    try {
      await until(() => worker.output().includes('listening'), PATIENCE_MS, worker.output);
      const instants = instantsBefore(Date.now(), INSTANTS);
      await publishInstants(terminals, instants.slice(0, INSTANTS / 2));
      await until(async () => (await complete()) === INSTANTS / 2, PATIENCE_MS, worker.output);
      const { port } = broker;
      await broker.close();
      await until(() => worker.output().includes('not reachable'), PATIENCE_MS, worker.output);
      broker = await startBroker({ port, accounts: ACCOUNTS });
      await until(() => worker.output().includes('connected again'), PATIENCE_MS, worker.output);
      // terminals keep what the broker has not taken, as theirs is QoS 1 too
      await publishInstants(terminals, instants.slice(INSTANTS / 2));
      await until(async () => (await complete()) === INSTANTS, PATIENCE_MS, worker.output);
      expect(await complete()).toBe(INSTANTS);
    } finally {
      await worker.stop();
      await terminals.close();
    }
  },
);
