import { describe, expect, test } from 'vitest';
import { tabularCusum } from '../../src/standing/cusum';

const PLAN = { target: 10, slack: 0.5, decision: 4 };

describe('CUSUM', () => {
  test('of no values has no sums and no crossing', () => {
    expect(tabularCusum([], PLAN)).toEqual({ high: [], low: [], crossing: undefined });
  });

  test('stays at zero within the slack', () => {
    const found = tabularCusum([10, 10.5, 9.5, 10.2], PLAN);
    expect(found).toEqual({ high: [0, 0, 0, 0], low: [0, 0, 0, 0], crossing: undefined });
  });

  test('names the first value at which a step up or down is found', () => {
    expect(tabularCusum([10, 10, 12, 12, 12, 12], PLAN).crossing).toEqual({ index: 4, side: 'high' });
    expect(tabularCusum([10, 10, 8, 8, 8, 8], PLAN).crossing).toEqual({ index: 4, side: 'low' });
  });

  test('exchanges its sides when the values are mirrored at the target', () => {
    const values = [10, 11, 12, 9, 8, 7.5, 10.5];
    const mirrored = tabularCusum(
      values.map((value) => 20 - value),
      PLAN,
    );
    expect(mirrored.high).toEqual(tabularCusum(values, PLAN).low);
    expect(mirrored.low).toEqual(tabularCusum(values, PLAN).high);
  });

  test('of values that are not numbers is refused', () => {
    expect(() => tabularCusum([10, NaN], PLAN)).toThrow(RangeError);
  });
});
