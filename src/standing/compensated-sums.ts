import { scaled, times } from './complex';
import {
  CROSS_FROM,
  crossProduct,
  SQUARES_AT,
  type CompositionSums,
  differentialSquares,
  normalProduct,
  regressorCount,
  shapeOf,
} from './composition-sums';

/**
 * The sums as they would be with jB·V̄ taken out of every differential: what a scheme that compensates its charging
 * current is left with. `susceptanceMillisiemens` is B in siemens/1000. From D′ = D − jB·V̄ follow
 * Σ conj(x)·D′ = Σ conj(x)·D − jB·Σ conj(x)·V̄ and Σ|D′|² = Σ|D|² − 2·Re(jB·Σ conj(D)·V̄) + B²·Σ|V̄|².
 * `undefined` for sums without a voltage.
 */
export function compensatedSums(
  sums: CompositionSums,
  susceptanceMillisiemens: number,
): CompositionSums | undefined {
  if (!shapeOf(sums).hasVoltage) return undefined;
  const taken = { re: 0, im: susceptanceMillisiemens };
  const values = sums.values.slice();
  for (let regressor = 0; regressor < regressorCount(sums); regressor += 1) {
    const product = times(taken, normalProduct(sums, regressor, 0));
    values[CROSS_FROM + 2 * regressor]! -= product.re;
    values[CROSS_FROM + 2 * regressor + 1]! -= product.im;
  }
  const { re, im } = crossProduct(sums, 0);
  const crossed = scaled(times(taken, { re, im: -im }), 2).re;
  values[SQUARES_AT] = Math.max(
    0,
    differentialSquares(sums) - crossed + susceptanceMillisiemens ** 2 * normalProduct(sums, 0, 0).re,
  );
  return { values };
}
