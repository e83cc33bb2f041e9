import { minus } from './complex';
import type { Complex } from './complex';

/**
 * The probability that an estimate of a complex number lies as far from 0 as `value` does if it is 0, by Hotelling's
 * T² of its real and imaginary part (Ann. Math. Stat. 2, 1931, 360–378) with the covariance that the jackknife's
 * replicates tell, the estimate without each of n parts. T²·(n − 2)/(2·(n − 1)) has the F distribution of 2 and n − 2
 * degrees of freedom, whose tail is a power. `undefined` for fewer than four replicates and for ones all in a line.
 */
export function pOfZero(value: Complex, replicates: readonly Complex[]): number | undefined {
  const n = replicates.length;
  if (n < 4) return undefined;
  const mean = {
    re: replicates.reduce((total, { re }) => total + re, 0) / n,
    im: replicates.reduce((total, { im }) => total + im, 0) / n,
  };
  let [rr, ri, ii] = [0, 0, 0];
  for (const each of replicates) {
    const { re, im } = minus(each, mean);
    rr += (re * re * (n - 1)) / n;
    ri += (re * im * (n - 1)) / n;
    ii += (im * im * (n - 1)) / n;
  }
  const determinant = rr * ii - ri * ri;
  if (!(determinant > 1e-12 * rr * ii)) return undefined;
  const tSquared = (value.re ** 2 * ii - 2 * value.re * value.im * ri + value.im ** 2 * rr) / determinant;
  return (1 + tSquared / (n - 1)) ** (-(n - 2) / 2);
}
