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
    const atMs = result.at === null ? undefined : Date.parse(result.at);
    const present = isStale(atMs, nowMs) ? 0 : result.terminals.filter((terminal) => terminal.present).length;
    heardCount += present;
    // nothing is missing on a line out of service, though what it sends is heard
    knownCount += result.condition === 'out of service' ? present : result.terminals.length;
    if (atMs !== undefined) newestAtMs = Math.max(newestAtMs ?? -Infinity, atMs);
  }
  return { heardCount, knownCount, newestAtMs };
}
