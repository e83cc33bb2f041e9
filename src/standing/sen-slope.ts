import { tieCorrectedVariance } from './mann-kendall';
import { normalQuantile } from './normal';
import { medianInPlace, selectedInPlace } from './quantile';

/** One value of a series at its time; the units are the caller's, days and amperes for daily levels. */
export interface SeriesPoint {
  readonly time: number;
  readonly value: number;
}

/** The slope of a series after Theil and Sen and the line it belongs to, in units of its values and times. */
export interface SenSlope {
  readonly slope: number;
  /** Value of the line at time 0. */
  readonly intercept: number;
  /** Confidence limits of the slope; `undefined` where the series is too short to have any. */
  readonly limits: { readonly low: number; readonly high: number } | undefined;
  /** How many slopes between two points it was taken from. */
  readonly pairs: number;
}

/**
 * The line whose slope is the median of the slopes between all pairs of points, placed so that as many points
 * lie above it as below (intercept: median of value − slope·time). P. K. Sen, J. Am. Stat. Assoc. 63, 1968,
 * 1379–1389; limits after R. O. Gilbert, "Statistical Methods for Environmental Pollution Monitoring", 1987,
 * §16.5. The limits take the values to be independent; `varianceRatio`, the variance of S over that of independent
 * values, widens them for values that are not. `undefined` for fewer than two points; throws for a NaN and for times
 * that do not ascend.
 */
export function senSlope(
  series: readonly SeriesPoint[],
  {
    confidence = 0.95,
    varianceRatio = 1,
  }: { readonly confidence?: number; readonly varianceRatio?: number } = {},
): SenSlope | undefined {
  assertSeries(series);
  if (series.length < 2) return undefined;
  const slopes = pairSlopes(series);
  const slope = medianInPlace(slopes);
  const varianceS = varianceRatio * tieCorrectedVariance(series.map((point) => point.value));
  return {
    slope,
    intercept: medianInPlace(Float64Array.from(detrended(series, slope))),
    limits: gilbertLimits(slopes, { varianceS, confidence, isClamped: varianceRatio > 1 }),
    pairs: slopes.length,
  };
}

/** The slope alone; `undefined` and throws as `senSlope`. */
export function senSlopeValue(series: readonly SeriesPoint[]): number | undefined {
  assertSeries(series);
  return series.length < 2 ? undefined : medianInPlace(pairSlopes(series));
}

/** The values less slope·time, in the unit of the values. */
export function detrended(series: readonly SeriesPoint[], slope: number): number[] {
  return series.map((point) => point.value - slope * point.time);
}

function pairSlopes(series: readonly SeriesPoint[]): Float64Array {
  const n = series.length;
  const slopes = new Float64Array((n * (n - 1)) / 2);
  let at = 0;
  series.forEach((from, index) => {
    for (let later = index + 1; later < n; later++) {
      const to = series[later]!;
      slopes[at++] = (to.value - from.value) / (to.time - from.time);
    }
  });
  return slopes;
}

/**
 * With N slopes and C = z·√Var S, the slopes of rank (N − C)/2 and (N + C)/2 + 1 from below, both rounded to
 * the nearest rank; clamped, the least and the greatest slope where those ranks lie beyond them.
 */
function gilbertLimits(
  slopes: Float64Array,
  { varianceS, confidence, isClamped }: { varianceS: number; confidence: number; isClamped: boolean },
): SenSlope['limits'] {
  const c = normalQuantile((1 + confidence) / 2) * Math.sqrt(varianceS);
  const lowRank = Math.round((slopes.length - c) / 2) - 1;
  const highRank = Math.round((slopes.length + c) / 2);
  const low = selectedInPlace(slopes, isClamped ? Math.max(0, lowRank) : lowRank);
  const high = selectedInPlace(slopes, isClamped ? Math.min(slopes.length - 1, highRank) : highRank);
  return low === undefined || high === undefined ? undefined : { low, high };
}

function assertSeries(series: readonly SeriesPoint[]): void {
  let before = -Infinity;
  for (const { time, value } of series) {
    if (Number.isNaN(value)) throw new RangeError('There is no slope of values that are not numbers.');
    if (!(time > before)) throw new RangeError('The points of a series come in ascending order of time.');
    before = time;
  }
}
