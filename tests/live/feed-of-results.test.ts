import { connectAsync } from 'mqtt';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import type { BrokerAccount } from '../../simulator/broker-account';
import { freePort } from '../../simulator/ports';
import { resultTopic } from '../../src/contract/result';
import type { WarningCause } from '../../src/contract/warning';
import { followResults, type ResultsFeed } from '../../src/live/feed-of-results';
import { createLiveHub, type LiveHub } from '../../src/live/hub';
import { webSettings } from '../../src/settings';
import { createStore, type Store } from '../../src/store/client';
import type { RegisteredLine } from '../../src/store/register';
import { acknowledgeWarning, openWarning, returnWarning } from '../../src/store/warnings';
import { testStore } from '../database';
import { storedLine } from '../store/made-up-rows';
import { until } from '../until';
import { resultOf } from './made-up-result';

const NOW_MS = Date.parse('2026-03-02T10:00:00.000Z');
const PATIENCE_MS = 8_000;
const accounts: readonly BrokerAccount[] = [
  { username: 'ingest', password: 'i', kind: 'ingest' },
  { username: 'web', password: 'w', kind: 'web' },
];
const store = await testStore();
let line: RegisteredLine;
beforeAll(async () => void (line = await storedLine(store)));

const closing: (() => Promise<void> | void)[] = [];
afterEach(async () => {
  for (const close of closing.splice(0).toReversed()) await close();
});

async function broker(port = 0): Promise<Broker> {
  const started = await startBroker({ port, accounts });
  closing.push(() => started.close().catch(() => undefined));
  return started;
}

/** A hub that follows a broker and a database, and what was said on the way. */
function following(brokerUrl: string, from: Store = store) {
  const hub: LiveHub = createLiveHub(() => NOW_MS);
  const said: string[] = [];
  const settings = webSettings({
    // the store is handed in: the address is not used
    DATABASE_URL: 'mysql://unused.invalid/unused',
    BROKER_URL: brokerUrl,
    BROKER_USERNAME: 'web',
    BROKER_PASSWORD: 'w',
    PUBLIC_URL: 'http://tareline.example',
  });
  const parts = { settings, hub, store: from, now: () => NOW_MS, log: (words: string) => said.push(words) };
  const feed: ResultsFeed = followResults(parts);
  closing.push(hub.close, feed.close);
  const figure = (key: string) => hub.results().get(key)?.phases.a.differentialAmps;
  return { hub, feed, said, figure };
}

async function publish(url: string, key: string, payload: string): Promise<void> {
  const worker = await connectAsync(url, { protocolVersion: 4, username: 'ingest', password: 'i' });
  await worker.publishAsync(resultTopic(key), payload, { qos: 0, retain: true });
  await worker.endAsync();
}

describe('results from the broker', () => {
  it('reach the hub, those published before it came as well', async () => {
    const { url } = await broker();
    await publish(url, 'l1', JSON.stringify(resultOf('l1', 7)));
    const { figure, feed } = following(url);
    await until(() => figure('l1') === 7, PATIENCE_MS, 'the retained result');
    expect(feed.connected()).toBe(true);
    await publish(url, 'l1', JSON.stringify(resultOf('l1', 8)));
    await until(() => figure('l1') === 8, PATIENCE_MS, 'the next result');
  });

  it.each([
    ['no JSON', 'no JSON'],
    ['another release’s form', JSON.stringify({ ...resultOf('l1', 1), condition: 'fine' })],
  ])('that are %s are passed over in words, and stop none behind them', async (_, payload) => {
    const { url } = await broker();
    const { figure, said, hub } = following(url);
    await publish(url, 'l1', payload);
    await publish(url, 'l2', JSON.stringify(resultOf('l2', 9)));
    await until(() => figure('l2') === 9, PATIENCE_MS, 'the result behind');
    expect(hub.results().has('l1')).toBe(false);
    expect(said).toEqual([
      "Broker: the result on tareline/result/l1 is not of this release's form and is passed over.",
    ]);
  });

  it('come again when the broker, which was away, is back, and both are said once', async () => {
    const port = await freePort();
    const first = await broker(port);
    const { figure, said, feed } = following(first.url);
    await until(() => feed.connected(), PATIENCE_MS, 'a connection');
    await first.close();
    await until(() => said.length > 0, PATIENCE_MS, 'a word about it');
    const second = await broker(port);
    await until(() => feed.connected(), PATIENCE_MS, 'a connection again');
    await publish(second.url, 'l1', JSON.stringify(resultOf('l1', 12)));
    await until(() => figure('l1') === 12, PATIENCE_MS, 'a result');
    expect(said).toEqual([
      'Broker: not reachable; trying again with growing pauses.',
      'Broker: connected again.',
    ]);
  });
});

describe('changes of warnings in the database', () => {
  const CAUSE: WarningCause = {
    basis: 'utilisation',
    phase: 'b',
    utilisation: 0.731,
    limit: 0.7,
    differentialAmps: 87.72,
    thresholdAmps: 120,
  };
  /** What a browser that listens to this hub has been told of warnings. */
  const told = (hub: LiveHub): string[] => {
    const words: string[] = [];
    hub.listen({
      lines: undefined,
      waitingBytes: () => 0,
      send(frame) {
        const { warnings } = JSON.parse(frame) as { warnings?: { id: number; state: string }[] };
        for (const { id, state } of warnings ?? []) words.push(`${id} ${state}`);
      },
    });
    return words;
  };

  it('reach browsers within a second, whichever process made them', async () => {
    const words = told(following((await broker()).url).hub);
    const at = (offsetMs: number) => new Date(NOW_MS + offsetMs);
    const id = await openWarning(
      store.db,
      { lineId: line.id, kind: 'near', cause: CAUSE, openedAt: at(0) },
      at(0),
    );
    await until(() => words.includes(`${id} unacknowledged`), 1_000, 'the opening');
    await acknowledgeWarning(store, id, { by: 'Mira Holt', note: 'Seen.', at: at(1_000) });
    await until(() => words.includes(`${id} acknowledged`), 1_000, 'the acknowledgement');
    await returnWarning(store.db, id, { returnedAt: at(2_000), changedAt: at(2_000) });
    await until(() => words.includes(`${id} normal`), 1_000, 'the return');
    expect(words).toHaveLength(3);
  });

  it('are looked for on and on while the database is away, and that is said once', async () => {
    const away = createStore(`mysql://nobody:x@127.0.0.1:${await freePort()}/none`);
    closing.push(away.close);
    const { url } = await broker();
    const { said, figure } = following(url, away);
    await until(() => said.length > 0, PATIENCE_MS, 'a word about it');
    // results do not wait for it
    await publish(url, 'l1', JSON.stringify(resultOf('l1', 3)));
    await until(() => figure('l1') === 3, PATIENCE_MS, 'a result');
    expect(said).toEqual(['Database: not reachable; warnings are looked for again.']);
  });
});
