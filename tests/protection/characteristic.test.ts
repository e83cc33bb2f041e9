import { describe, expect, test } from 'vitest';
import {
  characteristicPath,
  characteristicProblems,
  pickupAmps,
  restraintAmpsAtThreshold,
  thresholdAmps,
  utilisation,
} from '../../src/protection/characteristic';
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
const FLAT: TwoSlope = { ...FROM_ZERO, slope1: 0, slope2: 0 };

describe.each([FROM_ZERO, FROM_PICKUP, FLAT])(
  'threshold $slopeStart with slope $slope1',
  (characteristic) => {
    const restraints = Array.from({ length: 400 }, (_, index) => 12.5 * index);

    test('is the pickup at no restraint', () => {
      expect(thresholdAmps(characteristic, 0)).toBe(pickupAmps(characteristic));
    });

    test('never falls, and never rises more slowly than before', () => {
      const thresholds = restraints.map((restraint) => thresholdAmps(characteristic, restraint));
      const rises = thresholds.slice(1).map((threshold, index) => threshold - (thresholds[index] ?? NaN));
      rises.reduce((before, rise) => {
        expect(rise).toBeGreaterThanOrEqual(before - 1e-9);
        return rise;
      }, 0);
    });

    test('is continuous at the corner and at the knee', () => {
      for (const vertexAmps of [500, 2000]) {
        const below = thresholdAmps(characteristic, vertexAmps - 1e-9);
        expect(thresholdAmps(characteristic, vertexAmps)).toBeCloseTo(below, 6);
      }
    });

    test('is undone by its inverse wherever it rises', () => {
      for (const restraint of restraints) {
        const threshold = thresholdAmps(characteristic, restraint);
        const found = restraintAmpsAtThreshold(characteristic, threshold);
        if (found !== undefined) expect(found).toBeCloseTo(restraint, 8);
        else expect(threshold).toBe(pickupAmps(characteristic));
      }
    });

    test('is drawn as it is evaluated', () => {
      for (const restraintMax of [0, 300, 500, 1200, 2000, 9000]) {
        const path = characteristicPath(characteristic, restraintMax);
        expect(path.at(-1)?.restraintAmps).toBe(restraintMax);
        for (const point of path) {
          expect(point.thresholdAmps).toBe(thresholdAmps(characteristic, point.restraintAmps));
        }
      }
    });
  },
);

describe('threshold', () => {
  test.each([-1, NaN, Infinity])('of a restraint of %d A is refused', (restraint) => {
    expect(() => thresholdAmps(FROM_ZERO, restraint)).toThrow(RangeError);
  });
});

describe('restraint at a threshold', () => {
  test('is not known below the pickup', () => {
    expect(restraintAmpsAtThreshold(FROM_PICKUP, 149)).toBeUndefined();
    expect(restraintAmpsAtThreshold(FROM_PICKUP, NaN)).toBeUndefined();
  });

  test('is not known at the height of a flat piece, and is zero where the slope starts on the pickup', () => {
    expect(restraintAmpsAtThreshold(FROM_ZERO, 150)).toBeUndefined();
    expect(restraintAmpsAtThreshold(FROM_PICKUP, 150)).toBe(0);
  });

  test('is not known above a curve that never rises', () => {
    expect(restraintAmpsAtThreshold(FLAT, 151)).toBeUndefined();
  });
});

describe('path', () => {
  test('holds the vertices and the point at its end', () => {
    expect(characteristicPath(FROM_ZERO, 3000).map((point) => point.restraintAmps)).toEqual([
      0, 500, 2000, 3000,
    ]);
  });
});

describe('utilisation', () => {
  test('is the differential current over the threshold', () => {
    expect(utilisation(105, 150)).toBe(0.7);
  });

  test('is 1 exactly from the threshold on', () => {
    for (const threshold of [0.1, 0.3, 150, 428.57142857142856, 1999.9999]) {
      expect(utilisation(threshold, threshold)).toBe(1);
      expect(utilisation(threshold * (1 - Number.EPSILON), threshold)).toBeLessThan(1);
    }
  });

  test.each([
    [-1, 150],
    [NaN, 150],
    [Infinity, 150],
    [10, 0],
    [10, NaN],
  ])('of %d A against %d A is refused', (differential, threshold) => {
    expect(() => utilisation(differential, threshold)).toThrow(RangeError);
  });
});

describe('characteristic problems', () => {
  test('are those of its kind', () => {
    expect(characteristicProblems(FROM_ZERO)).toEqual([]);
    expect(characteristicProblems({ ...FROM_ZERO, pickupAmps: 0 })).toEqual([
      { field: 'pickupAmps', problem: 'The pickup must be a number of amperes above 0.' },
    ]);
  });
});
