import { connectAsync, type MqttClient } from 'mqtt';
import { startBroker } from '../../simulator/broker';
import type { BrokerAccount } from '../../simulator/broker-account';
import { measurementTopic, type Measurement, presenceTopic } from '../../src/contract/feed';
import { type Result, resultSchema, resultTopic } from '../../src/contract/result';
import { startWorker, type Worker } from '../../src/ingest/worker';
import { ingestSettings } from '../../src/settings';
import type { Store } from '../../src/store/client';
import { AT_MS, balanced, iso, measurement } from './made-up-feed';
import { tapBroker, type TappedBroker } from './tapped-broker';

/** A worker on a real broker and a real database, with a clock that the test winds on, and terminals to speak. */
export interface RunningWorker {
  readonly clock: { nowMs: number };
  readonly log: string[];
  worker(): Worker;
  acknowledgedCount(): number;
  /** one terminal's message, as it is; settles when the broker has it */
  publish(terminal: string, sent: Measurement | string | Buffer): Promise<void>;
  presence(terminal: string, presence: 'online' | 'offline'): Promise<void>;
  /** both terminals of the made-up line at an instant, with this differential current at a load of 200 A */
  balance(atMs: number, differentialAmps: number): Promise<void>;
  /** a connection of the web process's own, made just now */
  webClient(): Promise<MqttClient>;
  /** the newest result published of a line */
  result(line: string): Result | undefined;
  stopWorker(): Promise<void>;
  startWorker(): Promise<void>;
  close(): Promise<void>;
}

const TERMINALS = ['arden-birk/arden', 'arden-birk/birk', 'corl-dorn/corl', 'corl-dorn/dorn'];
const accounts: readonly BrokerAccount[] = [
  ...TERMINALS.map((username): BrokerAccount => ({ username, password: 't', kind: 'terminal' })),
  { username: 'ingest', password: 'i', kind: 'ingest' },
  { username: 'web', password: 'w', kind: 'web' },
];

export async function runningWorker(store: Store): Promise<RunningWorker> {
  const broker = await startBroker({ port: 0, accounts });
  const tap = await tapBroker(broker.port);
  const clients = new Map<string, MqttClient>();
  const connected = (username: string): Promise<MqttClient> => {
    const password = accounts.find((account) => account.username === username)!.password;
    return connectAsync(broker.url, { protocolVersion: 4, username, password });
  };
  const clientOf = async (username: string): Promise<MqttClient> => {
    const client = clients.get(username) ?? (await connected(username));
    clients.set(username, client);
    return client;
  };
  const send = async (terminal: string, topic: string, payload: string | Buffer) =>
    void (await (
      await clientOf(terminal)
    ).publishAsync(topic, payload, { qos: 1, retain: topic.endsWith('presence') }));
  const parts = (terminal: string) => terminal.split('/') as [string, string];
  const results = await followedResults(await clientOf('web'));

  const clock = { nowMs: AT_MS };
  const log: string[] = [];
  let seq = 0;
  const start = (): Promise<Worker> =>
    workerOn(store, { tap, now: () => clock.nowMs, log: (said) => log.push(said) });
  let worker = await start();
  const publish: RunningWorker['publish'] = (terminal, sent) =>
    send(
      terminal,
      measurementTopic(...parts(terminal)),
      typeof sent === 'string' || Buffer.isBuffer(sent) ? sent : JSON.stringify(sent),
    );

  return {
    clock,
    log,
    worker: () => worker,
    acknowledgedCount: tap.acknowledgedCount,
    publish,
    presence: (terminal, presence) => send(terminal, presenceTopic(...parts(terminal)), presence),
    async balance(atMs, differentialAmps) {
      const at = iso(atMs);
      seq += 1;
      const arden = measurement({ at, seq, current: balanced(200 + differentialAmps, 0) });
      await publish('arden-birk/arden', arden);
      await publish('arden-birk/birk', measurement({ at, seq, current: balanced(200, 180) }));
    },
    webClient: () => connected('web'),
    result: (line) => results.get(resultTopic(line)),
    stopWorker: () => worker.close(),
    startWorker: async () => void (worker = await start()),
    async close() {
      await worker.close();
      for (const client of clients.values()) await client.endAsync(true);
      await tap.close();
      await broker.close();
    },
  };
}

function workerOn(
  store: Store,
  { tap, now, log }: { tap: TappedBroker; now: () => number; log: (said: string) => void },
): Promise<Worker> {
  const settings = ingestSettings({
    // the store is handed in: the address is not used
    DATABASE_URL: 'mysql://unused.invalid/unused',
    BROKER_URL: tap.url,
    BROKER_USERNAME: 'ingest',
    BROKER_PASSWORD: 'i',
  });
  return startWorker({ settings, store, now, log, stop: new AbortController() });
}

async function followedResults(client: MqttClient): Promise<ReadonlyMap<string, Result>> {
  const results = new Map<string, Result>();
  client.on('message', (topic, payload) => {
    results.set(topic, resultSchema.parse(JSON.parse(payload.toString())));
  });
  await client.subscribeAsync(resultTopic('+'), { qos: 0 });
  return results;
}
