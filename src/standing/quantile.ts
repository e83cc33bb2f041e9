/** The values in ascending order. Throws for a NaN, which has no place in an order. */
export function ascending(values: ArrayLike<number>): Float64Array {
  const sorted = Float64Array.from(values).sort();
  // A typed array sorts NaN to its end.
  if (Number.isNaN(sorted.at(-1))) throw new RangeError('A value that is not a number has no rank.');
  return sorted;
}

/**
 * The p-quantile of ascending values, in their unit: linear interpolation between the order statistics around
 * position (n − 1)·p (type 7 of Hyndman and Fan, The American Statistician 50, 1996). `undefined` for no
 * values. Throws for a p outside 0 to 1 and for values that are not numbers.
 */
export function quantileSorted(sorted: ArrayLike<number>, p: number): number | undefined {
  return sorted.length === 0 ? undefined : quantileOfSome(sorted, p);
}

/** As `quantileSorted`, where the caller knows that there are values: throws for none. */
export function quantileOfSome(sorted: ArrayLike<number>, p: number): number {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`A quantile is taken at 0 to 1, not at ${p}.`);
  const position = (sorted.length - 1) * p;
  const lower = sorted[Math.floor(position)];
  const upper = sorted[Math.ceil(position)];
  if (lower === undefined || upper === undefined) throw new RangeError('There is no quantile of no values.');
  const quantile = lower + (upper - lower) * (position - Math.floor(position));
  if (Number.isNaN(quantile)) throw new RangeError('There is no quantile of values that are not numbers.');
  return quantile;
}

/** The median of values in any order, in their unit. `undefined` for no values; throws for a NaN. */
export function median(values: readonly number[]): number | undefined {
  return quantileSorted(ascending(values), 0.5);
}

/**
 * The median of some values, which it reorders: the same number as `median` gives, without sorting all of them (C. A.
 * R. Hoare, Communications of the ACM 4, 1961, 321–322). Throws for no values; they may not be NaN.
 */
export function medianInPlace(values: Float64Array): number {
  const upperPlace = Math.floor(values.length / 2);
  const upper = selectedInPlace(values, upperPlace);
  if (upper === undefined) throw new RangeError('There is no median of no values.');
  if (values.length % 2 === 1) return upper;
  let lower = -Infinity;
  for (let at = 0; at < upperPlace; at++) lower = Math.max(lower, values[at]!);
  return lower + (upper - lower) / 2;
}

/**
 * The value of this rank, from 0, of values that it reorders: afterwards none before its place is greater and none
 * behind it less. `undefined` for a rank that there is none of; the values may not be NaN.
 */
export function selectedInPlace(values: Float64Array, rank: number): number | undefined {
  let [from, to] = [0, values.length - 1];
  while (from < to) {
    const pivot = values[Math.floor((from + to) / 2)]!;
    let [left, right] = [from, to];
    while (left <= right) {
      while (values[left]! < pivot) left += 1;
      while (values[right]! > pivot) right -= 1;
      if (left > right) break;
      const value = values[left]!;
      values[left++] = values[right]!;
      values[right--] = value;
    }
    if (rank <= right) to = right;
    else if (rank >= left) from = left;
    else break;
  }
  return values[rank];
}

/** Rank of each value among all, from 1; equal values share the mean of their ranks. Throws for a NaN. */
export function averageRanks(values: readonly number[]): number[] {
  const sorted = ascending(values);
  return values.map((value) => (sorted.indexOf(value) + sorted.lastIndexOf(value)) / 2 + 1);
}
