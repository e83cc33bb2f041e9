import { normalCdf, normalQuantile } from './normal';
import { ascending, averageRanks, quantileOfSome } from './quantile';

/** How two samples, one before and one after, differ; `shift` and its limits in the unit of the values. */
export interface MannWhitney {
  readonly countBefore: number;
  readonly countAfter: number;
  /** Pairs in which the value after is the greater one, ties counting one half. */
  readonly u: number;
  readonly pTwoSided: number;
  /** `exact`: by counting the arrangements; `normal`: with continuity correction and tied ranks allowed for. */
  readonly method: 'exact' | 'normal';
  /** After less before: the median of all differences between the two samples (Hodges–Lehmann). */
  readonly shift: number;
  /** `undefined` where the samples are too small for any. */
  readonly limits: { readonly low: number; readonly high: number } | undefined;
}

/** Up to this many values on either side, and without ties, arrangements are counted. */
const EXACT_COUNT_MOST = 25;

/**
 * Mann–Whitney test of two samples with the shift after Hodges and Lehmann and the limits that belong to the
 * test. M. Hollander and D. A. Wolfe, "Nonparametric Statistical Methods", 1973, chapter 4. Values are taken to
 * be independent: daily levels, rather than hourly ones, whose noise lasts for hours. `varianceRatio` widens
 * test and limits for values that are not (see `varianceRatioOfAr1`); the normal approximation is then used.
 * `undefined` for an empty sample; throws for a NaN.
 */
export function mannWhitney(
  before: readonly number[],
  after: readonly number[],
  {
    confidence = 0.95,
    varianceRatio = 1,
  }: { readonly confidence?: number; readonly varianceRatio?: number } = {},
): MannWhitney | undefined {
  if (before.length === 0 || after.length === 0) return undefined;
  const all = [...before, ...after];
  const rankSum = averageRanks(all)
    .slice(before.length)
    .reduce((total, rank) => total + rank, 0);
  const [m, n] = [before.length, after.length];
  const u = rankSum - (n * (n + 1)) / 2;
  const isExact =
    Math.max(m, n) <= EXACT_COUNT_MOST && new Set(all).size === all.length && varianceRatio === 1;
  const spread = Math.sqrt(tiedVariance(all, m * n) * varianceRatio);
  const differences = ascending(after.flatMap((late) => before.map((early) => late - early)));
  const counts = isExact ? arrangements(m, n) : undefined;
  const rank = counts ? exactRank(counts, confidence) : normalRank(m * n, { spread, confidence });
  return {
    countBefore: m,
    countAfter: n,
    u,
    pTwoSided: counts ? exactP(counts, u) : normalP(u - (m * n) / 2, spread),
    method: isExact ? 'exact' : 'normal',
    shift: quantileOfSome(differences, 0.5),
    limits: limitsAt(differences, rank),
  };
}

/** Variance of U: mn/12 · [(N + 1) − Σ(t³ − t)/(N(N − 1))] over the t of every tied group. */
function tiedVariance(all: readonly number[], pairs: number): number {
  const tied = new Map<number, number>();
  for (const value of all) tied.set(value, (tied.get(value) ?? 0) + 1);
  let ties = 0;
  for (const size of tied.values()) ties += size ** 3 - size;
  const total = all.length;
  return (pairs / 12) * (total + 1 - ties / (total * (total - 1)));
}

/** How many of the arrangements of m and n values give each U from 0 to mn. */
function arrangements(m: number, n: number): Float64Array {
  const counts = new Float64Array(m * n + 1);
  counts[0] = 1;
  // Π (1 − q^(n+i))/(1 − q^i): multiply, then divide, in place
  for (let i = 1; i <= m; i++) {
    for (let u = m * n; u >= n + i; u--) counts[u]! -= counts[u - n - i]!;
    for (let u = i; u <= m * n; u++) counts[u]! += counts[u - i]!;
  }
  return counts;
}

function exactP(counts: Float64Array, u: number): number {
  const total = counts.reduce((sum, each) => sum + each, 0);
  const least = Math.min(u, counts.length - 1 - u);
  const tail = counts.subarray(0, least + 1).reduce((sum, each) => sum + each, 0);
  return Math.min(1, (2 * tail) / total);
}

function normalP(excess: number, spread: number): number {
  if (spread === 0 || excess === 0) return 1;
  return Math.min(1, 2 * normalCdf(-Math.max(0, Math.abs(excess) - 0.5) / spread));
}

/** The rank from below of the difference that is the lower limit: the first U whose lower tail passes α/2. */
function exactRank(counts: Float64Array, confidence: number): number {
  const total = counts.reduce((sum, each) => sum + each, 0);
  let tail = 0;
  for (let u = 0; u < counts.length; u++) {
    tail += counts[u]!;
    if (tail / total > (1 - confidence) / 2) return u;
  }
  return counts.length;
}

function normalRank(pairs: number, { spread, confidence }: { spread: number; confidence: number }): number {
  return Math.floor(pairs / 2 - normalQuantile((1 + confidence) / 2) * spread);
}

function limitsAt(differences: Float64Array, rank: number): MannWhitney['limits'] {
  const low = differences[rank - 1];
  const high = differences[differences.length - rank];
  return rank < 1 || low === undefined || high === undefined ? undefined : { low, high };
}
