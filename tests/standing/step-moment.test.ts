import { describe, expect, test } from 'vitest';
import { residueSeries, stepMoment } from '../../src/standing/step-moment';
import { dayOf, sumsOf } from './made-up-phase';
import { uniform } from './trials/seeded-line';

const series = (count: number, valueAt: (at: number) => number) =>
  Array.from({ length: count }, (_, at) => ({ at, value: { re: valueAt(at), im: 0 } }));

describe('the moment of a step', () => {
  test('is the first window after it, through noise a quarter of its size', () => {
    const random = uniform(7);
    const noisy = series(420, (at) => (at >= 263 ? 1 : 0) + 0.25 * (2 * random() - 1));
    expect(stepMoment(noisy)).toBe(263);
  });

  test('is not told of noise alone, nor of too few windows', () => {
    const random = uniform(11);
    expect(stepMoment(series(420, () => random()))).toBeUndefined();
    expect(stepMoment(series(12, (at) => (at >= 6 ? 1 : 0)))).toBeUndefined();
    expect(stepMoment([])).toBeUndefined();
  });

  test('counts windows by their own place where some are missing', () => {
    const gaps = series(200, (at) => (at >= 120 ? 1 : 0)).filter(({ at }) => at < 60 || at > 90);
    expect(stepMoment(gaps)).toBe(120);
  });
});

describe('what a composition leaves over', () => {
  const truth = { susceptanceMillisiemens: 0.05, mismatches: [{ re: 0.01, im: 0 }] };
  const before = [0, 1, 2, 3].map((day) => sumsOf(dayOf(truth, day)));

  test('is nothing before a step, and the step after it', () => {
    const moved = { ...truth, mismatches: [{ re: 0.03, im: 0.01 }] };
    const windows = [
      { at: 1, sums: sumsOf(dayOf(truth, 5)) },
      { at: 2, sums: sumsOf(dayOf(moved, 6)) },
    ];
    const [same, other] = residueSeries(windows, before);
    expect(same!.value.re).toBeCloseTo(0, 6);
    expect(other!.value.re).toBeCloseTo(0.02, 2);
    expect(other!.value.im).toBeCloseTo(0.01, 2);
  });

  test('is not told with nothing before', () => {
    expect(residueSeries([{ at: 1, sums: before[0]! }], [])).toEqual([]);
  });
});
