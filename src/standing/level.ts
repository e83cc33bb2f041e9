import { ascending, median, quantileOfSome } from './quantile';

/** How the differential current of one phase was spread over a window, amperes rms primary. */
export interface LevelSummary {
  readonly leastAmps: number;
  readonly p05Amps: number;
  /** The standing level of the window. */
  readonly medianAmps: number;
  readonly p95Amps: number;
  readonly greatestAmps: number;
  /** How many values it was taken from. */
  readonly count: number;
}

/** With fewer hours, the level of a day would be that of one moment in its load cycle. */
const HOURS_LEAST = 3;

/**
 * Summary of the differential currents (amperes) of one phase's qualified snapshots in a window, given in any
 * order. `undefined` for none; throws for a NaN.
 */
export function levelSummary(differentialAmps: readonly number[]): LevelSummary | undefined {
  if (differentialAmps.length === 0) return undefined;
  const sorted = ascending(differentialAmps);
  return {
    leastAmps: quantileOfSome(sorted, 0),
    p05Amps: quantileOfSome(sorted, 0.05),
    medianAmps: quantileOfSome(sorted, 0.5),
    p95Amps: quantileOfSome(sorted, 0.95),
    greatestAmps: quantileOfSome(sorted, 1),
    count: sorted.length,
  };
}

/**
 * Standing level of one phase over 24 hours, amperes: the median of its hourly standing levels, each hour
 * weighing the same. A median of all snapshots would lean towards the hours with the fewest gaps, hence
 * towards their load; and hours can be taken from their stored rows, so that rebuilding gives the same number.
 * Hours without a qualified snapshot are left out by the caller. `undefined` for fewer than three hours.
 */
export function standingLevel24h(hourMediansAmps: readonly number[]): number | undefined {
  return hourMediansAmps.length < HOURS_LEAST ? undefined : median(hourMediansAmps);
}
