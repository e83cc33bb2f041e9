import { firstOrder, varianceRatioOfAr1 } from './autocorrelation';
import { type MannWhitney, mannWhitney } from './mann-whitney';
import { median } from './quantile';

/**
 * How the daily levels of two windows differ, amperes: Mann–Whitney with the shift after Hodges and Lehmann, test and
 * limits widened for days that are like their neighbours. The correlation is that of both sides' deviations from their
 * own median, taken as first-order autoregressive; the variance of each side's share grows as that of a mean does
 * (S. Yue and C. Y. Wang, Water Resources Management 18, 2004, 201–218). Levels in order of time. `undefined` for an
 * empty side; throws for a NaN.
 */
export function levelShift(before: readonly number[], after: readonly number[]): MannWhitney | undefined {
  const middles = [median(before), median(after)];
  if (middles[0] === undefined || middles[1] === undefined) return undefined;
  const deviations = [before, after].map((side, index) => side.map((level) => level - middles[index]!));
  const rho = Math.max(0, ...deviations.map((side) => firstOrder(side)?.rho ?? 0));
  const [m, n] = [before.length, after.length];
  const shares = [varianceRatioOfAr1(rho, m) / m, varianceRatioOfAr1(rho, n) / n];
  const varianceRatio = (shares[0]! + shares[1]!) / (1 / m + 1 / n);
  return mannWhitney(before, after, { varianceRatio });
}
