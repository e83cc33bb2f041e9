import { describe, expect, test } from 'vitest';
import { firstOrder, varianceRatioOfAr1 } from '../../src/standing/autocorrelation';
import { mannWhitney } from '../../src/standing/mann-whitney';
import { seededRandom } from '../protection/seeded-random';

const random = seededRandom(3);
const BEFORE = Array.from({ length: 18 }, () => 10 + random());
const AFTER = Array.from({ length: 22 }, () => 10.4 + random());
const found = mannWhitney(BEFORE, AFTER)!;

describe('the Mann–Whitney test', () => {
  test('finds the shift, and what was put in lies within its limits', () => {
    expect(found.pTwoSided).toBeLessThan(0.01);
    expect(found.shift).toBeGreaterThan(0);
    expect(found.limits!.low).toBeLessThan(0.4);
    expect(found.limits!.high).toBeGreaterThan(0.4);
  });

  test('turns its sign when before and after change places', () => {
    const back = mannWhitney(AFTER, BEFORE)!;
    expect(back.pTwoSided).toBeCloseTo(found.pTwoSided, 12);
    expect(back.shift).toBeCloseTo(-found.shift, 12);
    expect(back.limits!.low).toBeCloseTo(-found.limits!.high, 12);
    expect(back.u + found.u).toBe(18 * 22);
  });

  test('scales with the unit and does not see a common level', () => {
    const scaled = mannWhitney(
      BEFORE.map((value) => 7 * value + 3),
      AFTER.map((value) => 7 * value + 3),
    )!;
    expect(scaled.pTwoSided).toBe(found.pTwoSided);
    expect(scaled.shift).toBeCloseTo(7 * found.shift, 9);
  });

  test('is nearly the same by the exact count and by the normal approximation', () => {
    const normal = mannWhitney(BEFORE, AFTER, { varianceRatio: 1.000001 })!;
    expect([found.method, normal.method]).toEqual(['exact', 'normal']);
    expect(Math.abs(normal.pTwoSided - found.pTwoSided)).toBeLessThan(0.002);
  });

  test('is less sure of values that resemble their neighbours', () => {
    const cautious = mannWhitney(BEFORE, AFTER, { varianceRatio: 4 })!;
    expect(cautious.pTwoSided).toBeGreaterThan(found.pTwoSided);
    expect(cautious.limits!.low).toBeLessThan(found.limits!.low);
    expect(cautious.shift).toBe(found.shift);
  });

  test('of equal values finds nothing, of too few has no limits, of none does not exist', () => {
    expect(mannWhitney([5, 5, 5], [5, 5, 5])).toMatchObject({ pTwoSided: 1, shift: 0 });
    expect(mannWhitney([1], [2])).toMatchObject({ pTwoSided: 1, shift: 1, limits: undefined });
    expect(mannWhitney([], [1])).toBeUndefined();
    expect(() => mannWhitney([NaN], [1])).toThrow(RangeError);
  });
});

describe('first-order autocorrelation', () => {
  test('is found in a series that has it', () => {
    let value = 0;
    const remembering = Array.from({ length: 4000 }, () => (value = 0.7 * value + random() - 0.5));
    expect(firstOrder(remembering)!.rho).toBeCloseTo(0.7, 1);
    expect(Math.abs(firstOrder(Array.from({ length: 4000 }, random))!.rho)).toBeLessThan(0.05);
  });

  test('can’t be told from few values or from equal ones', () => {
    expect(firstOrder([1, 2, 3, 4, 5])).toBeUndefined();
    expect(firstOrder([2, 2, 2, 2, 2, 2, 2])).toBeUndefined();
  });

  test('multiplies the variance by nearly (1 + ρ)/(1 − ρ), and never makes it less', () => {
    expect(varianceRatioOfAr1(0.5, 10_000)).toBeCloseTo(3, 2);
    expect(varianceRatioOfAr1(0, 100)).toBe(1);
    expect(varianceRatioOfAr1(-0.5, 100)).toBe(1);
  });
});
