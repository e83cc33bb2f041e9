import { normalCdf } from './normal';

/** A Mann–Kendall test of a series against having no trend; every figure is dimensionless. */
export interface MannKendall {
  /** How many values it was taken from. */
  readonly count: number;
  /** Pairs of values that rise less pairs that fall. */
  readonly s: number;
  /** Variance of S were there no trend. */
  readonly varianceS: number;
  /** S in standard deviations, with continuity correction. */
  readonly z: number;
  readonly pTwoSided: number;
}

/**
 * Mann–Kendall test of values in order of time, with the variance corrected for ties. R. O. Gilbert,
 * "Statistical Methods for Environmental Pollution Monitoring", 1987, §16.4. It takes the values to be
 * independent: `hamedRao` corrects it for a series that is not. Equal values all along give z 0 and p 1.
 * `undefined` for fewer than two values; throws for a NaN.
 */
export function mannKendall(values: readonly number[]): MannKendall | undefined {
  if (values.some(Number.isNaN)) throw new RangeError('There is no trend of values that are not numbers.');
  if (values.length < 2) return undefined;
  const varianceS = tieCorrectedVariance(values);
  return mannKendallFrom({ count: values.length, s: risesLessFalls(values), varianceS });
}

/** The test of an S whose variance is known: z with continuity correction, and p by the normal distribution. */
export function mannKendallFrom({
  count,
  s,
  varianceS,
}: Pick<MannKendall, 'count' | 's' | 'varianceS'>): MannKendall {
  const z = s === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varianceS);
  return { count, s, varianceS, z, pTwoSided: 2 * normalCdf(-Math.abs(z)) };
}

/** Variance of S for values without trend: [n(n−1)(2n+5) − Σ t(t−1)(2t+5)]/18 over the t of every tied group. */
export function tieCorrectedVariance(values: readonly number[]): number {
  const tiedSizes = new Map<number, number>();
  for (const value of values) tiedSizes.set(value, (tiedSizes.get(value) ?? 0) + 1);
  const weight = (size: number) => size * (size - 1) * (2 * size + 5);
  let total = weight(values.length);
  for (const size of tiedSizes.values()) total -= weight(size);
  return total / 18;
}

function risesLessFalls(values: readonly number[]): number {
  let s = 0;
  values.forEach((earlier, index) => {
    for (const later of values.slice(index + 1)) s += Math.sign(later - earlier);
  });
  return s;
}
