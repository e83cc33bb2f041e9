/** How much alike neighbours of a series are. */
export interface FirstOrder {
  /** Correlation of values with the ones right before them, −1 to 1, corrected for the shortness of the series. */
  readonly rho: number;
  /** How many pairs of neighbours it was taken from. */
  readonly pairs: number;
}

/**
 * Lag-1 autocorrelation of values in order of time, deviations from their mean taken. Of a short series it comes
 * out too small, on average ρ − (1 + 4ρ)/n (M. G. Kendall, Biometrika 41, 1954, 403–404); that is corrected for,
 * within ±0.99. `undefined` for fewer than six values or values all alike.
 */
export function firstOrder(values: ArrayLike<number>): FirstOrder | undefined {
  const n = values.length;
  if (n < 6) return undefined;
  let total = 0;
  for (let i = 0; i < n; i++) total += values[i]!;
  const mean = total / n;
  let variance = 0;
  let covariance = 0;
  for (let i = 0; i < n; i++) {
    variance += (values[i]! - mean) ** 2;
    if (i > 0) covariance += (values[i]! - mean) * (values[i - 1]! - mean);
  }
  if (!(variance > 0)) return undefined;
  const corrected = ((covariance / variance) * n + 1) / (n - 4);
  return { rho: Math.max(-0.99, Math.min(0.99, corrected)), pairs: n - 1 };
}

/**
 * Variance of a mean, or of Mann–Kendall's S, of n values of an AR(1) series over that of independent ones:
 * 1 + 2·Σ (1 − k/n)·ρᵏ. n over this is the effective number of values. S. Yue and C. Y. Wang, Water Resources
 * Management 18, 2004, 201–218. At least 1: correlation may take evidence away and never add any.
 */
export function varianceRatioOfAr1(rho: number, n: number): number {
  let ratio = 1;
  let power = 1;
  for (let k = 1; k < n; k++) {
    power *= rho;
    ratio += 2 * (1 - k / n) * power;
  }
  return Math.max(1, ratio);
}
