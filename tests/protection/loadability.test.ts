import { describe, expect, test } from 'vitest';
import { CT_CLASSES } from '../../src/protection/ct-class';
import { isComputable } from '../../src/protection/evaluation';
import { classLimitModel, measuredModel } from '../../src/protection/line-model';
import type { LineModel } from '../../src/protection/line-model';
import { loadability } from '../../src/protection/loadability';
import type { Loadability } from '../../src/protection/loadability';
import { phasor } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';
import { adaptiveScheme, ALPHA_PLANE, PHASE_COMPARISON, TWO_SLOPE } from './schemes';

const LINE = { terminalCount: 2, voltageKv: 220, compensatedMillisiemens: 0 };
const PHASE_KV = 220 / Math.sqrt(3);
const RANGE = { frequencyHz: 50, lagRadLeast: -Math.PI / 6, lagRadMost: Math.PI / 6 };
const RATINGS = { ratingAmps: 800, emergencyRatingAmps: 1000 };

function modelOf(chargingAmps: number, mismatch: Phasor): LineModel {
  return measuredModel(LINE, {
    admittanceMillisiemens: phasor(0, chargingAmps / PHASE_KV),
    mismatches: [mismatch],
  });
}

function found(scheme: Scheme, model: LineModel): Loadability {
  const result = loadability({ scheme, model, range: RANGE }, RATINGS);
  if (!isComputable(result)) throw new Error(result.notComputable);
  return result;
}

describe('loadability', () => {
  test('of a ratio mismatch alone ends where it fills the pickup', () => {
    // D = 0.3·T against a pickup of 150 A, as long as the restraint stays below the slope's corner at 500 A.
    const { limitAmps } = found(TWO_SLOPE, modelOf(0, phasor(0.3, 0)));
    expect(limitAmps).toBeCloseTo(500, 5);
  });

  test('of charging alone has no end, and the least margin at no load', () => {
    const { limitAmps, atRating, path } = found(TWO_SLOPE, modelOf(90, phasor(0, 0)));
    expect(limitAmps).toBeUndefined();
    expect(path[0]?.utilisation).toBeCloseTo(90 / 150, 12);
    // Half of 90 A stands across 800 A at each end; a lag of 30° turns it towards the one end, away from the other.
    const ends =
      Math.hypot(800 * Math.cos(Math.PI / 6), 400 - 45) + Math.hypot(800 * Math.cos(Math.PI / 6), 400 + 45);
    expect(atRating.utilisation).toBeCloseTo(90 / (0.3 * (ends / 2)), 6);
  });

  test('takes the worst angle and the worst direction of power', () => {
    // Charging 60 A stands at 90°; a mismatch of 5 % of 800 A comes nearest to it at a lag of ±30°.
    const { atRating } = found(TWO_SLOPE, modelOf(60, phasor(0.05, 0)));
    const best = Math.hypot(40 * Math.cos(Math.PI / 6), 60 + 40 * Math.sin(Math.PI / 6));
    expect(atRating.differentialAmps).toBeCloseTo(best, -1);
    expect(Math.abs(Math.cos(atRating.lagRad))).toBeCloseTo(Math.cos(Math.PI / 6), 9);
  });

  test('finds the worst with power flowing back where that is worse', () => {
    // A mismatch the other way round works against the charging forwards at a lag, and with it backwards.
    const range = { ...RANGE, lagRadLeast: Math.PI / 9, lagRadMost: Math.PI / 6 };
    const result = loadability({ scheme: TWO_SLOPE, model: modelOf(60, phasor(-0.05, 0)), range }, RATINGS);
    if (!isComputable(result)) throw new Error(result.notComputable);
    expect(result.atRating.lagRad).toBeCloseTo(Math.PI / 6 + Math.PI, 9);
    expect(result.atRating.differentialAmps).toBeGreaterThan(60);
  });

  test('draws its path from no load to the emergency rating', () => {
    const { path, atEmergency } = found(TWO_SLOPE, modelOf(60, phasor(0.02, 0.01)));
    expect(path[0]?.throughAmps).toBe(0);
    expect(path.at(-1)).toEqual(atEmergency);
    const along = path.map(({ throughAmps }) => throughAmps);
    expect(along).toEqual(along.toSorted((one, other) => one - other));
  });

  test('takes the worst corner of class limits', () => {
    const model = classLimitModel(LINE, {
      susceptanceMillisiemens: 0,
      classes: [CT_CLASSES['5P'], CT_CLASSES['5P']],
    });
    const { atEmergency, basis } = found(TWO_SLOPE, model);
    expect(atEmergency.differentialAmps / 1000).toBeCloseTo(0.0402, 3);
    expect(basis).toBe('class limits');
  });

  test('is told for a scheme of every kind', () => {
    const model = modelOf(60, phasor(0.02, 0.3));
    for (const scheme of [adaptiveScheme(2), ALPHA_PLANE, PHASE_COMPARISON]) {
      expect(found(scheme, model).atRating.utilisation).toBeGreaterThan(0);
    }
    // An angle mismatch of E = j·tan 60° turns the first end's current by the tolerance of 60°.
    const turned = found(PHASE_COMPARISON, modelOf(0, phasor(0, Math.tan(Math.PI / 3))));
    expect(turned.atRating.utilisation).toBeCloseTo(1, 9);
    expect(turned.limitAmps).toBeCloseTo(200, 5);
  });

  test('is not computable where the scheme is not, with its reason', () => {
    const model = measuredModel(
      { ...LINE, terminalCount: 3 },
      { admittanceMillisiemens: phasor(0, 1), mismatches: [phasor(0, 0), phasor(0, 0)] },
    );
    expect(loadability({ scheme: PHASE_COMPARISON, model, range: RANGE }, RATINGS)).toEqual({
      notComputable: 'A phase comparison weighs two terminals’ currents; 3 are there.',
    });
  });
});
