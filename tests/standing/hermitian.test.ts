import { describe, expect, test } from 'vitest';
import { conditionNumber, hermitianForm, hermitianSolution } from '../../src/standing/hermitian';

const real = (re: number) => ({ re, im: 0 });
const A = [
  [real(4), { re: 1, im: 2 }],
  [{ re: 1, im: -2 }, real(3)],
];

describe('a Hermitian system', () => {
  test('is solved', () => {
    // A·(1 + i, 2 − i) by hand
    const b = [
      { re: 4 + 2 + 2, im: 4 - 1 + 4 },
      { re: 1 + 2 + 6, im: 1 - 2 - 3 },
    ];
    const x = hermitianSolution(A, b)!;
    expect(x[0]!.re).toBeCloseTo(1, 12);
    expect(x[0]!.im).toBeCloseTo(1, 12);
    expect(x[1]!.re).toBeCloseTo(2, 12);
    expect(x[1]!.im).toBeCloseTo(-1, 12);
  });

  test('that is singular has no solution and no finite condition', () => {
    const singular = [
      [real(1), { re: 0, im: 1 }],
      [{ re: 0, im: -1 }, real(1)],
    ];
    expect(hermitianSolution(singular, [real(1), real(1)])).toBeUndefined();
    expect(conditionNumber(singular)).toBe(Infinity);
  });

  test('has the condition of its eigenvalues', () => {
    // (7 ± √21)/2: trace 7, determinant 12 − 5
    expect(conditionNumber(A)).toBeCloseTo((7 + Math.sqrt(21)) / (7 - Math.sqrt(21)), 9);
    expect(conditionNumber([[real(5)]])).toBe(1);
  });

  test('has a real form', () => {
    expect(hermitianForm(A, [real(1), real(1)])).toBeCloseTo(4 + 3 + 2, 12);
  });
});
