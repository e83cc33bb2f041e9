import { connectAsync } from 'mqtt';
import { type BenchMessage, MEASUREMENTS } from './shape';

/** Takes the whole feed at QoS 1 and does nothing with it: what a worker is measured against. */
const client = await connectAsync(process.argv[2]!, {
  protocolVersion: 4,
  clientId: 'bench-subscriber',
  username: 'ingest',
  password: 'ingest-secret',
});
let received = 0;
const all = new Promise<number>((resolve) => {
  client.on('message', () => {
    received += 1;
    if (received === MEASUREMENTS) resolve(Date.now());
  });
});
await client.subscribeAsync('feed/+/+/measurement', { qos: 1 });
const tell = (message: BenchMessage) => process.send!(message);
tell({ kind: 'ready' });
tell({ kind: 'received', lastMs: await all });
await client.endAsync();
process.disconnect();
