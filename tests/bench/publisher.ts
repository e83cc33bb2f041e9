import { connectAsync } from 'mqtt';
import { measurementTopic } from '../../src/contract/feed';
import { instantsBefore, madeUpMeasurement, TERMINALS } from '../faults/site-under-test';
import { type BenchMessage, LOAD, lineKey } from './shape';

/** Publishes the whole load as fast as the broker takes it, once its parent says so: `publisher.ts <broker> <end ms>`. */
const [brokerUrl, endMs] = process.argv.slice(2);
const tell = (message: BenchMessage) => process.send!(message);
const instants = instantsBefore(Number(endMs), LOAD.instantsALine);
const AT_ONCE = 50;

const payloads = Object.fromEntries(
  TERMINALS.map((terminal) => [
    terminal,
    instants.map((atMs) =>
      JSON.stringify(madeUpMeasurement(terminal, { atMs, amps: 400, differentialAmps: 10 })),
    ),
  ]),
);
const terminals = await Promise.all(
  Array.from({ length: LOAD.lines }, (_, index) => lineKey(index)).flatMap((line) =>
    TERMINALS.map(async (terminal) => ({
      topic: measurementTopic(line, terminal),
      payloads: payloads[terminal]!,
      client: await connectAsync(brokerUrl!, {
        protocolVersion: 4,
        username: `${line}/${terminal}`,
        password: 'terminal-secret',
      }),
    })),
  ),
);
tell({ kind: 'ready' });
await new Promise((resolve) => process.once('message', resolve));
const firstMs = Date.now();
await Promise.all(
  terminals.map(async ({ client, topic, payloads: own }) => {
    for (let from = 0; from < own.length; from += AT_ONCE)
      await Promise.all(
        own.slice(from, from + AT_ONCE).map((payload) => client.publishAsync(topic, payload, { qos: 1 })),
      );
  }),
);
tell({ kind: 'published', firstMs });
await Promise.all(terminals.map(({ client }) => client.endAsync()));
process.disconnect();
