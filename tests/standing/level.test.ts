import { describe, expect, test } from 'vitest';
import { levelSummary, standingLevel24h } from '../../src/standing/level';

describe('level summary', () => {
  test('of no qualified snapshot does not exist', () => {
    expect(levelSummary([])).toBeUndefined();
  });

  test('of one snapshot is that snapshot throughout', () => {
    expect(levelSummary([9.1])).toEqual({
      leastAmps: 9.1,
      p05Amps: 9.1,
      medianAmps: 9.1,
      p95Amps: 9.1,
      greatestAmps: 9.1,
      count: 1,
    });
  });

  test('of 0 to 100 A in any order is the figures themselves', () => {
    const amps = Array.from({ length: 101 }, (_, index) => (index * 37) % 101);
    expect(levelSummary(amps)).toEqual({
      leastAmps: 0,
      p05Amps: 5,
      medianAmps: 50,
      p95Amps: 95,
      greatestAmps: 100,
      count: 101,
    });
  });

  test('of a level that is not a number is refused', () => {
    expect(() => levelSummary([1, NaN])).toThrow(RangeError);
  });
});

describe('standing level over 24 hours', () => {
  test('is the median of the hours', () => {
    expect(standingLevel24h([8, 30, 9, 10])).toBe(9.5);
  });

  test('is not known from fewer than three hours', () => {
    expect(standingLevel24h([])).toBeUndefined();
    expect(standingLevel24h([8, 9])).toBeUndefined();
    expect(standingLevel24h([8, 9, 10])).toBe(9);
  });
});
