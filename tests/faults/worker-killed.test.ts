import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import { createStore, type Store } from '../../src/store/client';
import { snapshot } from '../../src/store/schema/snapshots';
import { migrateStore } from '../../src/store/migrate';
import { testDatabaseUrl } from '../database';
import { type Mosquitto, startMosquitto } from '../mosquitto';
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
const PATIENCE_MS = 90_000;

interface StoredCount {
  all: number;
  complete: number;
}

async function stored(store: Store): Promise<StoredCount> {
  const [row] = await store.db
    .select({
      all: sql<number>`count(*)`,
      complete: sql<number>`coalesce(sum(${snapshot.differentialAAmps} = 10), 0)`,
    })
    .from(snapshot);
  return { all: Number(row!.all), complete: Number(row!.complete) };
}

async function killedTwiceAmidTheStream(brokerUrl: string): Promise<StoredCount> {
  const databaseUrl = await testDatabaseUrl();
  const store = createStore(databaseUrl);
  await migrateStore(store);
  await insertMadeUpLine(store);
  const environment = {
    DATABASE_URL: databaseUrl,
    BROKER_URL: brokerUrl,
    BROKER_USERNAME: 'ingest',
    BROKER_PASSWORD: 'ingest-secret',
  };
  const terminals = await connectTerminals(brokerUrl);
  let worker = spawnWorker(environment);
  try {
    await until(() => worker.output().includes('listening'), PATIENCE_MS, worker.output);
    const publishing = publishInstants(terminals, instantsBefore(Date.now(), INSTANTS));
    for (const share of [0.2, 0.5]) {
      await until(async () => (await stored(store)).all > share * INSTANTS, PATIENCE_MS, worker.output);
      await worker.kill();
      worker = spawnWorker(environment);
    }
    await publishing;
    await until(
      async () => (await stored(store)).complete === INSTANTS,
      PATIENCE_MS,
      () => `complete store; ${worker.output()}`,
    );
    return await stored(store);
  } finally {
    await worker.stop();
    await terminals.close();
    await store.close();
  }
}

describe('a worker killed twice amid 20,000 measurements', () => {
  let aedes: Broker;
  let mosquitto: Mosquitto;
  beforeAll(async () => {
    aedes = await startBroker({ port: 0, accounts: ACCOUNTS });
    mosquitto = await startMosquitto();
  });
  afterAll(async () => {
    await aedes.close();
    await mosquitto.close();
  });

  it('leaves every snapshot stored, complete and once, on aedes', { timeout: 4 * PATIENCE_MS }, async () => {
    expect(await killedTwiceAmidTheStream(aedes.url)).toEqual({ all: INSTANTS, complete: INSTANTS });
  });

  it(
    'leaves every snapshot stored, complete and once, on mosquitto',
    { timeout: 4 * PATIENCE_MS },
    async () => {
      expect(await killedTwiceAmidTheStream(mosquitto.url)).toEqual({ all: INSTANTS, complete: INSTANTS });
    },
  );
});
