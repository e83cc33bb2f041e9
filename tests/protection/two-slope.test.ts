import { describe, expect, test } from 'vitest';
import { twoSlopePolyline, twoSlopeProblems } from '../../src/protection/two-slope';
import type { TwoSlope } from '../../src/protection/two-slope';

const FROM_ZERO: TwoSlope = {
  kind: 'two-slope',
  pickupAmps: 150,
  slope1: 0.3,
  kneeAmps: 2000,
  slope2: 0.7,
  slopeStart: 'from-zero',
};
const FROM_PICKUP: TwoSlope = { ...FROM_ZERO, slopeStart: 'from-pickup' };

function fieldsWithProblems(settings: TwoSlope): string[] {
  return twoSlopeProblems(settings).map((problem) => problem.field);
}

describe('two-slope polyline', () => {
  test('from zero has a corner where the first slope leaves the pickup', () => {
    expect(twoSlopePolyline(FROM_ZERO)).toEqual({
      vertices: [
        { restraintAmps: 0, thresholdAmps: 150 },
        { restraintAmps: 500, thresholdAmps: 150 },
        { restraintAmps: 2000, thresholdAmps: 600 },
      ],
      finalSlope: 0.7,
    });
  });

  test('from the pickup rises at once', () => {
    expect(twoSlopePolyline(FROM_PICKUP)).toEqual({
      vertices: [
        { restraintAmps: 0, thresholdAmps: 150 },
        { restraintAmps: 2000, thresholdAmps: 750 },
      ],
      finalSlope: 0.7,
    });
  });

  test('has one point where corner and knee coincide', () => {
    expect(twoSlopePolyline({ ...FROM_ZERO, kneeAmps: 500 }).vertices).toHaveLength(2);
  });

  test('stays flat up to the knee for a first slope of zero', () => {
    expect(twoSlopePolyline({ ...FROM_ZERO, slope1: 0 }).vertices).toEqual([
      { restraintAmps: 0, thresholdAmps: 150 },
      { restraintAmps: 2000, thresholdAmps: 150 },
    ]);
  });

  test('has the second slope alone for a knee at zero', () => {
    const alone = { vertices: [{ restraintAmps: 0, thresholdAmps: 150 }], finalSlope: 0.7 };
    expect(twoSlopePolyline({ ...FROM_PICKUP, kneeAmps: 0 })).toEqual(alone);
  });
});

describe('two-slope problems', () => {
  test.each([FROM_ZERO, FROM_PICKUP])('are none for usual settings ($slopeStart)', (settings) => {
    expect(twoSlopeProblems(settings)).toEqual([]);
  });

  test('are none for a knee exactly at the corner, whatever a division rounds to', () => {
    for (let hundredths = 1; hundredths <= 100; hundredths++) {
      const slope1 = hundredths / 100;
      const kneeAmps = 150 / slope1;
      const settings = { ...FROM_ZERO, slope1, slope2: 1, kneeAmps, pickupAmps: slope1 * kneeAmps };
      expect(twoSlopeProblems(settings)).toEqual([]);
    }
  });

  test.each([
    { field: 'pickupAmps', settings: { ...FROM_ZERO, pickupAmps: 0 } },
    { field: 'pickupAmps', settings: { ...FROM_ZERO, pickupAmps: NaN } },
    { field: 'pickupAmps', settings: { ...FROM_PICKUP, pickupAmps: Infinity } },
    { field: 'slope1', settings: { ...FROM_PICKUP, slope1: -0.1 } },
    { field: 'slope1', settings: { ...FROM_PICKUP, slope1: NaN } },
    { field: 'slope2', settings: { ...FROM_ZERO, slope2: 30 } },
    { field: 'slope2', settings: { ...FROM_ZERO, slope2: 0.2 } },
    { field: 'kneeAmps', settings: { ...FROM_ZERO, kneeAmps: 499 } },
    { field: 'kneeAmps', settings: { ...FROM_PICKUP, kneeAmps: -1 } },
    { field: 'kneeAmps', settings: { ...FROM_PICKUP, kneeAmps: NaN } },
  ])('name $field alone for $settings', ({ field, settings }) => {
    expect(fieldsWithProblems(settings)).toEqual([field]);
  });

  test('come all at once', () => {
    const settings = { ...FROM_ZERO, pickupAmps: -1, slope1: NaN, kneeAmps: -1, slope2: 3 };
    expect(fieldsWithProblems(settings)).toEqual(['pickupAmps', 'slope1', 'kneeAmps', 'slope2']);
  });

  test('say where the knee may lie, with a figure that is itself allowed', () => {
    const settings = { ...FROM_ZERO, slope1: 0.35, kneeAmps: 400 };
    expect(twoSlopeProblems(settings)).toEqual([
      {
        field: 'kneeAmps',
        problem: 'The knee must be at or beyond 428.6 A, where the first slope leaves the pickup.',
      },
    ]);
    expect(twoSlopeProblems({ ...settings, kneeAmps: 428.6 })).toEqual([]);
  });
});
