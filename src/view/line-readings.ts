import type { Snapshot } from '../contract/lines';
import type { Result } from '../contract/result';

/** The three phases of a line at one snapshot instant, as charts of recent time draw them. */
export interface Reading {
  readonly atMs: number;
  readonly phases: Result['phases'];
}

/** What of a stored snapshot or of a live result a reading is made of. */
export type ReadingSource = Pick<Snapshot, 'phases'> & { readonly at: string | null };

export function readingsOf(sources: readonly ReadingSource[]): Reading[] {
  return sources.flatMap(({ at, phases }) => (at === null ? [] : [{ atMs: Date.parse(at), phases }]));
}

/**
 * Stored and live readings as one series in ascending order of instants, trimmed to the last `windowMs` before
 * `nowMs`. Where both tell of the same instant the later given one counts: a late measurement corrects it.
 */
export function mergedReadings(
  earlier: readonly Reading[],
  later: readonly Reading[],
  { nowMs, windowMs }: { nowMs: number; windowMs: number },
): readonly Reading[] {
  const byInstant = new Map([...earlier, ...later].map((reading) => [reading.atMs, reading]));
  const fromMs = nowMs - windowMs;
  return [...byInstant.values()]
    .filter((reading) => reading.atMs >= fromMs)
    .sort((one, other) => one.atMs - other.atMs);
}

/** A spacing this many times the usual one is a gap. */
const GAP_SPACINGS = 3;

/** The longest spacing in milliseconds that still counts as unbroken: three times the median one. */
export function unbrokenSpacingMs(instantsMs: readonly number[]): number {
  const spacings = instantsMs
    .slice(1)
    .map((atMs, index) => atMs - instantsMs[index]!)
    .sort((one, other) => one - other);
  const median = spacings[Math.floor(spacings.length / 2)];
  return median === undefined ? Infinity : GAP_SPACINGS * median;
}
