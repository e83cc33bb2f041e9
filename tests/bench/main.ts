import { type ChildProcess, fork } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import { connectAsync } from 'mqtt';
import { createConnection } from 'mysql2/promise';
import { type PrivateDatabase, startDatabase } from '../../simulator/database';
import { freePort } from '../../simulator/ports';
import { createStore, type Store } from '../../src/store/client';
import { migrateStore } from '../../src/store/migrate';
import { snapshot } from '../../src/store/schema/snapshots';
import { insertMadeUpLine, spawnWorker } from '../faults/site-under-test';
import { startMosquitto } from '../mosquitto';
import { until } from '../until';
import { printEvaluationRates } from './evaluation';
import { type BenchMessage, LOAD, lineKey, MEASUREMENTS } from './shape';

/**
 * npm run bench: how fast snapshots are evaluated; and how fast the worker takes the feed to committed snapshots, against a subscriber that only counts,
 * on the same broker in the same run. Digits depend on the machine; the ratios are what is looked at.
 */

const PATIENCE_MS = 120_000;
const LOOK_EVERY_MS = 150;

function forked(file: string, ...args: string[]): ChildProcess {
  return fork(new URL(file, import.meta.url), args, { execArgv: ['--import', 'tsx'] });
}

function message<Kind extends BenchMessage['kind']>(
  child: ChildProcess,
  kind: Kind,
): Promise<Extract<BenchMessage, { kind: Kind }>> {
  return new Promise((resolve, reject) => {
    child.on('message', (told: BenchMessage) => {
      if (told.kind === kind) resolve(told as Extract<BenchMessage, { kind: Kind }>);
    });
    child.once('exit', (code) => reject(new Error(`A process of the bench ended early (code ${code}).`)));
  });
}

/** Publishes the load; says when the first message went out. */
async function publishLoad(brokerUrl: string): Promise<number> {
  const publisher = forked('./publisher.ts', brokerUrl, String(Date.now()));
  const published = message(publisher, 'published');
  await message(publisher, 'ready');
  publisher.send('go');
  return (await published).firstMs;
}

async function bareRate(brokerUrl: string): Promise<number> {
  const subscriber = forked('./bare-subscriber.ts', brokerUrl);
  const received = message(subscriber, 'received');
  await message(subscriber, 'ready');
  const firstMs = await publishLoad(brokerUrl);
  return rate(firstMs, (await received).lastMs);
}

async function workerRate(
  brokerUrl: string,
  database: PrivateDatabase,
  mqttVersion: string,
): Promise<number> {
  const store = createStore(await freshDatabase(database));
  await migrateStore(store);
  for (let index = 0; index < LOAD.lines; index += 1) await insertMadeUpLine(store, lineKey(index));
  const worker = spawnWorker({
    DATABASE_URL: currentDatabase(database),
    BROKER_URL: brokerUrl,
    BROKER_USERNAME: 'ingest',
    BROKER_PASSWORD: 'ingest-secret',
    MQTT_VERSION: mqttVersion,
  });
  try {
    await until(() => worker.output().includes('listening'), PATIENCE_MS, worker.output);
    const firstMs = await publishLoad(brokerUrl);
    return rate(firstMs, await completedMs(store, worker.output));
  } finally {
    await worker.stop();
    await forgetSession(brokerUrl);
    await store.close();
  }
}

/** Ends the session that the broker keeps for the worker: it would gather the next bare run's messages for the next worker. */
async function forgetSession(brokerUrl: string): Promise<void> {
  const client = await connectAsync(brokerUrl, {
    protocolVersion: 4,
    clientId: 'tareline-ingest-0-of-1',
    clean: true,
    username: 'ingest',
    password: 'ingest-secret',
  });
  await client.endAsync();
}

const rate = (firstMs: number, lastMs: number): number => (MEASUREMENTS / (lastMs - firstMs)) * 1000;

/** Looked at seldom: counting rows is work for the very database that is measured. */
async function completedMs(store: Store, said: () => string): Promise<number> {
  const deadlineMs = Date.now() + PATIENCE_MS;
  while ((await completeCount(store)) < MEASUREMENTS / 2) {
    if (Date.now() > deadlineMs) throw new Error(`The worker did not store everything. It said: ${said()}`);
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
  }
  return Date.now();
}

async function completeCount(store: Store): Promise<number> {
  const [row] = await store.db
    .select({ count: sql<number>`count(${snapshot.differentialAAmps})` })
    .from(snapshot);
  return Number(row!.count);
}

const currentDatabase = ({ adminUrl }: PrivateDatabase): string => adminUrl.replace(/\/mysql$/, '/bench');

async function freshDatabase(database: PrivateDatabase): Promise<string> {
  const connection = await createConnection(database.adminUrl);
  await connection.query('DROP DATABASE IF EXISTS bench');
  await connection.query('CREATE DATABASE bench');
  await connection.end();
  return currentDatabase(database);
}

const median = (values: readonly number[]): number =>
  values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)]!;
const thousands = (perSecond: number): string => `${(perSecond / 1000).toFixed(1).padStart(6)} k/s`;

async function row(name: string, brokerUrl: string, database: PrivateDatabase): Promise<void> {
  const bare: number[] = [];
  const worker: number[] = [];
  // in turn, so that a machine that slows down slows both
  for (let run = 0; run < LOAD.runs; run += 1) {
    bare.push(await bareRate(brokerUrl));
    worker.push(await workerRate(brokerUrl, database, '4'));
  }
  const ratio = median(worker) / median(bare);
  console.log(
    `${name.padEnd(10)} bare subscriber ${thousands(median(bare))}   feed to committed ${thousands(median(worker))}   ratio ${ratio.toFixed(2)}`,
  );
}

console.log('Full evaluation of a snapshot, one core:');
printEvaluationRates();

// an end from outside stops the database too, by its own exit handler
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => process.exit(1));

const dir = await mkdtemp(join(tmpdir(), 'tareline-bench-'));
const database = await startDatabase({ dir, port: 0 });
console.log(
  `${MEASUREMENTS} measurements of ${LOAD.lines} lines on ${LOAD.lines * 2} connections, median of ${LOAD.runs} runs:`,
);
try {
  const port = await freePort();
  const aedes = forked('./broker-process.ts', String(port));
  await message(aedes, 'ready');
  await row('aedes', `mqtt://127.0.0.1:${port}`, database);
  aedes.disconnect();
  const mosquitto = await startMosquitto();
  await row('mosquitto', mosquitto.url, database);
  await mosquitto.close();
} finally {
  await database.stop();
  await rm(dir, { recursive: true, force: true });
}
