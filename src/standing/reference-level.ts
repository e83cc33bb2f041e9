import type { Complex } from './complex';
import { shrunkCoefficients } from './composition-fit';
import type { CompositionSums, SumsShape } from './composition-sums';
import type { DailyLevel } from './creep';
import { levelAtPointAmps } from './operating-point';
import type { CompositionPoint } from './operating-point';

/** The sums of one day, days counted from the epoch. */
export interface DaySums {
  readonly day: number;
  readonly sums: CompositionSums;
}

/**
 * How much the composition of the window weighs in that of a day, as a share of the day's own information. It
 * decides only where a day's load hardly changes, so that its causes can't be told apart on that day alone.
 */
const WINDOW_WEIGHT = 0.003;

/**
 * The daily levels at reference load, amperes: each day's own composition, drawn a little towards that of the
 * window, taken at one and the same operating point. The load cycle, seasons and growth of load are not in them,
 * while a drift of any cause is. Days without snapshots are left out.
 */
export function levelsAtReferenceLoad(
  days: readonly DaySums[],
  fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  reference: CompositionPoint,
): DailyLevel[] {
  return days.flatMap(({ day, sums }) => {
    const coefficients = shrunkCoefficients(sums, { prior: fit.coefficients, weight: WINDOW_WEIGHT });
    if (coefficients === undefined) return [];
    return [{ day, levelAmps: levelAtPointAmps({ shape: fit.shape, coefficients }, reference) }];
  });
}
