import { connectAsync } from 'mqtt';
import { afterEach, it } from 'vitest';
import { connectFeed, type FeedClient } from '../../src/ingest/feed-client';
import { ingestSettings } from '../../src/settings';
import { type Mosquitto, startMosquitto } from '../mosquitto';
import { until } from '../until';

const PATIENCE_MS = 15_000;

let broker: Mosquitto;
let feed: FeedClient;
afterEach(async () => {
  await feed.close();
  await broker.close();
});

it('a topic that was left while the broker was away is no longer sent when it is back', async () => {
  broker = await startMosquitto();
  const taken: string[] = [];
  const settings = ingestSettings({ DATABASE_URL: 'mysql://nobody@127.0.0.1/none', BROKER_URL: broker.url });
  const take = async (delivery: { readonly topic: string }) => void taken.push(delivery.topic);
  feed = connectFeed(settings, { take, log: () => undefined });
  feed.follow(['feed/kept', 'feed/left']);
  await feed.subscribed;

  feed.mqtt.stream.destroy();
  await until(() => !feed.mqtt.connected, PATIENCE_MS, 'the feed to notice that the broker is away');
  feed.follow(['feed/kept']);
  await until(() => feed.mqtt.connected, PATIENCE_MS, 'the feed to be back');

  const terminal = await connectAsync(broker.url);
  // one sender's messages come in its order: what is kept comes behind what was left
  await until(
    async () => {
      await terminal.publishAsync('feed/left', 'x', { qos: 1 });
      await terminal.publishAsync('feed/kept', 'x', { qos: 1 });
      return taken.at(-1) === 'feed/kept' && taken.at(-2) === 'feed/kept';
    },
    PATIENCE_MS,
    'what was left to stay away',
  );
  await terminal.endAsync();
});
