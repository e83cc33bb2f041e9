import { connect, type MqttClient } from 'mqtt';
import { type Measurement, measurementTopic, presenceTopic } from '../src/contract/feed';

/** One terminal as the broker sees it: a connection, a password and a Last Will of its own. */
export type Terminal = {
  readonly line: string;
  readonly key: string;
  /** settles when the broker has first accepted it */
  readonly online: Promise<void>;
  publish(measurement: Measurement): void;
  /** loses its supply: the connection is cut without a goodbye, so that the Last Will speaks */
  drop(): void;
  /** gets its supply back after a drop */
  restore(): void;
  close(): Promise<void>;
};

export const TERMINAL_LIMITS = {
  reconnectMs: 2_000,
  connectTimeoutMs: 10_000,
  keepaliveS: 15,
  /** measurements kept for a broker that is away: an hour of them; later ones are lost */
  waiting: 1_800,
  goodbyeMs: 2_000,
} as const;

export function createTerminal(place: {
  readonly line: string;
  readonly key: string;
  readonly brokerUrl: string;
  readonly password: string;
}): Terminal {
  const topics = {
    measurement: measurementTopic(place.line, place.key),
    presence: presenceTopic(place.line, place.key),
  };
  const client = connectedClient(place, topics.presence);
  let waiting = 0;
  let dropped = false;
  const online = new Promise<void>((resolve) => client.once('connect', () => resolve()));
  client.on('connect', () => client.publish(topics.presence, 'online', { qos: 1, retain: true }));
  // Reconnecting is the answer to every fault of the connection; without a listener it would end the process.
  client.on('error', () => undefined);
  return {
    line: place.line,
    key: place.key,
    online,
    publish(measurement) {
      if (dropped || waiting >= TERMINAL_LIMITS.waiting) return;
      waiting++;
      client.publish(topics.measurement, JSON.stringify(measurement), { qos: 1 }, () => waiting--);
    },
    drop() {
      if (dropped) return;
      dropped = true;
      client.end(true);
    },
    restore() {
      if (!dropped) return;
      dropped = false;
      client.reconnect();
    },
    close: () => goodbye(client, topics.presence),
  };
}

const connectedClient = (
  place: {
    readonly line: string;
    readonly key: string;
    readonly brokerUrl: string;
    readonly password: string;
  },
  presence: string,
): MqttClient =>
  connect(place.brokerUrl, {
    protocolVersion: 4,
    clientId: `terminal ${place.line}/${place.key}`,
    clean: true,
    username: `${place.line}/${place.key}`,
    password: place.password,
    keepalive: TERMINAL_LIMITS.keepaliveS,
    reconnectPeriod: TERMINAL_LIMITS.reconnectMs,
    connectTimeout: TERMINAL_LIMITS.connectTimeoutMs,
    will: { topic: presence, payload: Buffer.from('offline'), qos: 1, retain: true },
  });

/** Says offline itself, since a Last Will keeps quiet when a client leaves in good order. */
async function goodbye(client: MqttClient, presence: string): Promise<void> {
  if (client.connected) {
    const said = client.publishAsync(presence, 'offline', { qos: 1, retain: true });
    await Promise.race([said.catch(() => undefined), pause(TERMINAL_LIMITS.goodbyeMs)]);
  }
  await new Promise<void>((resolve) => client.end(!client.connected, () => resolve()));
}

const pause = (ms: number): Promise<void> =>
  new Promise((resolve) => {
    setTimeout(resolve, ms).unref();
  });
