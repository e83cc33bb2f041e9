import { mannKendall, mannKendallFrom } from './mann-kendall';
import type { MannKendall } from './mann-kendall';
import { normalQuantile } from './normal';
import { averageRanks } from './quantile';
import { detrended, senSlope } from './sen-slope';
import type { SeriesPoint } from './sen-slope';

/** A Mann–Kendall test whose variance allows for autocorrelation. */
export interface HamedRao extends MannKendall {
  /** Corrected over plain variance of S (n/n*): above 1 where neighbouring values resemble each other. */
  readonly varianceRatio: number;
}

/** Lags within the 95 % band of an uncorrelated series count as uncorrelated. */
const BAND_PROBABILITY = 0.975;

/** Far above the rounding of one subtraction, far below what any measurement resolves. */
const ROUNDING = 1e-12;

/**
 * Mann–Kendall test corrected for autocorrelation. K. H. Hamed and A. R. Rao, Journal of Hydrology 204, 1998,
 * 182–196: autocorrelation of the ranks of the Sen-detrended series, lags that are not significant left out.
 * Lags count points, so a gap in the times is taken as one step. A caller that knows the Sen slope of the series
 * hands it over: it takes the longest. `undefined` for fewer than three points, and
 * where strong negative autocorrelation leaves no positive variance; throws as `senSlope` does.
 */
export function hamedRao(
  series: readonly SeriesPoint[],
  slope: number | undefined = senSlope(series)?.slope,
): HamedRao | undefined {
  const plain = mannKendall(series.map((point) => point.value));
  if (plain === undefined || slope === undefined || plain.count < 3) return undefined;
  const ratio = varianceRatio(residualRanks(series, slope));
  if (ratio <= 0) return undefined;
  return { ...mannKendallFrom({ ...plain, varianceS: plain.varianceS * ratio }), varianceRatio: ratio };
}

/**
 * Ranks of the detrended values. Residuals that differ only by the rounding of their subtraction tie: an exactly
 * straight line leaves nothing else, and would be ranked as if it were measured.
 */
function residualRanks(series: readonly SeriesPoint[], slope: number): number[] {
  const size = Math.max(...series.map(({ time, value }) => Math.abs(value) + Math.abs(slope * time)));
  const resolution = size > 0 ? ROUNDING * size : 1;
  return averageRanks(detrended(series, slope).map((residual) => Math.round(residual / resolution)));
}

/** 1 + 2/[n(n−1)(n−2)] · Σ (n−i)(n−i−1)(n−i−2)·ρᵢ over the significant lags i. */
function varianceRatio(ranks: readonly number[]): number {
  const n = ranks.length;
  const band = normalQuantile(BAND_PROBABILITY) / Math.sqrt(n);
  const weight = (m: number) => m * (m - 1) * (m - 2);
  let weighted = 0;
  autocorrelations(ranks).forEach((rho, lag) => {
    if (lag > 0 && Math.abs(rho) > band) weighted += weight(n - lag) * rho;
  });
  return 1 + (2 * weighted) / weight(n);
}

/** Autocorrelation at lags 0 to n − 1; none where all values are equal. */
function autocorrelations(values: readonly number[]): number[] {
  const mean = values.reduce((total, value) => total + value, 0) / values.length;
  const deviations = values.map((value) => value - mean);
  const byLag = deviations.map((_, lag) => {
    let covariance = 0;
    for (let later = lag; later < deviations.length; later++) {
      covariance += deviations[later - lag]! * deviations[later]!;
    }
    return covariance;
  });
  const variance = byLag[0] ?? 0;
  return variance > 0 ? byLag.map((covariance) => covariance / variance) : [];
}
