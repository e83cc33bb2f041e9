/**
 * The standard normal distribution, to nearly double precision without tables of coefficients.
 */

const SQRT_TWO_PI = Math.sqrt(2 * Math.PI);

/** From here on the continued fraction converges fast; below it the series does. */
const TAIL_FROM = 3;
const TAIL_TERMS = 80;

/**
 * Φ(x), the probability of a value up to x. Exact to about 1e-15 absolutely, and to about 12 digits of the
 * smaller tail below −3. Throws for a NaN.
 */
export function normalCdf(x: number): number {
  if (Number.isNaN(x)) throw new RangeError('A probability of NaN does not exist.');
  return x < 0 ? upperTail(-x) : 1 - upperTail(x);
}

/**
 * The x at which Φ(x) = p; −∞ for 0 and ∞ for 1. Throws for a p outside 0 to 1.
 *
 * Newton's method from 0 on the tail probability, which is convex there: every step falls short of the root
 * and none passes it, so it needs no good first guess.
 */
export function normalQuantile(p: number): number {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`A probability is 0 to 1, not ${p}.`);
  if (p > 0.5) return -normalQuantile(1 - p);
  if (p === 0) return -Infinity;
  let x = 0;
  for (let step = Infinity; step > 1e-15; x += step) step = (upperTail(x) - p) / density(x);
  return -x;
}

function density(x: number): number {
  return Math.exp((-x * x) / 2) / SQRT_TWO_PI;
}

/** 1 − Φ(x) for x of zero or more. */
function upperTail(x: number): number {
  return x < TAIL_FROM ? 0.5 - density(x) * centralSeries(x) : density(x) / tailFraction(x);
}

/** (Φ(x) − ½)/φ(x) = x + x³/3 + x⁵/(3·5) + …, all terms positive. */
function centralSeries(x: number): number {
  let term = x;
  let total = x;
  for (let divisor = 3; term > total * Number.EPSILON; divisor += 2) {
    term *= (x * x) / divisor;
    total += term;
  }
  return total;
}

/** φ(x)/(1 − Φ(x)) = x + 1/(x + 2/(x + 3/(x + …))), Laplace's continued fraction, from its far end. */
function tailFraction(x: number): number {
  let fraction = x;
  for (let k = TAIL_TERMS; k >= 1; k--) fraction = x + k / fraction;
  return fraction;
}
