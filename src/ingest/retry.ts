import { INGEST_LIMITS } from './limits';

export type Log = (sentence: string) => void;

/** The reason at the root of a failure: the query builder wraps what the driver says. */
export function rootReason(error: unknown): string {
  const { cause, message, code } = error as { cause?: unknown; message?: string; code?: string };
  if (cause !== undefined) return rootReason(cause);
  return code !== undefined && message !== undefined && message !== ''
    ? `${code}: ${message}`
    : message || code || String(error);
}

/** How a retried piece of work is named in the log, and what ends the trying. */
export interface Retrying {
  readonly what: string;
  readonly log: Log;
  readonly signal: AbortSignal;
}

/** Tries until it succeeds, with growing pauses; says once that it waits and once that it goes on. */
export async function untilDone<T>(work: () => Promise<T>, { what, log, signal }: Retrying): Promise<T> {
  let pauseMs: number = INGEST_LIMITS.retryFirstMs;
  for (let attempt = 0; ; attempt += 1) {
    try {
      const outcome = await work();
      if (attempt > 0) log(`${what}: going on after ${attempt} failed ${attempt === 1 ? 'try' : 'tries'}.`);
      return outcome;
    } catch (error) {
      if (signal.aborted) throw error;
      if (attempt === 0) log(`${what}: waiting and trying again (${rootReason(error)}).`);
      await pause(pauseMs, signal);
      pauseMs = Math.min(pauseMs * 2, INGEST_LIMITS.retryMostMs);
    }
  }
}

export function pause(pauseMs: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      clearTimeout(timer);
      signal.removeEventListener('abort', done);
      resolve();
    };
    const timer = setTimeout(done, pauseMs);
    signal.addEventListener('abort', done, { once: true });
    if (signal.aborted) done();
  });
}
