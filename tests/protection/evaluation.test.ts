import { describe, expect, test } from 'vitest';
import { evaluationFromReported, throughAmps } from '../../src/protection/evaluation';
import type { Evaluated } from '../../src/protection/evaluation';
import { phasor, rotate, scale } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';
import { evaluated } from './evaluated';
import { seededCurrents } from './seeded-currents';

const CHARACTERISTIC = {
  kind: 'two-slope',
  pickupAmps: 150,
  slope1: 0.3,
  kneeAmps: 2000,
  slope2: 0.7,
  slopeStart: 'from-zero',
} as const;
const HALF_SUM: Scheme = {
  characteristic: CHARACTERISTIC,
  restraint: { kind: 'scaled-sum', factor: 0.5 },
};
const MAXIMUM: Scheme = { characteristic: CHARACTERISTIC, restraint: { kind: 'maximum' } };

const magnitudes = ({ differentialAmps, restraintAmps }: Evaluated) => ({
  differentialAmps,
  restraintAmps: restraintAmps!,
});

function expectSamePoint(actual: Evaluated, expected: Evaluated): void {
  expect(actual.differentialAmps).toBeCloseTo(expected.differentialAmps, 8);
  expect(actual.restraintAmps).toBeCloseTo(expected.restraintAmps!, 8);
  expect(actual.thresholdAmps).toBeCloseTo(expected.thresholdAmps!, 8);
  expect(actual.utilisation).toBeCloseTo(expected.utilisation, 10);
}

describe.each([HALF_SUM, MAXIMUM])('operating point with $restraint.kind restraint', (scheme) => {
  const cases = seededCurrents(40);
  const pointOf = (currents: readonly Phasor[]) => evaluated(scheme, currents);

  test('stays when every phasor is rotated', () => {
    for (const currents of cases) {
      const rotated = currents.map((current) => rotate(current, 1.234));
      expectSamePoint(pointOf(rotated), pointOf(currents));
    }
  });

  test('stays when the terminals change places', () => {
    for (const currents of cases) expectSamePoint(pointOf(currents.toReversed()), pointOf(currents));
  });

  test('stays when both currents of a line reverse', () => {
    for (const currents of cases) {
      expectSamePoint(pointOf(currents.map((current) => scale(current, -1))), pointOf(currents));
    }
  });

  test('scales both currents with the terminals’ currents', () => {
    for (const currents of cases) {
      const doubled = pointOf(currents.map((current) => scale(current, 2)));
      expect(doubled.differentialAmps).toBeCloseTo(2 * pointOf(currents).differentialAmps, 8);
      expect(doubled.restraintAmps).toBeCloseTo(2 * pointOf(currents).restraintAmps!, 8);
    }
  });

  test('stays when a terminal without current is added', () => {
    for (const currents of cases) expectSamePoint(pointOf([...currents, phasor(0, 0)]), pointOf(currents));
  });

  test('never has more differential current than the sum of magnitudes', () => {
    for (const currents of cases) {
      expect(pointOf(currents).differentialAmps).toBeLessThanOrEqual(2 * throughAmps(currents) + 1e-9);
    }
  });

  test('is the same from phasors and from the magnitudes they yield', () => {
    for (const currents of cases) {
      const point = pointOf(currents);
      expect(evaluationFromReported(scheme, magnitudes(point))).toEqual(point);
    }
  });

  test('is refused without terminals and with a current that is not a number', () => {
    expect(() => pointOf([])).toThrow(RangeError);
    expect(() => pointOf([phasor(NaN, 0), phasor(1, 0)])).toThrow(RangeError);
    expect(() => pointOf([phasor(1, 0), phasor(NaN, 0)])).toThrow(RangeError);
    expect(() => pointOf([phasor(Infinity, 0), phasor(1, 0)])).toThrow(RangeError);
  });
});

describe('operating point', () => {
  test('of a balanced load has no differential current', () => {
    expect(evaluated(HALF_SUM, [phasor(400, 0), phasor(-400, 0)])).toEqual({
      differentialAmps: 0,
      restraintAmps: 400,
      thresholdAmps: 150,
      utilisation: 0,
      region: undefined,
    });
  });

  test('of a three-terminal line takes all three currents', () => {
    const point = evaluated(HALF_SUM, [phasor(1000, 0), phasor(-600, 0), phasor(-340, 0)]);
    expect(point).toEqual({
      differentialAmps: 60,
      restraintAmps: 970,
      thresholdAmps: expect.closeTo(291, 10),
      utilisation: expect.closeTo(60 / 291, 10),
      region: undefined,
    });
  });

  test('of reported magnitudes is refused when one is negative', () => {
    expect(() => evaluationFromReported(HALF_SUM, { differentialAmps: -1, restraintAmps: 5 })).toThrow();
    expect(() => evaluationFromReported(HALF_SUM, { differentialAmps: 1, restraintAmps: -5 })).toThrow();
  });
});

describe('through current', () => {
  test('of two terminals is the mean of both ends', () => {
    expect(throughAmps([phasor(400, 0), phasor(0, -410)])).toBe(405);
  });

  test('of three terminals is what enters the zone, when nothing is lost in it', () => {
    expect(throughAmps([phasor(1000, 0), phasor(-600, 0), phasor(-400, 0)])).toBe(1000);
  });

  test('of no terminals is refused', () => {
    expect(() => throughAmps([])).toThrow(RangeError);
  });
});
