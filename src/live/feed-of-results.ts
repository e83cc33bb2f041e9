import { connect } from 'mqtt';
import { RESULT_TOPICS, resultSchema } from '../contract/result';
import type { WebSettings } from '../settings';
import type { Store } from '../store/client';
import { readWarningsChangedSince } from '../store/warnings';
import type { LiveHub } from './hub';

const FOLLOW_LIMITS = {
  warningsEveryMs: 400,
  /** changes are looked for this far back: clocks of several machines differ, and transactions take time to commit */
  overlapMs: 10_000,
  reconnectFirstMs: 500,
  reconnectMostMs: 10_000,
} as const;

export interface FollowParts {
  readonly settings: WebSettings;
  readonly hub: LiveHub;
  readonly store: Store;
  readonly now: () => number;
  readonly log: (sentence: string) => void;
}

export interface ResultsFeed {
  connected(): boolean;
  close(): Promise<void>;
}

/** Brings results from the broker and changes of warnings from the database to the hub, through every outage of either. */
export function followResults(parts: FollowParts): ResultsFeed {
  const results = followBroker(parts);
  const warnings = followWarnings(parts);
  return {
    connected: results.connected,
    async close() {
      warnings.close();
      await results.close();
    },
  };
}

function followBroker({ settings, hub, log }: FollowParts): ResultsFeed {
  let away = false;
  const client = connect(settings.BROKER_URL, {
    protocolVersion: 4,
    clean: true,
    reconnectPeriod: FOLLOW_LIMITS.reconnectFirstMs,
    ...(settings.BROKER_USERNAME !== undefined && { username: settings.BROKER_USERNAME }),
    ...(settings.BROKER_PASSWORD !== undefined && { password: settings.BROKER_PASSWORD }),
  });
  client.on('connect', () => {
    if (away) log('Broker: connected again.');
    away = false;
    client.options.reconnectPeriod = FOLLOW_LIMITS.reconnectFirstMs;
    client.subscribe(RESULT_TOPICS, { qos: 0 });
  });
  client.on('close', () => {
    if (!away && !client.disconnecting) log('Broker: not reachable; trying again with growing pauses.');
    away = true;
    client.options.reconnectPeriod = Math.min(
      (client.options.reconnectPeriod ?? 0) * 2,
      FOLLOW_LIMITS.reconnectMostMs,
    );
  });
  // every cause ends in a close, which is where it is said
  client.on('error', () => undefined);
  client.on('message', (topic, payload) => {
    const parsed = resultSchema.safeParse(parsedJson(payload));
    if (parsed.success) hub.takeResult(parsed.data);
    else log(`Broker: the result on ${topic} is not of this release's form and is passed over.`);
  });
  return { connected: () => client.connected, close: () => client.endAsync(true) };
}

function parsedJson(payload: Buffer): unknown {
  try {
    return JSON.parse(payload.toString('utf8'));
  } catch {
    return undefined;
  }
}

function followWarnings({ hub, store, now, log }: FollowParts): { close(): void } {
  let timer: NodeJS.Timeout | undefined;
  let closed = false;
  let failing = false;
  const look = async () => {
    try {
      hub.takeWarnings(await readWarningsChangedSince(store, new Date(now() - FOLLOW_LIMITS.overlapMs)));
      if (failing) log('Database: reachable again.');
      failing = false;
    } catch {
      if (!failing) log('Database: not reachable; warnings are looked for again.');
      failing = true;
    }
    if (!closed) timer = setTimeout(() => void look(), FOLLOW_LIMITS.warningsEveryMs);
  };
  void look();
  return {
    close() {
      closed = true;
      clearTimeout(timer);
    },
  };
}
