import { connectAsync, type IClientOptions, type MqttClient } from 'mqtt';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import type { BrokerAccount } from '../../simulator/broker-account';

const accounts: readonly BrokerAccount[] = [
  { username: 'north-south/north', password: 'n', kind: 'terminal' },
  { username: 'north-south/south', password: 's', kind: 'terminal' },
  { username: 'ingest', password: 'i', kind: 'ingest' },
  { username: 'web', password: 'w', kind: 'web' },
];
const password = new Map(accounts.map((account) => [account.username, account.password]));

let broker: Broker;
const clients: MqttClient[] = [];
beforeAll(async () => {
  broker = await startBroker({ port: 0, accounts });
});
afterAll(async () => {
  await Promise.all(clients.map((client) => client.endAsync(true)));
  await broker.close();
});

async function connected(username: string, options: IClientOptions = {}): Promise<MqttClient> {
  const client = await connectAsync(
    broker.url,
    {
      username,
      password: password.get(username)!,
      protocolVersion: 4,
      reconnectPeriod: 0,
      ...options,
    },
    false,
  );
  client.on('error', () => undefined);
  clients.push(client);
  return client;
}

/** The topics that a client receives until one ends in `/last`. */
function received(client: MqttClient): Promise<string[]> {
  const topics: string[] = [];
  return new Promise((resolve) => {
    client.on('message', (topic, payload) => {
      topics.push(topic);
      if (payload.toString() === 'last') resolve(topics);
    });
  });
}

const granted = async (client: MqttClient, filter: string): Promise<number> => {
  const [answer] = await client.subscribeAsync(filter, { qos: 1 }).catch(() => [{ qos: 128 }]);
  return answer!.qos;
};

/** A refused publication costs a 3.1.1 client its connection. */
const refused = (client: MqttClient, topic: string): Promise<boolean> =>
  new Promise((resolve) => {
    client.once('close', () => resolve(true));
    client.publish(topic, 'x', { qos: 1 }, (error) => {
      if (!error) resolve(false);
    });
  });

describe('the broker', () => {
  test.each([
    ['nobody', {}],
    ['an unknown user', { username: 'somebody', password: 'n' }],
    ['a wrong password', { username: 'ingest', password: 'n' }],
    ['an empty password', { username: 'ingest', password: '' }],
  ])('turns away %s', async (_, options) => {
    await expect(
      connectAsync(broker.url, { protocolVersion: 4, reconnectPeriod: 0, ...options }, false),
    ).rejects.toThrow(/refused/i);
  });

  test('lets a terminal publish its own measurement, and the worker hear it', async () => {
    const ingest = await connected('ingest');
    const heard = received(ingest);
    expect(await granted(ingest, 'feed/#')).toBe(1);
    const north = await connected('north-south/north');
    await north.publishAsync('feed/north-south/north/presence', 'online', { qos: 1, retain: true });
    await north.publishAsync('feed/north-south/north/measurement', 'last', { qos: 1 });
    expect(await heard).toEqual(['feed/north-south/north/presence', 'feed/north-south/north/measurement']);
  });

  test.each([
    ['a terminal', 'north-south/north', 'feed/north-south/south/measurement'],
    ['a terminal', 'north-south/north', 'feed/north-south/north/measurement/more'],
    ['a terminal', 'north-south/north', 'feed/north-south/north/else'],
    ['a terminal', 'north-south/north', 'tareline/result/north-south'],
    ['the worker', 'ingest', 'feed/north-south/north/measurement'],
    ['the worker', 'ingest', 'tareline/result/'],
    ['the web process', 'web', 'tareline/result/north-south'],
  ])('refuses %s (%s) publishing %s', async (_, username, topic) => {
    expect(await refused(await connected(username), topic)).toBe(true);
  });

  test('lets the worker publish a result, and the web process hear it', async () => {
    const web = await connected('web');
    const heard = received(web);
    expect(await granted(web, 'tareline/result/#')).toBe(1);
    await (await connected('ingest')).publishAsync('tareline/result/north-south', 'last', { qos: 0 });
    expect(await heard).toEqual(['tareline/result/north-south']);
  });

  test.each([
    ['north-south/north', 'feed/north-south/north/measurement'],
    ['north-south/north', '#'],
    ['web', 'feed/#'],
    ['web', '#'],
    ['ingest', '#'],
    ['ingest', 'tareline/result/#'],
    ['web', '$SYS/#'],
  ])('grants %s no subscription to %s', async (username, filter) => {
    expect(await granted(await connected(username), filter)).toBe(128);
  });

  test('gives nobody else the session that an account keeps under its client id', async () => {
    await connected('ingest', { clientId: 'worker-0', clean: false });
    await expect(connected('web', { clientId: 'worker-0', clean: false })).rejects.toThrow(/refused/i);
  });

  test('keeps what the worker has not heard while it was away', async () => {
    const options = { clientId: 'worker-1', clean: false };
    const first = await connected('ingest', options);
    await granted(first, 'feed/#');
    await first.endAsync(true);
    const south = await connected('north-south/south');
    await south.publishAsync('feed/north-south/south/measurement', 'one', { qos: 1 });
    await south.publishAsync('feed/north-south/south/measurement', 'last', { qos: 1 });
    const again = await connectKept(options);
    expect(await again).toHaveLength(2);
  });

  test('says in a sentence that its port is taken', async () => {
    await expect(startBroker({ port: broker.port, accounts })).rejects.toThrow(/cannot listen on port/);
  });
});

/** Connects with the listener in place before the kept messages come. */
async function connectKept(options: IClientOptions): Promise<Promise<string[]>> {
  const { connect } = await import('mqtt');
  const client = connect(broker.url, {
    username: 'ingest',
    password: 'i',
    protocolVersion: 4,
    reconnectPeriod: 0,
    ...options,
  });
  clients.push(client);
  return received(client);
}
