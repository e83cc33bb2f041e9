import { normalCdf } from './normal';
import { ascending } from './quantile';

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

/** Σ sign(later − earlier) over all pairs, counted by ranks in a binary indexed tree: n·log n steps instead of n². */
function risesLessFalls(values: readonly number[]): number {
  const ranks = new Map<number, number>();
  for (const value of ascending(values)) if (!ranks.has(value)) ranks.set(value, ranks.size + 1);
  const tree = new Int32Array(ranks.size + 1);
  const earlierUpTo = (rank: number): number => {
    let count = 0;
    for (let at = rank; at > 0; at -= at & -at) count += tree[at]!;
    return count;
  };
  let s = 0;
  values.forEach((value, earlier) => {
    const rank = ranks.get(value)!;
    s += earlierUpTo(rank - 1) - (earlier - earlierUpTo(rank));
    for (let at = rank; at < tree.length; at += at & -at) tree[at]! += 1;
  });
  return s;
}
