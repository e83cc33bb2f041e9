import { ingestSettings, SettingsError } from '../settings';
import { createStore } from '../store/client';
import { startWorker } from './worker';

/** Entry of the worker. Ends in order on SIGINT and SIGTERM; what is not acknowledged by then the broker delivers again. */
const stop = new AbortController();
process.once('SIGINT', () => stop.abort());
process.once('SIGTERM', () => stop.abort());
try {
  const settings = ingestSettings();
  const store = createStore(settings.DATABASE_URL);
  const log = (sentence: string) => console.log(`${new Date().toISOString()} ingest: ${sentence}`);
  const worker = await startWorker({ settings, store, now: Date.now, log, stop });
  void worker.subscribed.then(() =>
    log(`worker ${settings.WORKER_INDEX} of ${settings.WORKER_COUNT} is listening to the feed.`),
  );
  await worker.stopped;
  await worker.close();
  await store.close();
  process.exit(0);
} catch (error) {
  if (stop.signal.aborted) process.exit(0);
  console.error(error instanceof SettingsError ? error.message : error);
  process.exit(1);
}
