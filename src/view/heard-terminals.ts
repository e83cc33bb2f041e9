import type { Result } from '../contract/result';
import { isStale } from './staleness';

/** How many terminals the newest results speak of, and how many of them were in a snapshot that is not stale. */
export interface HeardTerminals {
  readonly heardCount: number;
  readonly knownCount: number;
  /** instant of the newest snapshot, ms; undefined while nothing has been heard */
  readonly newestAtMs: number | undefined;
}

export function heardTerminals(results: Iterable<Result>, nowMs: number): HeardTerminals {
  let heardCount = 0;
  let knownCount = 0;
  let newestAtMs: number | undefined;
  for (const result of results) {
    knownCount += result.terminals.length;
    if (result.at === null) continue;
    const atMs = Date.parse(result.at);
    newestAtMs = newestAtMs === undefined ? atMs : Math.max(newestAtMs, atMs);
    if (!isStale(atMs, nowMs)) heardCount += result.terminals.filter((terminal) => terminal.present).length;
  }
  return { heardCount, knownCount, newestAtMs };
}
