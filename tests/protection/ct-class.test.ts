import { describe, expect, test } from 'vitest';
import { classBudget, CT_CLASSES, ctClassNamed, pairBudget } from '../../src/protection/ct-class';

describe('class of a designation', () => {
  test.each([
    ['5P20', '5P'],
    ['10P10', '10P'],
    [' 5pr 20 ', '5PR'],
    ['PX', 'PX'],
    ['TPY 15x7.5', 'TPY'],
    ['tpz', 'TPZ'],
    ['5P', '5P'],
  ])('%j is %s', (designation, name) => {
    expect(ctClassNamed(designation)).toBe(name);
  });

  test.each(['', '0.5S', '10PR20', 'PXR', '15P20', 'unknown'])('%j is none of these', (designation) => {
    expect(ctClassNamed(designation)).toBeUndefined();
  });
});

describe('class budget', () => {
  const { '5P': fiveP, '10P': tenP, PX: px, TPX: tpx, TPZ: tpz } = CT_CLASSES;

  test('of unequal ends does not depend on their order', () => {
    expect(pairBudget(fiveP, tpz).differentialRatio).toBeCloseTo(
      pairBudget(tpz, fiveP).differentialRatio,
      12,
    );
  });

  test('of two air-gapped cores has their common displacement cancel', () => {
    // ±1 % and ±18′: hypot(0.02, 2·18′)
    expect(pairBudget(tpz, tpz).differentialRatio).toBeCloseTo(Math.hypot(0.02, 36 / 3437.75), 4);
  });

  test('of one air-gapped core against another has it in full', () => {
    // 180′ + 18′ + 30′ apart, and 1 % + 0.5 %
    expect(pairBudget(tpz, tpx).differentialRatio).toBeCloseTo(Math.hypot(0.015, 228 / 3437.75), 3);
  });

  test('of a class without a limit for the displacement is that of the ratio, and says so', () => {
    expect(pairBudget(px, px)).toEqual({
      differentialRatio: expect.closeTo(0.005, 12),
      isDisplacementStated: false,
    });
    expect(pairBudget(fiveP, tenP).isDisplacementStated).toBe(false);
    expect(pairBudget(fiveP, fiveP).isDisplacementStated).toBe(true);
  });

  test('of many terminals is that of the worst pair', () => {
    expect(classBudget([tpx, fiveP, tpx, fiveP])).toEqual(pairBudget(fiveP, fiveP));
    expect(classBudget([tpx, tpx, tpx])).toEqual(pairBudget(tpx, tpx));
  });

  test('of one terminal is none', () => {
    expect(classBudget([fiveP])).toBeUndefined();
    expect(classBudget([])).toBeUndefined();
  });
});
