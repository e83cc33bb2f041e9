import { conjugateProduct, plus, scaled, ZERO } from './complex';
import type { Complex } from './complex';
import {
  crossProduct,
  differentialSquares,
  normalProduct,
  regressorCount,
  shapeOf,
  snapshotCount,
} from './composition-sums';
import type { CompositionSums, SumsShape } from './composition-sums';
import { conditionNumber, hermitianForm, hermitianSolution } from './hermitian';
import type { HermitianMatrix } from './hermitian';
import { writeResidualProducts } from './residual-products';

/**
 * Coefficients of D = Y·V̄ + Σ E_k·I_k by least squares, without a word on how sure they are: that is
 * `composition`'s to say.
 */
export interface CompositionFit {
  readonly shape: SumsShape;
  /** Y, siemens/1000 (amperes per kilovolt), then the E_k, per unit; in the order of the regressors. */
  readonly coefficients: readonly Complex[];
  /** Condition number of the normal matrix with its columns scaled to equal length, 1 or more. */
  readonly condition: number;
  /** Rms of what the fit leaves over, amperes. */
  readonly residualRmsAmps: number;
  /** How many snapshots it was taken from. */
  readonly count: number;
}

/**
 * The fit of a window's sums. `undefined` where there is none: fewer snapshots than regressors, a regressor that
 * is zero all along, or regressors that are proportional to within rounding.
 */
export function compositionFit(sums: CompositionSums): CompositionFit | undefined {
  const coefficients = fittedCoefficients(sums);
  if (coefficients === undefined) return undefined;
  return {
    shape: shapeOf(sums),
    coefficients,
    condition: scaledCondition(sums),
    residualRmsAmps: residualRmsAmps(sums, coefficients),
    count: snapshotCount(sums),
  };
}

/** The coefficients alone; `undefined` as for `compositionFit`. */
export function fittedCoefficients(sums: CompositionSums): Complex[] | undefined {
  const p = regressorCount(sums);
  if (snapshotCount(sums) < p) return undefined;
  const scales = columnScales(sums);
  if (scales.some((scale) => scale === 0)) return undefined;
  const right = scales.map((scale, i) => scaled(crossProduct(sums, i), 1 / scale));
  const solution = hermitianSolution(scaledNormalMatrix(sums), right);
  return solution?.map((value, i) => scaled(value, 1 / scales[i]!));
}

/**
 * Coefficients of a short window, drawn to those of a longer one where the short one can't tell: least squares
 * with the differences from `prior` weighed as `weight` (a share of the window's own information) more. What the
 * window's loads do tell apart is hardly touched. `undefined` for no snapshots.
 */
export function shrunkCoefficients(
  sums: CompositionSums,
  { prior, weight }: { readonly prior: readonly Complex[]; readonly weight: number },
): Complex[] | undefined {
  if (snapshotCount(sums) === 0) return undefined;
  const scales = columnScales(sums).map((scale) => (scale > 0 ? scale : 1));
  const gradient = residualProducts(sums, prior);
  const matrix = scaledNormalMatrix(sums).map((row, i) =>
    row.map((entry, j) => (i === j ? { re: entry.re + weight, im: 0 } : entry)),
  );
  const change = hermitianSolution(
    matrix,
    scales.map((scale, i) => scaled(gradient[i]!, 1 / scale)),
  );
  return change?.map((value, i) => plus(prior[i]!, scaled(value, 1 / scales[i]!)));
}

/** For a window whose load is too constant to tell causes apart: then the smallest coefficients that fit. */
const RIDGE = 0.003;

/**
 * Coefficients that say what is ordinary for a window, whether or not it tells causes apart: those that fit, or the
 * smallest that nearly do. `undefined` for no snapshots.
 */
export function settledCoefficients(sums: CompositionSums): Complex[] | undefined {
  const none = Array.from({ length: regressorCount(sums) }, () => ZERO);
  return fittedCoefficients(sums) ?? shrunkCoefficients(sums, { prior: none, weight: RIDGE });
}

/** Σ conj(x)·(D − fit) of every regressor: what a set of coefficients leaves over of these sums. */
export function residualProducts(sums: CompositionSums, coefficients: readonly Complex[]): Complex[] {
  const target = new Float64Array(2 * coefficients.length);
  writeResidualProducts(sums, partsOf(coefficients), { target, at: 0 });
  return coefficients.map((_, i) => ({ re: target[2 * i]!, im: target[2 * i + 1]! }));
}

/** Real and imaginary parts in turn. */
export const partsOf = (coefficients: readonly Complex[]): Float64Array =>
  new Float64Array(coefficients.flatMap(({ re, im }) => [re, im]));

/**
 * Rms over the window of D less what these coefficients make of it, amperes; they may come from another window.
 * 0 for no snapshots.
 */
export function residualRmsAmps(sums: CompositionSums, coefficients: readonly Complex[]): number {
  const count = snapshotCount(sums);
  if (count === 0) return 0;
  return Math.sqrt(Math.max(0, residualSquares(sums, coefficients)) / count);
}

/** Σ|D − fit|², A². Differences of large numbers: it may come out a rounding below 0. */
export function residualSquares(sums: CompositionSums, coefficients: readonly Complex[]): number {
  const explained = coefficients.reduce(
    (total, coefficient, i) => total + conjugateProduct(coefficient, crossProduct(sums, i)).re,
    0,
  );
  return differentialSquares(sums) - 2 * explained + hermitianForm(normalMatrix(sums), coefficients);
}

/** Condition number of the normal matrix with equal columns; ∞ with a regressor that is zero all along. */
export function scaledCondition(sums: CompositionSums): number {
  return columnScales(sums).some((scale) => scale === 0)
    ? Infinity
    : conditionNumber(scaledNormalMatrix(sums));
}

/** Xᴴ·X of the window. */
export function normalMatrix(sums: CompositionSums): HermitianMatrix {
  const places = Array.from({ length: regressorCount(sums) }, (_, i) => i);
  return places.map((i) => places.map((j) => normalProduct(sums, i, j)));
}

function scaledNormalMatrix(sums: CompositionSums): HermitianMatrix {
  const scales = columnScales(sums);
  return normalMatrix(sums).map((row, i) =>
    row.map((entry, j) => {
      const scale = scales[i]! * scales[j]!;
      return scale > 0 ? scaled(entry, 1 / scale) : ZERO;
    }),
  );
}

/** √Σ|x|² of every regressor. */
function columnScales(sums: CompositionSums): number[] {
  return Array.from({ length: regressorCount(sums) }, (_, i) => Math.sqrt(normalProduct(sums, i, i).re));
}
