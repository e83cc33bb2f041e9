import { describe, expect, test } from 'vitest';
import {
  phaseComparisonProblems,
  phaseComparisonUtilisation,
  phaseDeviationRad,
} from '../../src/protection/phase-comparison';
import type { PhaseComparison } from '../../src/protection/phase-comparison';
import { phasor, phasorFromPolar } from '../../src/protection/phasor';

const SETTINGS: PhaseComparison = { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 200 };
const pair = (localAmps: number, remoteAmps: number, deviationDeg: number) => ({
  local: phasorFromPolar(localAmps, 0.4),
  remote: phasorFromPolar(remoteAmps, 0.4 + Math.PI + (deviationDeg * Math.PI) / 180),
});

describe('deviation from opposition', () => {
  test.each([0, 30, -30, 90, 179, 180])('of currents %d° off is that angle', (degrees) => {
    expect(phaseDeviationRad(pair(500, 40, degrees))).toBeCloseTo((Math.abs(degrees) * Math.PI) / 180, 12);
  });

  test('is not known where an end has no current', () => {
    expect(phaseDeviationRad({ local: phasor(0, 0), remote: phasor(5, 0) })).toBeUndefined();
    expect(phaseDeviationRad({ local: phasor(5, 0), remote: phasor(0, 0) })).toBeUndefined();
  });
});

describe('phase comparison utilisation', () => {
  test('is that of the angle while both ends are released', () => {
    expect(phaseComparisonUtilisation(SETTINGS, pair(900, 800, 30))).toBeCloseTo(0.5, 12);
    expect(phaseComparisonUtilisation(SETTINGS, pair(900, 800, -60))).toBeCloseTo(1, 12);
    expect(phaseComparisonUtilisation(SETTINGS, pair(900, 800, 180))).toBeCloseTo(3, 12);
  });

  test('is that of the weaker end while it is not released', () => {
    expect(phaseComparisonUtilisation(SETTINGS, pair(900, 100, 180))).toBeCloseTo(0.5, 12);
    expect(phaseComparisonUtilisation(SETTINGS, pair(100, 900, 180))).toBeCloseTo(0.5, 12);
  });

  test('is 0 when an end has no current, however strong the other', () => {
    const utilisation = phaseComparisonUtilisation(SETTINGS, { local: phasor(9e3, 0), remote: phasor(0, 0) });
    expect(utilisation).toBe(0);
  });
});

describe('phase comparison problems', () => {
  test('are none for usual settings', () => {
    expect(phaseComparisonProblems(SETTINGS)).toEqual([]);
    expect(phaseComparisonProblems({ ...SETTINGS, toleranceDeg: 180 })).toEqual([]);
  });

  test.each([
    { settings: { ...SETTINGS, toleranceDeg: 0 }, field: 'toleranceDeg' },
    { settings: { ...SETTINGS, toleranceDeg: 181 }, field: 'toleranceDeg' },
    { settings: { ...SETTINGS, releaseAmps: -1 }, field: 'releaseAmps' },
    { settings: { ...SETTINGS, releaseAmps: NaN }, field: 'releaseAmps' },
  ])('name $field alone for $settings', ({ settings, field }) => {
    expect(phaseComparisonProblems(settings).map((found) => found.field)).toEqual([field]);
  });
});
