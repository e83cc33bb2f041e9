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
  const sorted = ascending(values);
  const varianceS = varianceOfSorted(sorted);
  return mannKendallFrom({ count: values.length, s: risesLessFalls(values, sorted), varianceS });
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
  return varianceOfSorted(ascending(values));
}

function varianceOfSorted(sorted: Float64Array): number {
  const weight = (size: number) => size * (size - 1) * (2 * size + 5);
  let total = weight(sorted.length);
  let tiedFrom = 0;
  for (let at = 1; at <= sorted.length; at++) {
    if (sorted[at] === sorted[tiedFrom]) continue;
    total -= weight(at - tiedFrom);
    tiedFrom = at;
  }
  return total / 18;
}

/** Σ sign(later − earlier) over all pairs, counted by ranks in a binary indexed tree: n·log n steps instead of n². */
function risesLessFalls(values: readonly number[], sorted: Float64Array): number {
  const tree = new Int32Array(sorted.length + 1);
  const earlierUpTo = (rank: number): number => {
    let count = 0;
    for (let at = rank; at > 0; at -= at & -at) count += tree[at]!;
    return count;
  };
  let s = 0;
  for (let earlier = 0; earlier < values.length; earlier++) {
    // equal values share the place of the first of them
    const rank = placeIn(sorted, values[earlier]!) + 1;
    s += earlierUpTo(rank - 1) - (earlier - earlierUpTo(rank));
    for (let at = rank; at < tree.length; at += at & -at) tree[at]! += 1;
  }
  return s;
}

/** The first place of a value among ascending ones that it is one of. */
function placeIn(sorted: Float64Array, value: number): number {
  let [from, to] = [0, sorted.length - 1];
  while (from < to) {
    const middle = (from + to) >> 1;
    if (sorted[middle]! < value) from = middle + 1;
    else to = middle;
  }
  return from;
}
