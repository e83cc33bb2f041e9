/**
 * How a standing level goes with load where no composition says so: a feed of magnitudes only, or phasors without
 * voltages. Charging and mismatch add as phasors, so that at through current T
 *
 *     |D|² = a + b·T + c·T²
 *
 * with a the charging squared, c the mismatch squared, and b from the angle between the two: exact for a steady
 * power factor, where |D| itself is not straight in T. Only b and c are needed to bring a level to another load.
 * They are read off the same hours of the days of one week, so that neither what drifts over months enters nor
 * what follows the hour of the day, as the power factor does.
 */

import type { DailyLevel } from './creep';
import { medianInPlace } from './quantile';
import type { HourlyValue } from './step';

/** The standing level of an hour beside its mean through current. */
export interface HourlyLevel {
  /** Hours since the epoch, in whole numbers. */
  readonly hour: number;
  readonly levelAmps: number;
  readonly throughAmps: number;
}

/** What the square of a standing level does with load. */
export interface LoadResponse {
  /** The load that levels are brought to: the median through current of the weeks it was taken from. */
  readonly referenceAmps: number;
  /** b·T and c·T² at the reference current, A². */
  readonly linearSquareAmps: number;
  readonly quadraticSquareAmps: number;
  /** Rms by which the same hours of one week differ in load, as a share of the reference current. */
  readonly loadSpread: number;
  /** Whole weeks that it was taken from. */
  readonly weeks: number;
}

const WEEK_HOURS = 168;

/** The hour of the day, and with it the load cycle, is matched; fewer weeks leave too little else. */
const WEEKS_LEAST = 4;
const WEEKS_MOST = 52;

/** In trials a load that varied by less let seasons through, and levels were called creep that were not. */
const LOAD_SPREAD_LEAST = 0.03;

/**
 * The load response of one phase from its hours in order of time: those of the last 52 whole weeks (of seven days
 * since the epoch). Least squares over the deviations of every hour from the mean of the same hours of its week.
 * `undefined` for fewer than four weeks, and where the load at the same hour varies by less than 3 % of itself:
 * then nothing tells what load does, and a level stands as it was measured. Throws for hours out of order.
 */
export function loadResponse(hours: readonly HourlyLevel[]): LoadResponse | undefined {
  assertAscendingHours(hours);
  const within = wholeWeeks(hours);
  if (within.length === 0) return undefined;
  const referenceAmps = medianInPlace(new Float64Array(within.map(({ throughAmps }) => throughAmps)));
  if (!(referenceAmps > 0)) return undefined;
  const sums = deviationSums(within, referenceAmps);
  const { weeks } = sums;
  const loadSpread = Math.sqrt(sums.tt / sums.count);
  const determinant = sums.tt * sums.qq - sums.tq ** 2;
  if (weeks < WEEKS_LEAST || !(loadSpread >= LOAD_SPREAD_LEAST)) return undefined;
  if (!(determinant > 1e-9 * sums.tt * sums.qq)) return undefined;
  return {
    referenceAmps,
    linearSquareAmps: (sums.ty * sums.qq - sums.qy * sums.tq) / determinant,
    quadraticSquareAmps: (sums.qy * sums.tt - sums.ty * sums.tq) / determinant,
    loadSpread,
    weeks,
  };
}

/** The hours of the last weeks that are over and that began no earlier than the first hour. */
function wholeWeeks(hours: readonly HourlyLevel[]): readonly HourlyLevel[] {
  const [first, last] = [hours[0], hours.at(-1)];
  if (first === undefined || last === undefined) return [];
  const to = Math.floor((last.hour + 1) / WEEK_HOURS) * WEEK_HOURS;
  const from = Math.max(Math.ceil(first.hour / WEEK_HOURS) * WEEK_HOURS, to - WEEKS_MOST * WEEK_HOURS);
  const firstPlace = hours.findIndex(({ hour }) => hour >= from);
  const afterLast = hours.findLastIndex(({ hour }) => hour < to);
  return firstPlace < 0 ? [] : hours.slice(firstPlace, afterLast + 1);
}

