import { expect, test } from 'vitest';
import { conjugateProduct, minus, plus, times } from '../../src/standing/complex';
import { residualProducts } from '../../src/standing/composition-fit';
import { normalProduct } from '../../src/standing/composition-sums';
import { normalSquares, writeResidualProducts } from '../../src/standing/residual-products';
import { dayOf, sumsOf } from './made-up-phase';

const TRUTH = {
  susceptanceMillisiemens: 0.2,
  mismatches: [
    { re: 0.02, im: -0.01 },
    { re: -0.01, im: 0.03 },
  ],
};
const SNAPSHOTS = dayOf(TRUTH, 4);
const SUMS = sumsOf(SNAPSHOTS);
const COEFFICIENTS = [
  { re: 0.01, im: 0.1 },
  { re: 0.03, im: 0.02 },
  { re: -0.02, im: 0.01 },
];

test('residual products of sums are those of the snapshots, one by one', () => {
  const products = SNAPSHOTS.map(({ differentialAmps, voltageKv, otherCurrentsAmps }) => {
    const regressors = [voltageKv!, ...otherCurrentsAmps];
    const explained = plus(...regressors.map((x, i) => times(COEFFICIENTS[i]!, x)));
    return regressors.map((x) => conjugateProduct(x, minus(differentialAmps, explained)));
  });
  residualProducts(SUMS, COEFFICIENTS).forEach((found, i) => {
    const expected = plus(...products.map((each) => each[i]!));
    expect(found.re).toBeCloseTo(expected.re, 5);
    expect(found.im).toBeCloseTo(expected.im, 5);
  });
});

test('residual products are written where they are asked for, and want a coefficient a regressor', () => {
  const target = new Float64Array(8).fill(7);
  const parts = new Float64Array(COEFFICIENTS.flatMap(({ re, im }) => [re, im]));
  writeResidualProducts(SUMS, parts, { target, at: 1 });
  const expected = residualProducts(SUMS, COEFFICIENTS).flatMap(({ re, im }) => [re, im]);
  expect([...target]).toEqual([7, ...expected, 7]);
  expect(() => writeResidualProducts(SUMS, parts.subarray(2), { target, at: 0 })).toThrow(RangeError);
});

test('the squares of a regressor are on the diagonal', () => {
  for (const place of [0, 1, 2])
    expect(normalSquares(SUMS, place)).toBe(normalProduct(SUMS, place, place).re);
});
