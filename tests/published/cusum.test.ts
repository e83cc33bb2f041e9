import { describe, expect, test } from 'vitest';
import { tabularCusum } from '../../src/standing/cusum';

describe('Montgomery and Runger, Applied Statistics and Probability for Engineers, example 16-6', () => {
  const concentrations = [
    102.0, 94.8, 98.3, 98.4, 102.0, 98.5, 99.0, 97.7, 100.0, 98.1, 101.3, 98.7, 101.1, 98.4, 97.0, 96.7,
    100.3, 101.4, 97.2, 101.0,
  ];
  const found = tabularCusum(concentrations, { target: 99, slack: 1, decision: 10 });
  const toTenths = (sums: readonly number[]) => sums.map((sum) => Math.round(10 * sum) / 10);

  test('the high side is as printed', () => {
    expect(toTenths(found.high)).toEqual([
      2.0, 0, 0, 0, 2.0, 0.5, 0, 0, 0, 0, 1.3, 0, 1.1, 0, 0, 0, 0.3, 1.7, 0, 1.0,
    ]);
  });

  test('the low side is as printed', () => {
    expect(toTenths(found.low)).toEqual([
      0, 3.2, 2.9, 2.5, 0, 0, 0, 0.3, 0, 0, 0, 0, 0, 0, 1.0, 2.3, 0, 0, 0.8, 0,
    ]);
  });

  test('neither side ever crosses its limit', () => {
    expect(found.crossing).toBeUndefined();
  });
});
