import { describe, expect, test } from 'vitest';
import { mannKendall } from '../../src/standing/mann-kendall';
import { seededRandom } from '../protection/seeded-random';

const random = seededRandom(3);
const WITH_TIES = Array.from({ length: 25 }, () => Math.round(8 * random()));

describe('Mann–Kendall', () => {
  test('of fewer than two values does not exist', () => {
    expect(mannKendall([])).toBeUndefined();
    expect(mannKendall([1])).toBeUndefined();
  });

  test('of values that are not numbers is refused', () => {
    expect(() => mannKendall([1, NaN, 3])).toThrow(RangeError);
    expect(() => mannKendall([NaN])).toThrow(RangeError);
  });

  test('of values that never change finds no trend', () => {
    expect(mannKendall([5, 5, 5, 5])).toEqual({ count: 4, s: 0, varianceS: 0, z: 0, pTwoSided: 1 });
  });

  test('of values that always rise counts every pair', () => {
    expect(mannKendall([1, 2, 3, 4, 5])?.s).toBe(10);
  });

  test('changes sign, and nothing else, when time runs backwards', () => {
    const forward = mannKendall(WITH_TIES);
    const backward = mannKendall(WITH_TIES.toReversed());
    expect(backward?.s).toBe(-(forward?.s ?? NaN));
    expect(backward?.z).toBe(-(forward?.z ?? NaN));
    expect(backward?.varianceS).toBe(forward?.varianceS);
    expect(backward?.pTwoSided).toBe(forward?.pTwoSided);
  });

  test('depends on the order of the values alone, not on their size', () => {
    expect(mannKendall(WITH_TIES.map((value) => Math.exp(value) - 7))).toEqual(mannKendall(WITH_TIES));
  });

  test('has less variance with ties than without', () => {
    const untied = WITH_TIES.map((value, index) => value + index / 1000);
    expect(mannKendall(WITH_TIES)?.varianceS).toBeLessThan(mannKendall(untied)?.varianceS ?? NaN);
  });
});
