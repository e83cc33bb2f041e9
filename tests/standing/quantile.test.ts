import { describe, expect, test } from 'vitest';
import {
  ascending,
  averageRanks,
  median,
  medianInPlace,
  quantileOfSome,
  quantileSorted,
  selectedInPlace,
} from '../../src/standing/quantile';
import { seededRandom } from '../protection/seeded-random';

describe('quantile of sorted values', () => {
  test('of none does not exist', () => {
    expect(quantileSorted([], 0.5)).toBeUndefined();
    expect(() => quantileOfSome([], 0.5)).toThrow(RangeError);
  });

  test('of one value is that value at every p', () => {
    expect([0, 0.3, 1].map((p) => quantileSorted([7], p))).toEqual([7, 7, 7]);
  });

  test('runs from the least to the greatest and is linear in between', () => {
    const sorted = [10, 20, 40];
    expect([0, 0.25, 0.5, 0.75, 1].map((p) => quantileSorted(sorted, p))).toEqual([10, 15, 20, 30, 40]);
  });

  test('of values that are not numbers is refused', () => {
    expect(() => quantileSorted([1, NaN], 0.5)).toThrow(RangeError);
    expect(() => quantileSorted([NaN], 0)).toThrow(RangeError);
  });

  test.each([-0.1, 1.1, NaN])('at %d is refused', (p) => {
    expect(() => quantileSorted([1, 2], p)).toThrow(RangeError);
  });
});

describe('median', () => {
  test('of none does not exist', () => {
    expect(median([])).toBeUndefined();
  });

  test('is the middle value, or the mean of the two in the middle', () => {
    expect(median([9, 1, 4])).toBe(4);
    expect(median([9, 1, 4, 5])).toBe(4.5);
  });

  test('sorts as numbers and leaves what it was given', () => {
    const values = [10, 9, -2];
    expect(median(values)).toBe(9);
    expect(values).toEqual([10, 9, -2]);
  });

  test('of values that are not numbers is refused', () => {
    expect(() => median([1, NaN, 3])).toThrow(RangeError);
  });
});

test('values are put in ascending order', () => {
  expect([...ascending([3, -1, 20])]).toEqual([-1, 3, 20]);
});

test('ranks count from 1, and equal values share the mean of theirs', () => {
  expect(averageRanks([30, 10, 20, 10])).toEqual([4, 1.5, 3, 1.5]);
  expect(averageRanks([7, 7, 7])).toEqual([2, 2, 2]);
  expect(averageRanks([])).toEqual([]);
});

test('a value that is not a number has no rank', () => {
  expect(() => averageRanks([1, NaN])).toThrow(RangeError);
});

describe('selection', () => {
  const random = seededRandom(3);
  const samples = Array.from({ length: 60 }, (_, size) =>
    // every other sample has many equal values
    Array.from({ length: size + 1 }, () => (size % 2 === 0 ? random() : Math.floor(5 * random()))),
  );

  test('finds the median that sorting finds', () => {
    for (const values of samples) expect(medianInPlace(new Float64Array(values))).toBe(median(values));
  });

  test('finds every rank, leaving what is less before it and what is greater behind it', () => {
    for (const values of samples) {
      ascending(values).forEach((expected, rank) => {
        const shuffled = new Float64Array(values);
        expect(selectedInPlace(shuffled, rank)).toBe(expected);
        expect(Math.max(...shuffled.subarray(0, rank + 1))).toBe(expected);
        expect(Math.min(...shuffled.subarray(rank))).toBe(expected);
      });
    }
  });

  test('has no median of no values and no rank that there is none of', () => {
    expect(() => medianInPlace(new Float64Array(0))).toThrow(RangeError);
    expect(selectedInPlace(new Float64Array([1, 2]), 2)).toBeUndefined();
    expect(selectedInPlace(new Float64Array([1, 2]), -1)).toBeUndefined();
  });
});
