import { connect, type MqttClient } from 'mqtt';
import { afterEach, describe, expect, test } from 'vitest';
import { parseMeasurement } from '../../src/contract/feed';
import { type Broker, startBroker } from '../../simulator/broker';
import { type BrokerAccount, newDemoAccounts } from '../../simulator/broker-account';
import { createDemoMeasurements } from '../../simulator/demo-history';
import { isSilent } from '../../simulator/network/silences';
import { createTerminal } from '../../simulator/terminal';
import { startTerminals } from '../../simulator/terminals';

const opened: { close(): Promise<unknown> }[] = [];
afterEach(async () => {
  for (const each of opened.splice(0).reverse()) await each.close();
});

async function brokerFor(accounts: readonly BrokerAccount[]): Promise<Broker> {
  const broker = await startBroker({ port: 0, accounts });
  opened.push(broker);
  return broker;
}

type Heard = { topic: string; text: string; retain: boolean };

/** A worker-like reader of the feed; `until` settles with the first message that fits, past ones included. */
function reader(
  url: string,
  account: BrokerAccount,
): { until(fits: (heard: Heard) => boolean): Promise<Heard> } {
  const client: MqttClient = connect(url, {
    username: account.username,
    password: account.password,
    protocolVersion: 4,
  });
  opened.push({ close: () => client.endAsync(true) });
  const all: Heard[] = [];
  const waiting: ((heard: Heard) => void)[] = [];
  client.on('message', (topic, payload, { retain }) => {
    const heard = { topic, text: payload.toString(), retain };
    all.push(heard);
    for (const each of waiting) each(heard);
  });
  client.subscribe('feed/#', { qos: 1 });
  return {
    until: (fits) =>
      new Promise((resolve) => {
        const past = all.find(fits);
        if (past !== undefined) return resolve(past);
        waiting.push((heard) => fits(heard) && resolve(heard));
      }),
  };
}

const ingest: BrokerAccount = { username: 'ingest', password: 'i', kind: 'ingest' };
const quillby: BrokerAccount = { username: 'brindle-quillby/quillby', password: 'q', kind: 'terminal' };
const presence = 'feed/brindle-quillby/quillby/presence';

describe('a terminal', () => {
  test('is online once connected, offline when its socket is destroyed, and online when it is back', async () => {
    const broker = await brokerFor([ingest, quillby]);
    const terminal = createTerminal({
      line: 'brindle-quillby',
      key: 'quillby',
      brokerUrl: broker.url,
      password: 'q',
    });
    opened.push(terminal);
    await terminal.online;
    const watcher = reader(broker.url, ingest);
    expect((await watcher.until(({ topic }) => topic === presence)).text).toBe('online');
    terminal.drop();
    await watcher.until(({ topic, text }) => topic === presence && text === 'offline');
    // whoever comes later learns it too
    const later = reader(broker.url, ingest);
    expect(await later.until(({ topic }) => topic === presence)).toEqual({
      topic: presence,
      text: 'offline',
      retain: true,
    });
    terminal.restore();
    expect((await later.until(({ text }) => text === 'online')).topic).toBe(presence);
  });

  test('says goodbye when it is closed in good order', async () => {
    const broker = await brokerFor([ingest, quillby]);
    const terminal = createTerminal({
      line: 'brindle-quillby',
      key: 'quillby',
      brokerUrl: broker.url,
      password: 'q',
    });
    await terminal.online;
    const watcher = reader(broker.url, ingest);
    await watcher.until(({ text }) => text === 'online');
    await terminal.close();
    expect((await watcher.until(({ text }) => text === 'offline')).topic).toBe(presence);
  });
});

describe('the terminals of the site', () => {
  test('publish the contract at common instants, each under its own name', async () => {
    const accounts = newDemoAccounts();
    const broker = await brokerFor(accounts);
    const terminals = startTerminals({
      brokerUrl: broker.url,
      accounts,
      measurements: createDemoMeasurements({ seed: 1, epochMs: Date.UTC(2026, 2, 2) }),
      silences: [],
      now: Date.now,
    });
    opened.push(terminals);
    await terminals.online;
    const watcher = reader(
      broker.url,
      accounts.find((account) => account.kind === 'ingest')!,
    );
    const atOf = async (terminal: string): Promise<number> => {
      const { text } = await watcher.until(
        ({ topic }) => topic === `feed/fennick-ostrel-marrow-gate/${terminal}/measurement`,
      );
      const parsed = parseMeasurement(Buffer.from(text));
      if (!parsed.ok) throw new Error(parsed.refusal.detail);
      return parsed.atMs;
    };
    const instants = await Promise.all(['fennick', 'ostrel', 'marrow-gate'].map(atOf));
    expect(new Set(instants).size).toBe(1);
    expect(instants[0]! % 2_000).toBe(0);
    expect(accounts.filter((account) => account.kind === 'terminal')).toHaveLength(50);
    expect(new Set(accounts.map((account) => account.password)).size).toBe(accounts.length);
  });

  test('fall silent by their timetable: after a minute and a half, three minutes in every ten', () => {
    const silence = { line: 'l', terminal: 't', firstMs: 90_000, everyMs: 600_000, lastsMs: 180_000 };
    const silentAt = [0, 89, 90, 269, 270, 689, 690, 869, 870].map((s) => isSilent(silence, s * 1000));
    expect(silentAt).toEqual([false, false, true, true, false, false, true, true, false]);
  });
});
