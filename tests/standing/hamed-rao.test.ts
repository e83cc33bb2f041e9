import { describe, expect, test } from 'vitest';
import { hamedRao } from '../../src/standing/hamed-rao';
import { mannKendall } from '../../src/standing/mann-kendall';
import type { SeriesPoint } from '../../src/standing/sen-slope';
import { seededRandom } from '../protection/seeded-random';

/** Noise in which every value keeps `memory` of the one before. */
function noise(count: number, memory: number): SeriesPoint[] {
  const random = seededRandom(11);
  let value = 0;
  return Array.from({ length: count }, (_, time) => {
    value = memory * value + random() - 0.5;
    return { time, value };
  });
}

describe('Hamed and Rao’s correction', () => {
  test('widens the variance where neighbours resemble each other', () => {
    const series = noise(60, 0.9);
    const corrected = hamedRao(series);
    expect(corrected?.varianceRatio).toBeGreaterThan(1.5);
    expect(corrected?.pTwoSided).toBeGreaterThan(
      mannKendall(series.map((point) => point.value))?.pTwoSided ?? NaN,
    );
  });

  test('keeps S and scales its variance', () => {
    const series = noise(40, 0.7);
    const plain = mannKendall(series.map((point) => point.value));
    const corrected = hamedRao(series);
    expect(corrected?.s).toBe(plain?.s);
    expect(corrected?.varianceS).toBeCloseTo(
      (plain?.varianceS ?? NaN) * (corrected?.varianceRatio ?? NaN),
      8,
    );
  });

  test('leaves an exactly straight line alone, though its residue is all rounding', () => {
    const line = Array.from({ length: 30 }, (_, index) => ({
      time: 20_465 + index,
      value: 40 + 0.1 * index,
    }));
    expect(hamedRao(line)?.varianceRatio).toBe(1);
  });

  test('finds no trend in values that never change, at zero or elsewhere', () => {
    for (const value of [0, 8]) {
      const flat = Array.from({ length: 12 }, (_, time) => ({ time, value }));
      expect(hamedRao(flat)).toMatchObject({ varianceRatio: 1, z: 0, pTwoSided: 1 });
    }
  });

  test('stays when all times are shifted', () => {
    const series = noise(40, 0.7);
    const later = series.map(({ time, value }) => ({ time: time + 20_000, value }));
    expect(hamedRao(later)?.varianceRatio).toBeCloseTo(hamedRao(series)?.varianceRatio ?? NaN, 10);
  });

  test('does not exist where alternation leaves no variance, and for fewer than three points', () => {
    const alternating = [5, 2, 9, 2, 3, 3, 5, 2, 9, 3].map((value, time) => ({ time, value }));
    expect(hamedRao(alternating)).toBeUndefined();
    expect(hamedRao(noise(2, 0))).toBeUndefined();
    expect(hamedRao([])).toBeUndefined();
  });
});
