/** What a CUSUM watches for, in the unit of the values. */
export interface CusumPlan {
  /** The level that the values are expected to keep. */
  readonly target: number;
  /** Deviations up to this are not accumulated: half of the step to be found. */
  readonly slack: number;
  /** A sum beyond this says that the level has stepped. */
  readonly decision: number;
}

/** Both sums after every value, and the first that crossed the decision limit. */
export interface Cusum {
  readonly high: readonly number[];
  readonly low: readonly number[];
  readonly crossing: { readonly index: number; readonly side: 'high' | 'low' } | undefined;
}

/**
 * Two-sided tabular CUSUM of values in order of time. D. C. Montgomery and G. C. Runger, "Applied Statistics
 * and Probability for Engineers", chapter on statistical quality control. The high sum gathers what lies above
 * target + slack, the low sum what lies below target − slack; neither falls under 0. Throws for a NaN.
 */
export function tabularCusum(values: ArrayLike<number>, { target, slack, decision }: CusumPlan): Cusum {
  const high: number[] = [];
  const low: number[] = [];
  let crossing: Cusum['crossing'];
  let [above, below] = [0, 0];
  for (let index = 0; index < values.length; index++) {
    const value = values[index]!;
    if (Number.isNaN(value)) throw new RangeError('A sum can’t go on past a value that is not a number.');
    above = Math.max(0, above + value - (target + slack));
    below = Math.max(0, below + (target - slack) - value);
    high.push(above);
    low.push(below);
    if (above > decision) crossing ??= { index, side: 'high' };
    if (below > decision) crossing ??= { index, side: 'low' };
  }
  return { high, low, crossing };
}