/** Sums of products of deviations: t is load, q its square, both of the reference; y the level squared, A². */
interface DeviationSums {
  tt: number;
  tq: number;
  qq: number;
  ty: number;
  qy: number;
  count: number;
  weeks: number;
}

function deviationSums(hours: readonly HourlyLevel[], referenceAmps: number): DeviationSums {
  const sums: DeviationSums = { tt: 0, tq: 0, qq: 0, ty: 0, qy: 0, count: 0, weeks: 0 };
  for (let from = 0, to = 0; from < hours.length; from = to) {
    while (to < hours.length && weekOf(hours[to]!) === weekOf(hours[from]!)) to += 1;
    addWeek(sums, hours, { from, to, referenceAmps });
  }
  return sums;
}

const weekOf = ({ hour }: HourlyLevel): number => Math.floor(hour / WEEK_HOURS);

/** Adds the hours at the places `from` to before `to`, those of one week. */
function addWeek(
  sums: DeviationSums,
  hours: readonly HourlyLevel[],
  { from, to, referenceAmps }: { from: number; to: number; referenceAmps: number },
): void {
  sums.weeks += 1;
  const means = new Float64Array(24 * 4);
  for (let place = from; place < to; place++) {
    const { hour, levelAmps, throughAmps } = hours[place]!;
    const at = 4 * (hour % 24);
    const load = throughAmps / referenceAmps;
    means[at]! += 1;
    means[at + 1]! += load;
    means[at + 2]! += load * load;
    means[at + 3]! += levelAmps * levelAmps;
  }
  for (let place = from; place < to; place++) {
    const { hour, levelAmps, throughAmps } = hours[place]!;
    const at = 4 * (hour % 24);
    const count = means[at]!;
    const load = throughAmps / referenceAmps;
    const t = load - means[at + 1]! / count;
    const q = load * load - means[at + 2]! / count;
    const y = levelAmps * levelAmps - means[at + 3]! / count;
    sums.tt += t * t;
    sums.tq += t * q;
    sums.qq += q * q;
    sums.ty += t * y;
    sums.qy += q * y;
    sums.count += 1;
  }
}

const HOURS_A_DAY_LEAST = 3;

/**
 * Daily levels at the reference load of a response, amperes: the median over the day's hours of what each level
 * would be there. A level that load explains more than wholly is 0. Days of fewer than three hours are left out.
 * Throws for hours out of order.
 */
export function levelsAtLoad(hours: readonly HourlyLevel[], response: LoadResponse): DailyLevel[] {
  assertAscendingHours(hours);
  const levels: DailyLevel[] = [];
  const squares = new Float64Array(24);
  for (let from = 0, to = 0; from < hours.length; from = to) {
    const day = dayOf(hours[from]!);
    for (; to < hours.length && dayOf(hours[to]!) === day; to++) {
      squares[to - from] = squareAtLoad(hours[to]!, response);
    }
    if (to - from < HOURS_A_DAY_LEAST) continue;
    const square = medianInPlace(squares.subarray(0, to - from));
    levels.push({ day, levelAmps: Math.sqrt(Math.max(0, square)) });
  }
  return levels;
}

/**
 * Hourly levels at the reference load of a response, amperes, for a step to be looked for in: the load cycle, which
 * hides most steps of a level, is not in them. In the order of the hours.
 */
export function hoursAtLoad(hours: readonly HourlyLevel[], response: LoadResponse): HourlyValue[] {
  return hours.map((each) => ({
    hour: each.hour,
    value: Math.sqrt(Math.max(0, squareAtLoad(each, response))),
  }));
}

const dayOf = ({ hour }: HourlyLevel): number => Math.floor(hour / 24);

function squareAtLoad(
  { levelAmps, throughAmps }: HourlyLevel,
  { referenceAmps, linearSquareAmps, quadraticSquareAmps }: LoadResponse,
): number {
  const load = throughAmps / referenceAmps;
  return levelAmps * levelAmps + linearSquareAmps * (1 - load) + quadraticSquareAmps * (1 - load * load);
}

function assertAscendingHours(hours: readonly HourlyLevel[]): void {
  let before = -Infinity;
  for (const { hour } of hours) {
    if (!(hour > before)) throw new RangeError('The hours of a level come in ascending order, each once.');
    before = hour;
  }
}
