import { describe, expect, test } from 'vitest';
import { detrended, senSlope, senSlopeValue } from '../../src/standing/sen-slope';
import type { SeriesPoint } from '../../src/standing/sen-slope';
import { seededRandom } from '../protection/seeded-random';

const random = seededRandom(5);
const SERIES: readonly SeriesPoint[] = Array.from({ length: 30 }, (_, index) => ({
  time: index + (index > 12 ? 4 : 0),
  value: 12 + 0.3 * index + 5 * random(),
}));
const found = senSlope(SERIES);

function mapped(change: (point: SeriesPoint) => SeriesPoint) {
  return senSlope(SERIES.map(change));
}

describe('Sen slope', () => {
  test('of fewer than two points does not exist', () => {
    expect(senSlope([])).toBeUndefined();
    expect(senSlope([{ time: 1, value: 1 }])).toBeUndefined();
  });

  test('of two points is the line through them, without limits', () => {
    const ends = [
      { time: 10, value: 4 },
      { time: 14, value: 2 },
    ];
    expect(senSlope(ends)).toEqual({ slope: -0.5, intercept: 9, limits: undefined, pairs: 1 });
  });

  test('of a straight line with gaps is that line', () => {
    const line = senSlope([0, 1, 2, 7, 8, 20, 21].map((time) => ({ time, value: 3 + 0.25 * time })));
    expect(line).toEqual({ slope: 0.25, intercept: 3, limits: { low: 0.25, high: 0.25 }, pairs: 21 });
  });

  test('stays when all values or all times are shifted', () => {
    const lifted = mapped(({ time, value }) => ({ time, value: value + 64 }));
    const later = mapped(({ time, value }) => ({ time: time + 20_000, value }));
    expect(lifted?.slope).toBeCloseTo(found?.slope ?? NaN, 12);
    expect(later?.slope).toBeCloseTo(found?.slope ?? NaN, 12);
    expect(lifted?.intercept).toBeCloseTo((found?.intercept ?? NaN) + 64, 10);
  });

  test('scales with the values and against the times', () => {
    const scaled = mapped(({ time, value }) => ({ time: 4 * time, value: 2 * value }));
    expect(scaled?.slope).toBeCloseTo((found?.slope ?? NaN) / 2, 12);
    expect(scaled?.limits?.low).toBeCloseTo((found?.limits?.low ?? NaN) / 2, 12);
  });

  test('changes sign when the values do, and its limits change places', () => {
    const negated = mapped(({ time, value }) => ({ time, value: -value }));
    expect(negated?.slope).toBeCloseTo(-(found?.slope ?? NaN), 12);
    expect(negated?.limits?.low).toBeCloseTo(-(found?.limits?.high ?? NaN), 12);
  });

  test('is hardly moved by one wild value', () => {
    const spiked = mapped((point) => (point === SERIES[20] ? { ...point, value: 1e6 } : point));
    expect(Math.abs((spiked?.slope ?? NaN) - (found?.slope ?? NaN))).toBeLessThan(0.05);
  });

  test('lies within its limits, and those widen with confidence', () => {
    const wide = senSlope(SERIES, { confidence: 0.99 })?.limits;
    const usual = found?.limits;
    expect(wide?.low).toBeLessThan(usual?.low ?? NaN);
    expect(usual?.low).toBeLessThan(found?.slope ?? NaN);
    expect(found?.slope).toBeLessThan(usual?.high ?? NaN);
    expect(usual?.high).toBeLessThan(wide?.high ?? NaN);
  });

  test('has as many values above its line as below', () => {
    const { slope, intercept } = found ?? { slope: NaN, intercept: NaN };
    const residuals = detrended(SERIES, slope).map((value) => value - intercept);
    expect(residuals.filter((residual) => residual > 0)).toHaveLength(15);
    expect(residuals.filter((residual) => residual < 0)).toHaveLength(15);
  });

  test('is refused for a value that is not a number, and for times that do not ascend', () => {
    expect(() => mapped(({ time }) => ({ time, value: NaN }))).toThrow(RangeError);
    expect(() => mapped(({ value }) => ({ time: 1, value }))).toThrow(RangeError);
    expect(() => mapped(({ value }) => ({ time: NaN, value }))).toThrow(RangeError);
  });

  test('can be had by itself', () => {
    expect(senSlopeValue(SERIES)).toBe(found?.slope);
    expect(senSlopeValue(SERIES.slice(0, 1))).toBeUndefined();
    expect(() => senSlopeValue([...SERIES].reverse())).toThrow(RangeError);
    expect(() => senSlopeValue([{ time: 0, value: NaN }])).toThrow(RangeError);
  });
});
