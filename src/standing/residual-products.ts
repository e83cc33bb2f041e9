import { type CompositionSums, CROSS_FROM, regressorCount } from './composition-sums';

/** Σ|x|² of the regressor at this place. */
export function normalSquares(sums: CompositionSums, regressor: number): number {
  const p = regressorCount(sums);
  return sums.values[CROSS_FROM + 2 * p + 2 * (regressor * p - (regressor * (regressor - 1)) / 2)]!;
}

/**
 * Σ conj(x)·(D − Σ c·x) of every regressor x of these sums, with one coefficient c a regressor: what the coefficients
 * leave over. Real and imaginary part in turn, as are the coefficients; written to `target` from `at` on, since there
 * are thousands of hours to be gone through. Throws for another number of coefficients.
 */
export function writeResidualProducts(
  sums: CompositionSums,
  coefficients: Float64Array,
  { target, at }: { readonly target: Float64Array; readonly at: number },
): void {
  const { values } = sums;
  const p = regressorCount(sums);
  if (coefficients.length !== 2 * p) throw new RangeError('There is one coefficient for every regressor.');
  target.set(values.subarray(CROSS_FROM, CROSS_FROM + 2 * p), at);
  let from = CROSS_FROM + 2 * p;
  for (let i = 0; i < p; i++) {
    for (let j = i; j < p; j++) {
      const [re, im] = [values[from]!, values[from + 1]!];
      from += 2;
      takeProduct(target, at + 2 * i, { re, im, by: coefficients, place: j });
      if (j > i) takeProduct(target, at + 2 * j, { re, im: -im, by: coefficients, place: i });
    }
  }
}

function takeProduct(
  target: Float64Array,
  at: number,
  { re, im, by, place }: { re: number; im: number; by: Float64Array; place: number },
): void {
  const [cRe, cIm] = [by[2 * place]!, by[2 * place + 1]!];
  target[at]! -= re * cRe - im * cIm;
  target[at + 1]! -= re * cIm + im * cRe;
}
