import type { IngestSettings } from '../settings';
import type { Store } from '../store/client';
import { warningLimits } from '../warnings/limits';
import type { Delivery } from './deferred-acknowledgement';
import { connectFeed } from './feed-client';
import { createIntake, type FeedIntake } from './intake';
import { INGEST_LIMITS } from './limits';
import { dropOutlived, lookBack, makeRoom } from './looking-back';
import { publishResult } from './results-publisher';
import { type Log, pause, type Retrying, untilDone } from './retry';
import { createStoring, type Storing } from './storing';
import { createWatchRoom, type WatchRoom } from './watch-room';

export interface WorkerParts {
  readonly settings: IngestSettings;
  readonly store: Store;
  readonly now: () => number;
  readonly log: Log;
  /** ends the worker, also while it still waits for a database at its start */
  readonly stop: AbortController;
}

export interface Worker {
  /** how many snapshots have been committed since the start */
  committedCount(): number;
  /** settles when the feed is being heard */
  readonly subscribed: Promise<void>;
  /** settles when the worker has stopped; rejects when it stopped by a fault of its own */
  readonly stopped: Promise<void>;
  close(): Promise<void>;
}

/** Starts the worker: it receives, aligns, evaluates, stores, acknowledges and publishes until it is closed. */
export async function startWorker({ settings, store, now, log, stop }: WorkerParts): Promise<Worker> {
  const database: Retrying = { what: 'Database', log, signal: stop.signal };
  const limits = warningLimits({
    nearRatio: settings.NEAR_RATIO,
    periodMs: settings.PERIOD_MS,
    latenessMs: settings.LATENESS_MS,
  });
  const room = createWatchRoom({ settings, store, now });
  const intake = createIntake({ settings, room, now });
  const isFirst = settings.WORKER_INDEX === 0;
  const keep = (work: typeof makeRoom) => untilDone(() => work(store, { settings, nowMs: now() }), database);
  const keepAll = () => keep(makeRoom).then(() => keep(dropOutlived));
  // ahead of the feed
  if (isFirst) await keep(makeRoom);
  await refreshRegister(room, intake, database);
  const feed = connectFeed(settings, { take: (delivery: Delivery) => intake.take(delivery), log });
  feed.follow(room.topics());
  const storing = createStoring({
    store,
    intake,
    room,
    limits,
    clockLimitUs: settings.CLOCK_LIMIT_US,
    now,
    database,
    acknowledge: feed.acknowledge,
    publish: (watch) => publishResult(feed.mqtt, watch, now()),
  });
  const loops = [
    keepStoring(storing, intake, stop.signal),
    every(INGEST_LIMITS.registerPollMs, stop.signal, async () => {
      if (await refreshRegister(room, intake, database)) feed.follow(room.topics());
    }),
    every(INGEST_LIMITS.rungEveryMs, stop.signal, async () => {
      for (const watch of room.watches()) {
        if (stop.signal.aborted) return;
        const looked = () => lookBack(store, watch, { settings, limits, nowMs: now() });
        storing.note(watch, await untilDone(looked, database));
      }
    }),
    ...(isFirst ? [every(INGEST_LIMITS.keepStoreEveryMs, stop.signal, keepAll)] : []),
  ];
  const stopped = Promise.all(loops).then(
    () => undefined,
    (error: unknown) => {
      if (!stop.signal.aborted) throw error;
    },
  );
  return {
    committedCount: storing.committedCount,
    subscribed: feed.subscribed,
    stopped,
    async close() {
      stop.abort();
      await Promise.allSettled(loops);
      await feed.close();
    },
  };
}

async function refreshRegister(room: WatchRoom, intake: FeedIntake, database: Retrying): Promise<boolean> {
  const taken = await untilDone(() => room.refresh(), database);
  if (taken !== undefined) intake.recall(taken);
  return taken !== undefined;
}

/** Stores as long as there is something to store; a short wait lets snapshots share a transaction. */
async function keepStoring(storing: Storing, intake: FeedIntake, signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    if (intake.readyCount() < INGEST_LIMITS.batchSnapshots) await pause(INGEST_LIMITS.batchWaitMs, signal);
    await storing.storeOnce();
  }
}

async function every(periodMs: number, signal: AbortSignal, work: () => Promise<void>): Promise<void> {
  while (!signal.aborted) {
    await work();
    await pause(periodMs, signal);
  }
}
