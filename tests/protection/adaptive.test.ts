import { describe, expect, test } from 'vitest';
import { adaptivePolyline, adaptiveProblems, errorSumAmps } from '../../src/protection/adaptive';
import type { Adaptive } from '../../src/protection/adaptive';
import {
  characteristicPath,
  restraintAmpsAtThreshold,
  thresholdAmps,
} from '../../src/protection/characteristic';
import { phasor } from '../../src/protection/phasor';

const SETTINGS: Adaptive = {
  kind: 'adaptive',
  pickupAmps: 100,
  ctErrors: [
    { terminal: 'east', errorBelow: 0.02, errorAbove: 0.1, limitAmps: 1000 },
    { terminal: 'west', errorBelow: 0.03, errorAbove: 0.15, limitAmps: 500 },
  ],
  timeErrorMs: 0,
};

describe('error sum', () => {
  test('is the pickup when no current flows', () => {
    expect(errorSumAmps(SETTINGS, [phasor(0, 0), phasor(0, 0)], 50)).toBe(100);
  });

  test('adds each terminal’s own error of its own current', () => {
    expect(errorSumAmps(SETTINGS, [phasor(300, 400), phasor(-400, 0)], 50)).toBeCloseTo(100 + 10 + 12, 10);
  });

  test('takes the greater error above a terminal’s limit current, and the lesser at it', () => {
    expect(errorSumAmps(SETTINGS, [phasor(1000, 0), phasor(-500, 0)], 50)).toBeCloseTo(100 + 20 + 15, 10);
    expect(errorSumAmps(SETTINGS, [phasor(1001, 0), phasor(-501, 0)], 50)).toBeCloseTo(
      100 + 100.1 + 75.15,
      10,
    );
  });

  test('adds the chord of the time error’s angle', () => {
    // 1 ms is 18° at 50 Hz: a chord of 0.31287, as printed for an asymmetry of 2 ms.
    const late = { ...SETTINGS, timeErrorMs: 1 };
    const added = errorSumAmps(late, [phasor(400, 0), phasor(-400, 0)], 50) - 120;
    expect(added).toBeCloseTo(800 * 0.31287, 2);
    expect(errorSumAmps(late, [phasor(400, 0), phasor(-400, 0)], 60) - 120).toBeCloseTo(800 * 0.37476, 2);
  });

  test('is refused for currents that do not pair with the terminals, and without a frequency', () => {
    expect(() => errorSumAmps(SETTINGS, [phasor(1, 0)], 50)).toThrow(RangeError);
    expect(() => errorSumAmps(SETTINGS, [phasor(1, 0), phasor(1, 0)], 0)).toThrow(RangeError);
  });
});

// Practice: one slope of 45° for the adaptive restraint.
describe('adaptive threshold', () => {
  test('is the restraint itself', () => {
    for (const restraint of [100, 150, 4000]) {
      expect(thresholdAmps(SETTINGS, restraint)).toBe(restraint);
      if (restraint > 100) expect(restraintAmpsAtThreshold(SETTINGS, restraint)).toBe(restraint);
    }
  });

  test('is drawn as 45° from the pickup on', () => {
    expect(adaptivePolyline(SETTINGS).finalSlope).toBe(1);
    expect(characteristicPath(SETTINGS, 500)).toEqual([
      { restraintAmps: 0, thresholdAmps: 100 },
      { restraintAmps: 100, thresholdAmps: 100 },
      { restraintAmps: 500, thresholdAmps: 500 },
    ]);
  });
});

describe('adaptive problems', () => {
  const [east, west] = SETTINGS.ctErrors;
  const fields = (settings: Adaptive) => adaptiveProblems(settings).map(({ field }) => field);

  test('are none for usual settings', () => {
    expect(adaptiveProblems(SETTINGS)).toEqual([]);
  });

  test.each([
    { settings: { ...SETTINGS, pickupAmps: -1 }, field: 'pickupAmps' },
    { settings: { ...SETTINGS, ctErrors: [] }, field: 'ctErrors' },
    {
      settings: { ...SETTINGS, ctErrors: [{ ...east!, errorBelow: -0.01 }] },
      field: 'ctErrors.0.errorBelow',
    },
    {
      settings: { ...SETTINGS, ctErrors: [east!, { ...west!, errorAbove: 10 }] },
      field: 'ctErrors.1.errorAbove',
    },
    { settings: { ...SETTINGS, ctErrors: [{ ...east!, limitAmps: 0 }] }, field: 'ctErrors.0.limitAmps' },
    { settings: { ...SETTINGS, ctErrors: [east!, east!] }, field: 'ctErrors.1.terminal' },
    { settings: { ...SETTINGS, timeErrorMs: 20 }, field: 'timeErrorMs' },
    { settings: { ...SETTINGS, timeErrorMs: NaN }, field: 'timeErrorMs' },
  ])('name $field alone', ({ settings, field }) => {
    expect(fields(settings)).toEqual([field]);
  });

  test('come all at once', () => {
    const broken = { terminal: 'east', errorBelow: NaN, errorAbove: -1, limitAmps: NaN };
    expect(fields({ ...SETTINGS, pickupAmps: 0, ctErrors: [broken], timeErrorMs: -1 })).toEqual([
      'pickupAmps',
      'ctErrors.0.errorBelow',
      'ctErrors.0.errorAbove',
      'ctErrors.0.limitAmps',
      'timeErrorMs',
    ]);
  });
});
