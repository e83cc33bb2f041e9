import { connect, type IClientOptions, type MqttClient } from 'mqtt';
import type { IngestSettings } from '../settings';
import { deferAcknowledgements, type Delivery, type Receipt } from './deferred-acknowledgement';
import { INGEST_LIMITS } from './limits';
import type { Log } from './retry';

export interface FeedClient {
  readonly mqtt: MqttClient;
  acknowledge(receipts: readonly Receipt[]): void;
  /** subscribes to what is new and leaves what is no longer this worker's */
  follow(topics: readonly string[]): void;
  /** settles when the broker has granted the first subscription: nothing published from then on is missed */
  readonly subscribed: Promise<void>;
  close(): Promise<void>;
}

const KEEPALIVE_S = 30;
const CONNECT_TIMEOUT_MS = 10_000;
const RECEIVE_MOST = 5_000;
/** A SUBACK at or above this grants nothing. */
const REFUSED_QOS = 128;

/** Connects with a session that outlives the connection, so that the broker keeps what is not acknowledged. */
export function connectFeed(
  settings: IngestSettings,
  { take, log }: { take: (delivery: Delivery) => Promise<void> | undefined; log: Log },
): FeedClient {
  let wanted: readonly string[] = [];
  // the session outlives the connection: what was left while the broker was away is left when it is back
  const leaving = new Set<string>();
  let away = false;
  const mqtt = connect(settings.BROKER_URL, clientOptions(settings));
  const { acknowledge } = deferAcknowledgements(mqtt, take);
  let granted = () => {};
  const subscribed = new Promise<void>((resolve) => (granted = resolve));
  const subscribe = (topics: readonly string[]) => {
    if (topics.length === 0 || !mqtt.connected) return;
    mqtt.subscribe([...topics], { qos: 1 }, (error, grants) => {
      const refused = grants?.filter(({ qos }) => qos >= REFUSED_QOS).map(({ topic }) => topic) ?? [];
      if (refused.length > 0) log(`Broker: it refuses this account the topics ${refused.join(', ')}.`);
      // without a grant the connection has gone, and the next one subscribes again
      else if (error === null) granted();
    });
  };
  const leave = () => {
    if (leaving.size === 0 || !mqtt.connected) return;
    const topics = [...leaving];
    mqtt.unsubscribe(topics, (error) => {
      if (!error) for (const topic of topics) leaving.delete(topic);
    });
  };
  mqtt.on('connect', () => {
    mqtt.options.reconnectPeriod = INGEST_LIMITS.retryFirstMs;
    if (away) log('Broker: connected again.');
    away = false;
    leave();
    subscribe(wanted);
  });
  mqtt.on('close', () => {
    if (!away && !mqtt.disconnecting) log('Broker: not reachable; trying again with growing pauses.');
    away = true;
    mqtt.options.reconnectPeriod = Math.min(
      (mqtt.options.reconnectPeriod ?? 0) * 2,
      INGEST_LIMITS.retryMostMs,
    );
  });
  // every cause ends in a close, which is where it is said
  mqtt.on('error', () => undefined);
  return {
    mqtt,
    acknowledge,
    subscribed,
    follow(topics) {
      const gone = wanted.filter((topic) => !topics.includes(topic));
      const fresh = topics.filter((topic) => !wanted.includes(topic));
      wanted = topics;
      for (const topic of gone) leaving.add(topic);
      for (const topic of fresh) leaving.delete(topic);
      leave();
      subscribe(fresh);
    },
    close: () => mqtt.endAsync(),
  };
}

function clientOptions(settings: IngestSettings): IClientOptions {
  return {
    clientId: `tareline-ingest-${settings.WORKER_INDEX}-of-${settings.WORKER_COUNT}`,
    clean: false,
    resubscribe: false,
    keepalive: KEEPALIVE_S,
    connectTimeout: CONNECT_TIMEOUT_MS,
    reconnectPeriod: INGEST_LIMITS.retryFirstMs,
    ...(settings.MQTT_VERSION === '5'
      ? {
          protocolVersion: 5,
          properties: { receiveMaximum: RECEIVE_MOST, sessionExpiryInterval: 0xffffffff },
        }
      : { protocolVersion: 4 }),
    ...(settings.BROKER_USERNAME !== undefined && { username: settings.BROKER_USERNAME }),
    ...(settings.BROKER_PASSWORD !== undefined && { password: settings.BROKER_PASSWORD }),
  };
}
