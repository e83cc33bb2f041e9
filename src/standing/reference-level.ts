import type { Complex } from './complex';
import { shrunkCoefficients } from './composition-fit';
import type { CompositionSums, SumsShape } from './composition-sums';
import type { DailyLevel } from './creep';
import { levelAtPointAmps } from './operating-point';
import type { CompositionPoint } from './operating-point';
import { ascending, median, quantileOfSome } from './quantile';

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

/** The standing level of an hour beside the through current it had, for lines that no composition is known of. */
export interface HourlyLevel {
  /** Hours since the epoch, in whole numbers. */
  readonly hour: number;
  readonly levelAmps: number;
  readonly throughAmps: number;
}

/** Daily levels at one through current, with what the level does with load. */
export interface LoadAdjustedLevels {
  readonly levels: readonly DailyLevel[];
  /** Change of the level with through current, amperes per ampere. */
  readonly loadSlope: number;
  readonly referenceAmps: number;
}

const HOURS_A_DAY_LEAST = 3;
const PAIRS_LEAST = 100;

/**
 * For want of phasors or voltages: the median level of every day, moved along the level's slope over through
 * current to one reference current (the median of all hours unless given). The slope is the median over pairs of
 * hours of the same day, so that a drift of months doesn't enter it. It takes the level to be straight in the
 * load, which charging at right angles to a mismatch is not: a weaker measure than the composition. `undefined`
 * where too few hours differ in load.
 */
export function loadAdjustedLevels(
  hours: readonly HourlyLevel[],
  referenceAmps: number | undefined = median(hours.map(({ throughAmps }) => throughAmps)),
): LoadAdjustedLevels | undefined {
  if (referenceAmps === undefined) return undefined;
  const byDay = hoursByDay(hours);
  const slopes: number[] = [];
  for (const ofDay of byDay.values()) slopes.push(...loadSlopes(ofDay, referenceAmps * 0.1));
  if (slopes.length < PAIRS_LEAST) return undefined;
  const loadSlope = quantileOfSome(ascending(slopes), 0.5);
  const levels = [...byDay].flatMap(([day, ofDay]) => {
    const adjusted = ofDay.map((each) => each.levelAmps - loadSlope * (each.throughAmps - referenceAmps));
    const levelAmps = ofDay.length < HOURS_A_DAY_LEAST ? undefined : median(adjusted);
    return levelAmps === undefined ? [] : [{ day, levelAmps }];
  });
  return { levels: levels.sort((a, b) => a.day - b.day), loadSlope, referenceAmps };
}

function hoursByDay(hours: readonly HourlyLevel[]): ReadonlyMap<number, readonly HourlyLevel[]> {
  const byDay = new Map<number, HourlyLevel[]>();
  for (const each of hours) {
    const day = Math.floor(each.hour / 24);
    const ofDay = byDay.get(day);
    if (ofDay === undefined) byDay.set(day, [each]);
    else ofDay.push(each);
  }
  return byDay;
}

/** Slopes between hours of one day whose loads differ by more than `apartAmps`. */
function loadSlopes(hours: readonly HourlyLevel[], apartAmps: number): number[] {
  return hours.flatMap((from, index) =>
    hours.slice(index + 1).flatMap((to) => {
      const apart = to.throughAmps - from.throughAmps;
      return Math.abs(apart) > apartAmps ? [(to.levelAmps - from.levelAmps) / apart] : [];
    }),
  );
}
