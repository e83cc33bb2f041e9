import { describe, expect, test } from 'vitest';
import { firstCrossing } from '../../src/protection/first-crossing';

const GRID = [0, 1, 2, 3, 4];

describe('first crossing', () => {
  test('is found between grid points', () => {
    expect(firstCrossing(GRID, (x) => x / Math.PI)).toBeCloseTo(Math.PI, 8);
    expect(firstCrossing(GRID, (x) => x ** 2 / 2)).toBeCloseTo(Math.SQRT2, 8);
  });

  test('is the first of several', () => {
    expect(firstCrossing(GRID, (x) => 1.2 * Math.abs(Math.sin((x * Math.PI) / 2)))).toBeCloseTo(
      (Math.asin(1 / 1.2) * 2) / Math.PI,
      8,
    );
  });

  test('is reached at the value that comes back', () => {
    const reaches = (x: number) => x / 1.234567;
    expect(reaches(firstCrossing(GRID, reaches)!)).toBeGreaterThanOrEqual(1);
  });

  test('is the first point where the value is reached from the start', () => {
    expect(firstCrossing(GRID, () => 5)).toBe(0);
  });

  test('is not known where the value is never reached, or is not a number', () => {
    expect(firstCrossing(GRID, (x) => x / 5)).toBeUndefined();
    expect(firstCrossing(GRID, () => NaN)).toBeUndefined();
    expect(firstCrossing([], () => 2)).toBeUndefined();
  });
});
