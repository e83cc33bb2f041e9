import { connect, connectAsync, type IClientOptions, type MqttClient } from 'mqtt';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { startBroker } from '../../simulator/broker';
import { deferAcknowledgements, type Delivery } from '../../src/ingest/deferred-acknowledgement';
import { startMosquitto } from '../mosquitto';
import { until } from '../until';

/** What the worker relies on in MQTT.js and in any broker: held against two brokers, and both versions of the protocol. */

const PATIENCE_MS = 8_000;
const TOPIC = 'feed/arden-birk/arden/measurement';
const PUBLISHER = { username: 'arden-birk/arden', password: 'a' };
const READER = { username: 'ingest', password: 'i' };

const aedes = () =>
  startBroker({
    port: 0,
    accounts: [
      { ...PUBLISHER, kind: 'terminal' },
      { ...READER, kind: 'ingest' },
    ],
  });
const FIVE: IClientOptions = {
  protocolVersion: 5,
  properties: { receiveMaximum: 5_000, sessionExpiryInterval: 3_600 },
};

describe.each([
  ['aedes', aedes, { protocolVersion: 4 }],
  ['mosquitto, MQTT 3.1.1', startMosquitto, { protocolVersion: 4 }],
  ['mosquitto, MQTT 5', startMosquitto, FIVE],
] as const)('deferred acknowledgements on %s', (_, start, version: IClientOptions) => {
  let broker: { url: string; close(): Promise<void> };
  let publisher: MqttClient;
  let clients: MqttClient[] = [];
  let session = 0;

  beforeAll(async () => {
    broker = await start();
    publisher = await connectAsync(broker.url, { ...PUBLISHER, protocolVersion: 4 });
  });
  afterEach(async () => {
    for (const client of clients) await client.endAsync(true);
    clients = [];
    session += 1;
  });
  afterAll(async () => {
    await publisher.endAsync(true);
    await broker.close();
  });

  /** A reader whose session outlives its connection; it hears what came while it was away as soon as it connects. */
  async function reader(
    hold: (delivery: Delivery) => Promise<void> | undefined = () => undefined,
    clientId = `reader-${session}`,
  ) {
    const client = connect(broker.url, { ...READER, ...version, clientId, clean: false, reconnectPeriod: 0 });
    clients.push(client);
    const deliveries: Delivery[] = [];
    const errors: Error[] = [];
    client.on('error', (error) => errors.push(error));
    const { acknowledge } = deferAcknowledgements(client, (delivery) => {
      deliveries.push(delivery);
      return hold(delivery);
    });
    await until(() => client.connected, PATIENCE_MS, 'a connection');
    await client.subscribeAsync(TOPIC, { qos: 1 });
    return {
      client,
      deliveries,
      errors,
      payloads: () => deliveries.map(({ payload }) => payload.toString()),
      acknowledge: (some: readonly Delivery[]) => acknowledge(some.map(({ receipt }) => receipt!)),
      /** leaves in good order, so that what has been written reaches the broker first */
      leave: () => client.endAsync(),
    };
  }
  const publish = async (count: number, prefix = 'm'): Promise<string[]> => {
    const payloads = Array.from({ length: count }, (_message, index) => `${prefix}${index}`);
    await Promise.all(payloads.map((payload) => publisher.publishAsync(TOPIC, payload, { qos: 1 })));
    return payloads;
  };
  const has = (count: number, { deliveries }: { deliveries: unknown[] }) =>
    until(
      () => deliveries.length >= count,
      PATIENCE_MS,
      () => `${count} deliveries, but ${deliveries.length}`,
    );

  it('go on being delivered while none is acknowledged', async () => {
    const one = await reader();
    const sent = await publish(500);
    await has(500, one);
    expect(one.payloads()).toEqual(sent);
    const ids = one.deliveries.map(({ receipt }) => receipt?.messageId);
    expect(new Set(ids).size).toBe(500);
    expect(ids.every((id) => id !== undefined && id > 0)).toBe(true);
    expect(one.errors).toEqual([]);
    expect(one.client.connected).toBe(true);
  });

  it('come again after a reconnection, all but those that were acknowledged', async () => {
    const before = await reader();
    const sent = await publish(300);
    await has(300, before);
    const kept = before.deliveries.filter((_delivery, index) => index % 3 === 0);
    before.acknowledge(before.deliveries.filter((delivery) => !kept.includes(delivery)));
    await before.leave();

    const after = await reader();
    await has(kept.length, after);
    await publish(1, 'after ');
    await has(kept.length + 1, after);
    const owed = sent.filter((_payload, index) => index % 3 === 0);
    expect(after.payloads().toSorted()).toEqual([...owed, 'after 0'].toSorted());

    after.acknowledge(after.deliveries);
    await after.leave();
    const last = await reader();
    await publish(1, 'last ');
    await has(1, last);
    expect(last.payloads()).toEqual(['last 0']);
  });

  it('come again after a connection that was cut', async () => {
    const before = await reader();
    const sent = await publish(50);
    await has(50, before);
    before.client.stream.destroy();
    await until(() => !before.client.connected, PATIENCE_MS, 'an end of the connection');
    const after = await reader();
    await has(50, after);
    expect(after.payloads().toSorted()).toEqual(sent.toSorted());
  });

  it('are given only over the connection that the message came by', async () => {
    const before = await reader();
    await publish(20);
    await has(20, before);
    await before.leave();
    const after = await reader();
    await has(20, after);
    // the ids may be the same; what they stood for is gone with the connection
    after.acknowledge(before.deliveries);
    expect(after.errors).toEqual([]);
    await after.leave();
    const last = await reader();
    await has(20, last);
  });

  it('may be given in any order, in one go or one by one', async () => {
    const before = await reader();
    await publish(60);
    await has(60, before);
    before.acknowledge(before.deliveries.slice(30).toReversed());
    for (const delivery of before.deliveries.slice(0, 30)) before.acknowledge([delivery]);
    await before.leave();
    const after = await reader();
    await publish(1, 'last ');
    await has(1, after);
    expect(after.payloads()).toEqual(['last 0']);
  });

  it('hold the next delivery back for as long as the taker asks for it', async () => {
    let open = () => {};
    const opened = new Promise<void>((resolve) => (open = resolve));
    const held = await reader(() => (held.deliveries.length === 3 ? opened : undefined));
    const witness = await reader(() => undefined, `witness-${session}`);
    await publish(100);
    await has(100, witness);
    expect(held.deliveries).toHaveLength(3);
    open();
    await has(100, held);
    expect(held.payloads()).toEqual(witness.payloads());
  });

  it('are not owed for a message at QoS 0', async () => {
    const one = await reader();
    await publisher.publishAsync(TOPIC, 'once', { qos: 0 });
    await has(1, one);
    expect(one.deliveries[0]).toMatchObject({ topic: TOPIC, receipt: undefined, retained: false });
  });
});
