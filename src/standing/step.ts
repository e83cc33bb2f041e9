import { firstOrder } from './autocorrelation';
import { tabularCusum } from './cusum';
import { mannWhitney } from './mann-whitney';
import { medianInPlace } from './quantile';

/** A value of one hour, hours counted from the epoch; hours may be missing. */
export interface HourlyValue {
  readonly hour: number;
  readonly value: number;
}

export interface StepPlan {
  /** Hours at the end of the series in which a step is looked for; 96 unless given. */
  readonly watchedHours?: number;
  /** Hours before them that say what is ordinary; 336 unless given. */
  readonly baselineHours?: number;
}

/** A change of level between one hour and the next, in the unit of the values. */
export interface Step {
  readonly kind: 'step';
  /** When, in hours since the epoch with a fraction: an hour that is mixed says how much of it came after. */
  readonly atHour: number;
  /** After less before: the median of the differences between hours after and hours before (Hodges–Lehmann). */
  readonly size: number;
  /** Robust standard deviation of the hours before. */
  readonly spread: number;
  /** Correlation of an hour with the next one, before. */
  readonly rho: number;
  readonly hoursAfter: number;
  /** By how much the step improves on no step: twice the logarithm of the likelihood ratio. */
  readonly evidence: number;
}

/** No step, though the sums may have passed their limit: a spike, a drift or a small change can carry them there. */
export interface NoStep {
  readonly kind: 'no step';
  readonly alarmed: boolean;
}

export type StepVerdict =
  { readonly kind: 'too few hours'; readonly hours: number; readonly hoursNeeded: number } | NoStep | Step;

const WATCHED_HOURS = 96;
const BASELINE_HOURS = 336;
const BASELINE_LEAST = 120;

/** A change is told once so many hours have confirmed it, which also tell its cause and its hour. */
const HOURS_AFTER_LEAST = 12;

/** Below this size, in robust standard deviations, noise that lasts for days looks no different from a step. */
const SIZE_LEAST = 6;

/** Half of the least step that is looked for, in robust standard deviations. */
const SLACK = 2;

/**
 * Decision limit of the sums for independent hours, in robust standard deviations. A sum of noise passes h about
 * once in e^(2·slack·h) hours; for noise that lasts, h grows by its long-run over its plain variance.
 */
const DECISION = 6;

/** Makes the median absolute deviation the standard deviation of normal noise. */
const MAD_TO_DEVIATION = 1.4826;

/**
 * The step in the last hours of a series, if there is one. Two-sided CUSUM of the watched hours around the median of
 * the hours before, in units of their robust spread; its decision limit is multiplied by (1 + ρ)/(1 − ρ), the long-run
 * variance of first-order autoregressive noise. The change point is the likeliest one within the alarm's run with
 * that noise whitened. A series that a straight drift describes better has no step. Throws for a NaN and for hours
 * out of order.
 */
export function stepVerdict(series: readonly HourlyValue[], plan: StepPlan = {}): StepVerdict {
  assertSeries(series);
  const watchedFrom = (series.at(-1)?.hour ?? 0) - (plan.watchedHours ?? WATCHED_HOURS) + 1;
  const within = from(series, watchedFrom - (plan.baselineHours ?? BASELINE_HOURS));
  const values = new Float64Array(within.map(({ value }) => value));
  const baseline = values.subarray(0, within.length - from(within, watchedFrom).length);
  if (baseline.length < BASELINE_LEAST) {
    return { kind: 'too few hours', hours: baseline.length, hoursNeeded: BASELINE_LEAST };
  }
  const target = medianInPlace(baseline.slice());
  const spread = MAD_TO_DEVIATION * medianInPlace(baseline.map((value) => Math.abs(value - target)));
  if (!(spread > 0)) return { kind: 'no step', alarmed: false };
  const rho = Math.max(0, firstOrder(baseline)?.rho ?? 0);
  const watched = values.subarray(baseline.length);
  const run = alarmRun(
    watched.map((value) => (value - target) / spread),
    (DECISION * (1 + rho)) / (1 - rho),
  );
  if (run === undefined) return { kind: 'no step', alarmed: false };
  return stepWithin(within, {
    from: baseline.length + run.from,
    to: baseline.length + run.to,
    target,
    spread,
    rho,
  });
}

/** The values of an ascending series from this hour on. */
function from(series: readonly HourlyValue[], hour: number): readonly HourlyValue[] {
  const place = series.findIndex((each) => each.hour >= hour);
  return place < 0 ? [] : series.slice(place);
}

