import { describe, expect, test } from 'vitest';
import { throughAmps } from '../../src/protection/evaluation';
import { phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';
import { evaluated } from '../protection/evaluated';
import { expectFigure, printed } from './tolerance';

/** One slope all along, on half the sum of both ends' magnitudes: the scheme of the textbooks. */
function singleSlope(slope: number, pickupAmps: number): Scheme {
  return {
    characteristic: {
      kind: 'two-slope',
      pickupAmps,
      slope1: slope,
      kneeAmps: (2 * pickupAmps) / slope,
      slope2: slope,
      slopeStart: 'from-zero',
    },
    restraint: { kind: 'scaled-sum', factor: 0.5 },
  };
}

/** Current in at one end and out at the other, in secondary amperes of transformers 400/5. */
function throughSecondary(inPrimaryAmps: number, outPrimaryAmps: number) {
  return [phasor(inPrimaryAmps / 80, 0), phasor(-outPrimaryAmps / 80, 0)];
}

describe('Chakrabarti, Soni, Gupta, Bhatnagar, A Textbook on Power System Engineering, part III, example 8.4', () => {
  const currents = throughSecondary(360, 300);
  const point = evaluated(singleSlope(0.12, 0.15), currents);

  test('360 A in and 300 A out differ by 18.18 % of their mean', () => {
    expectFigure((100 * point.differentialAmps) / throughAmps(currents), printed('18.18'));
  });

  test('a slope of 12 % with pickup 0.15 A operates', () => {
    expect(point.utilisation).toBeGreaterThanOrEqual(1);
  });
});

describe('Mason, The Art and Science of Protective Relaying, 1956, chapter 3 (from memory)', () => {
  // The chapter's pickup is not recalled; 0.1 A keeps it out of the way of the slope.
  const point = evaluated(singleSlope(0.1, 0.1), throughSecondary(320, 304));

  test('320 A in and 304 A out leave 0.20 A against 0.39 A', () => {
    expectFigure(point.differentialAmps, printed('0.20'));
    expectFigure(point.thresholdAmps, printed('0.39'));
  });

  test('a slope of 10 % restrains', () => {
    expect(point.utilisation).toBeLessThan(1);
  });
});

// A slope k on the half sum leaves, in the plane of both ends' currents, the band between two lines through zero.
describe('Glover, Sarma, Overbye, Power System Analysis and Design (from memory)', () => {
  test.each([
    { slope: 0.2, ratio: '1.22222' },
    { slope: 0.4, ratio: '1.5' },
  ])('slope $slope is bounded by the lines of ratio $ratio', ({ slope, ratio }) => {
    const utilisationAt = (entering: number) =>
      evaluated(singleSlope(slope, 1e-6), [phasor(entering, 0), phasor(-1, 0)]).utilisation;
    const { value, tolerance } = printed(ratio);
    expect(utilisationAt(value - tolerance)).toBeLessThan(1);
    expect(utilisationAt(value + tolerance)).toBeGreaterThan(1);
    expect(utilisationAt(1 / (value - tolerance))).toBeLessThan(1);
    expect(utilisationAt(1 / (value + tolerance))).toBeGreaterThan(1);
  });
});
