import { describe, expect, test } from 'vitest';
import { alphaPlaneProblems, alphaPlaneUtilisation, alphaPoint } from '../../src/protection/alpha-plane';
import type { AlphaPlane } from '../../src/protection/alpha-plane';
import { phasor, phasorFromPolar } from '../../src/protection/phasor';

const SETTINGS: AlphaPlane = { kind: 'alpha-plane', pickupAmps: 100, radius: 6, angleDeg: 195 };
const RAD_PER_DEGREE = Math.PI / 180;

const at = (ratio: number, degrees: number) => ({ ratio, angleRad: degrees * RAD_PER_DEGREE });

describe('place in the alpha plane', () => {
  test('is the remote current over the local one', () => {
    const point = alphaPoint(SETTINGS, { local: phasor(0, 200), remote: phasorFromPolar(100, Math.PI / 6) });
    expect(point?.ratio).toBeCloseTo(0.5, 12);
    expect(point?.angleRad).toBeCloseTo(-Math.PI / 3, 12);
  });

  test('is not known with a current under 1 % of the pickup, at either end or both', () => {
    const [some, little] = [phasor(500, 0), phasor(0.99, 0)];
    expect(alphaPoint(SETTINGS, { local: some, remote: little })).toBeUndefined();
    expect(alphaPoint(SETTINGS, { local: little, remote: some })).toBeUndefined();
    expect(alphaPoint(SETTINGS, { local: phasor(0, 0), remote: phasor(0, 0) })).toBeUndefined();
    expect(alphaPoint(SETTINGS, { local: some, remote: phasor(1, 0) })).toBeDefined();
  });
});

describe('alpha plane utilisation', () => {
  test('is that of the pickup far outside the region', () => {
    expect(alphaPlaneUtilisation(SETTINGS, 80, at(1, 0))).toBe(0.8);
  });

  test('is that of the region far above the pickup: the nearer of radius and angle', () => {
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(Math.sqrt(6), 180))).toBeCloseTo(0.5, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(1 / Math.sqrt(6), -180))).toBeCloseTo(0.5, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(1, 180 - 39))).toBeCloseTo(0.4, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(1, -180 + 39))).toBeCloseTo(0.4, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(Math.sqrt(6), 180 - 39))).toBeCloseTo(0.5, 12);
  });

  test('is 1 on the border, from either side of 1', () => {
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(6, 180))).toBeCloseTo(1, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(1 / 6, 180))).toBeCloseTo(1, 12);
    expect(alphaPlaneUtilisation(SETTINGS, 1e6, at(1, 82.5))).toBeCloseTo(1, 12);
  });

  test('is that of the pickup, up to 1, where there is no ratio', () => {
    expect(alphaPlaneUtilisation(SETTINGS, 40, undefined)).toBe(0.4);
    expect(alphaPlaneUtilisation(SETTINGS, 4000, undefined)).toBe(1);
  });
});

describe('alpha plane problems', () => {
  test('are none for usual settings', () => {
    expect(alphaPlaneProblems(SETTINGS)).toEqual([]);
    expect(alphaPlaneProblems({ ...SETTINGS, angleDeg: 360 })).toEqual([]);
  });

  test.each([
    { settings: { ...SETTINGS, pickupAmps: -5 }, field: 'pickupAmps' },
    { settings: { ...SETTINGS, radius: 1 }, field: 'radius' },
    { settings: { ...SETTINGS, radius: Infinity }, field: 'radius' },
    { settings: { ...SETTINGS, angleDeg: 0 }, field: 'angleDeg' },
    { settings: { ...SETTINGS, angleDeg: 361 }, field: 'angleDeg' },
    { settings: { ...SETTINGS, angleDeg: NaN }, field: 'angleDeg' },
  ])('name $field alone for $settings', ({ settings, field }) => {
    expect(alphaPlaneProblems(settings).map((found) => found.field)).toEqual([field]);
  });

  test('come all at once', () => {
    const broken: AlphaPlane = { kind: 'alpha-plane', pickupAmps: 0, radius: 0.5, angleDeg: -1 };
    expect(alphaPlaneProblems(broken)).toHaveLength(3);
  });
});
