import { conjugateProduct, minus, modulus, plus, scaled, squared, times, ZERO } from './complex';
import type { Complex } from './complex';

/** A square matrix that equals its conjugate transpose, by rows. */
export type HermitianMatrix = readonly (readonly Complex[])[];

/** A pivot below this share of its diagonal is rounding. */
const PIVOT_LEAST = 1e-12;

/**
 * x of A·x = b for a positive definite Hermitian A, by Cholesky factorisation. `undefined` where A is not
 * positive definite to within rounding.
 */
export function hermitianSolution(a: HermitianMatrix, b: readonly Complex[]): Complex[] | undefined {
  const lower = choleskyFactor(a);
  if (lower === undefined) return undefined;
  const n = b.length;
  const y: Complex[] = [];
  for (let i = 0; i < n; i++) {
    let rest = b[i]!;
    for (let k = 0; k < i; k++) rest = minus(rest, times(lower[i]![k]!, y[k]!));
    y.push(scaled(rest, 1 / lower[i]![i]!.re));
  }
  const x = new Array<Complex>(n).fill(ZERO);
  for (let i = n - 1; i >= 0; i--) {
    let rest = y[i]!;
    for (let k = i + 1; k < n; k++) rest = minus(rest, conjugateProduct(lower[k]![i]!, x[k]!));
    x[i] = scaled(rest, 1 / lower[i]![i]!.re);
  }
  return x;
}

/** Lower triangle L of A = L·Lᴴ, by rows. */
function choleskyFactor(a: HermitianMatrix): Complex[][] | undefined {
  const lower: Complex[][] = [];
  for (let i = 0; i < a.length; i++) {
    const row: Complex[] = [];
    for (let j = 0; j < i; j++) {
      let rest = a[i]![j]!;
      for (let k = 0; k < j; k++) rest = minus(rest, conjugateProduct(lower[j]![k]!, row[k]!));
      row.push(scaled(rest, 1 / lower[j]![j]!.re));
    }
    const diagonal = a[i]![i]!.re;
    const pivot = diagonal - row.reduce((total, entry) => total + squared(entry), 0);
    if (!(pivot > PIVOT_LEAST * diagonal)) return undefined;
    row.push({ re: Math.sqrt(pivot), im: 0 });
    lower.push(row);
  }
  return lower;
}

/** x[i]ᴴ·A·x for a Hermitian A: real, and not negative where A is a normal matrix. */
export function hermitianForm(a: HermitianMatrix, x: readonly Complex[]): number {
  return a.reduce((total, row, i) => {
    const image = plus(...row.map((entry, j) => times(entry, x[j]!)));
    return total + conjugateProduct(x[i]!, image).re;
  }, 0);
}

/**
 * Greatest over least eigenvalue of a positive semidefinite Hermitian matrix, 1 or more; ∞ where the least is
 * not above rounding. Jacobi's rotations on the real symmetric matrix [Re −Im; Im Re], which has the same
 * eigenvalues, each twice.
 */
export function conditionNumber(a: HermitianMatrix): number {
  const n = a.length;
  if (n === 1) return a[0]![0]!.re > 0 ? 1 : Infinity;
  const real = Array.from({ length: 2 * n }, (_, i) =>
    Array.from({ length: 2 * n }, (_, j) => {
      const entry = a[i % n]![j % n]!;
      if (i < n === j < n) return entry.re;
      return i < n ? -entry.im : entry.im;
    }),
  );
  const eigenvalues = jacobiEigenvalues(real);
  const greatest = Math.max(...eigenvalues);
  const least = Math.min(...eigenvalues);
  return least > greatest * PIVOT_LEAST ? greatest / least : Infinity;
}

const SWEEPS_MOST = 60;

function jacobiEigenvalues(m: number[][]): number[] {
  const n = m.length;
  for (let sweep = 0; sweep < SWEEPS_MOST; sweep++) {
    let off = 0;
    for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) off += m[i]![j]! ** 2;
    if (off < 1e-28) break;
    for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) rotatePair(m, i, j);
  }
  return m.map((row, i) => row[i]!);
}

/** One rotation in the plane of i and j that makes m[i][j] zero. */
function rotatePair(m: number[][], i: number, j: number): void {
  const entry = m[i]![j]!;
  if (entry === 0) return;
  const theta = (m[j]![j]! - m[i]![i]!) / (2 * entry);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (const row of m) {
    const [left, right] = [row[i]!, row[j]!];
    row[i] = c * left - s * right;
    row[j] = s * left + c * right;
  }
  for (let k = 0; k < m.length; k++) {
    const [upper, lower] = [m[i]![k]!, m[j]![k]!];
    m[i]![k] = c * upper - s * lower;
    m[j]![k] = s * upper + c * lower;
  }
}

/** Modulus of the off-diagonal over the geometric mean of its diagonals: 1 for two columns that are proportional. */
export function coherence(a: HermitianMatrix, i: number, j: number): number {
  return modulus(a[i]![j]!) / Math.sqrt(a[i]![i]!.re * a[j]![j]!.re);
}