/** From where the sum that crossed its limit has been above 0, to where it crossed; places among the values. */
function alarmRun(values: ArrayLike<number>, decision: number): { from: number; to: number } | undefined {
  const cusum = tabularCusum(values, { target: 0, slack: SLACK, decision });
  if (cusum.crossing === undefined) return undefined;
  const { index, side } = cusum.crossing;
  return { from: cusum[side].slice(0, index).lastIndexOf(0) + 1, to: index };
}

interface Alarm {
  readonly from: number;
  readonly to: number;
  readonly target: number;
  readonly spread: number;
  readonly rho: number;
}

/** Noise may start a run a few hours before the change that carries it over the limit, and hide it for a few. */
const RUN_MARGIN_HOURS = 12;

function stepWithin(series: readonly HourlyValue[], alarm: Alarm): StepVerdict {
  const { target, spread, rho } = alarm;
  const deviations = series.map(({ value }) => (value - target) / spread);
  const noiseSquares = 1 - rho * rho || 1;
  let best: { place: number; share: number; gain: number } | undefined;
  const last = Math.min(alarm.to, series.length - 2);
  for (let place = Math.max(2, alarm.from - RUN_MARGIN_HOURS); place <= last; place++) {
    const found = changeAt(deviations, { place, rho });
    if (best === undefined || found.gain > best.gain) best = { place, ...found };
  }
  if (best === undefined || best.gain <= driftGain(series, deviations, rho))
    return { kind: 'no step', alarmed: true };
  const before = series.slice(0, best.place).map(({ value }) => value);
  const after = series.slice(best.place + 1).map(({ value }) => value);
  const size = mannWhitney(before, after)!.shift;
  if (after.length < HOURS_AFTER_LEAST || Math.abs(size) < SIZE_LEAST * spread)
    return { kind: 'no step', alarmed: true };
  return {
    kind: 'step',
    atHour: series[best.place]!.hour + 1 - best.share,
    size,
    spread,
    rho,
    hoursAfter: after.length,
    evidence: best.gain / noiseSquares,
  };
}

/**
 * Least squares of the whitened deviations y_t − ρ·y_{t−1} by a level that is 0 before `place`, some share of b in
 * that hour and b after it. `gain` is what it takes off the sum of squares.
 */
function changeAt(
  deviations: readonly number[],
  { place, rho }: { place: number; rho: number },
): { share: number; gain: number } {
  const whitened = (at: number): number => deviations[at]! - rho * deviations[at - 1]!;
  const afterCount = deviations.length - place - 2;
  let laterSum = 0;
  for (let at = place + 2; at < deviations.length; at++) laterSum += whitened(at);
  // columns of a (the mixed hour) and b (all hours after): (1, −ρ, 0, …) and (0, 1, 1 − ρ, …)
  const aa = 1 + rho * rho;
  const ab = -rho;
  const bb = 1 + Math.max(0, afterCount) * (1 - rho) ** 2;
  const ya = whitened(place) - rho * whitened(place + 1);
  const yb = whitened(place + 1) + (1 - rho) * laterSum;
  const determinant = aa * bb - ab * ab;
  const a = (ya * bb - yb * ab) / determinant;
  const b = (yb * aa - ya * ab) / determinant;
  const share = b === 0 ? 0 : Math.max(0, Math.min(1, a / b));
  const column = { y: share * ya + yb, squares: share * share * aa + 2 * share * ab + bb };
  return { share, gain: column.y ** 2 / column.squares };
}

/** What a straight drift over all hours, with its own level, takes off the sum of squares more than a level does. */
function driftGain(series: readonly HourlyValue[], deviations: readonly number[], rho: number): number {
  const y: number[] = [];
  const t: number[] = [];
  for (let at = 1; at < series.length; at++) {
    y.push(deviations[at]! - rho * deviations[at - 1]!);
    t.push(series[at]!.hour - rho * series[at - 1]!.hour);
  }
  const mean = (values: readonly number[]) => values.reduce((total, each) => total + each, 0) / values.length;
  const [meanY, meanT] = [mean(y), mean(t)];
  let yt = 0;
  let tt = 0;
  y.forEach((each, at) => {
    yt += (each - meanY) * (t[at]! - meanT);
    tt += (t[at]! - meanT) ** 2;
  });
  return tt > 0 ? yt ** 2 / tt : 0;
}

function assertSeries(series: readonly HourlyValue[]): void {
  let before = -Infinity;
  for (const { hour, value } of series) {
    if (!(hour > before)) throw new RangeError('The hours of a series come in ascending order.');
    if (Number.isNaN(value)) throw new RangeError('There is no step of values that are not numbers.');
    before = hour;
  }
}
