import { expect, test } from 'vitest';
import { pOfZero } from '../../src/standing/hotelling';

/** Replicates around `value` with a jackknife covariance of the unit matrix. */
const replicates = (count: number) => {
  const size = Math.sqrt((2 * count) / (count - 1) / count);
  return Array.from({ length: count }, (_, index) => {
    const angle = (2 * Math.PI * index) / count;
    return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
  });
};

/** Upper points of F with 2 and ν degrees: Abramowitz and Stegun, "Handbook of Mathematical Functions", table 26.9. */
test.each([
  { degrees: 7, f: 4.737, p: 0.05 },
  { degrees: 7, f: 9.547, p: 0.01 },
  { degrees: 10, f: 4.103, p: 0.05 },
  { degrees: 30, f: 5.39, p: 0.01 },
])('with $degrees degrees a T² of 2·F·(n − 1)/(n − 2) has the p of F', ({ degrees, f, p }) => {
  const n = degrees + 2;
  const tSquared = (2 * f * (n - 1)) / (n - 2);
  const angle = 0.7;
  const value = { re: Math.sqrt(tSquared) * Math.cos(angle), im: Math.sqrt(tSquared) * Math.sin(angle) };
  expect(pOfZero(value, replicates(n))).toBeCloseTo(p, 4);
});

test('a value of 0 has p 1, and replicates too few or in a line tell nothing', () => {
  expect(pOfZero({ re: 0, im: 0 }, replicates(9))).toBeCloseTo(1, 12);
  expect(pOfZero({ re: 1, im: 0 }, replicates(3))).toBeUndefined();
  expect(
    pOfZero(
      { re: 1, im: 0 },
      replicates(9).map(({ re }) => ({ re, im: 2 * re })),
    ),
  ).toBeUndefined();
});
