import { describe, expect, test } from 'vitest';
import { minus, modulus, plus, quotient } from '../../src/standing/complex';
import { compositionFit } from '../../src/standing/composition-fit';
import { emptySums } from '../../src/standing/composition-sums';
import {
  atLoad,
  compositionPolygon,
  levelAtPointAmps,
  meanResidueAmps,
  partsAt,
  predictedDifferentialAmps,
  strongestTerminal,
  twoTerminalPoint,
  typicalPoint,
} from '../../src/standing/operating-point';
import { dayOf, polar, snapshotOf, sumsOf } from './made-up-phase';

const TRUTH = {
  susceptanceMillisiemens: 0.15,
  conductanceMillisiemens: 0.01,
  mismatches: [{ re: 0.02, im: 0.01 }],
};
const SUMS = sumsOf([...dayOf(TRUTH, 0), ...dayOf(TRUTH, 4)]);
const FIT = compositionFit(SUMS)!;

describe('a composition at an operating point', () => {
  const load = { voltageKv: 64, throughAmps: 500, lagRad: 0.4 };
  const point = twoTerminalPoint({ voltageKv: 64, throughAmps: 500, powerFactorAngleRad: 0.4 });

  test('predicts the differential that the line has there', () => {
    const measured = snapshotOf(TRUTH, load);
    const there = { voltageKv: measured.voltageKv, otherCurrentsAmps: measured.otherCurrentsAmps };
    expect(modulus(minus(predictedDifferentialAmps(FIT, there), measured.differentialAmps))).toBeLessThan(
      1e-6,
    );
    expect(levelAtPointAmps(FIT, there)).toBeCloseTo(modulus(measured.differentialAmps), 6);
    // the point takes the through current for the second terminal's, which charging and mismatch change a little
    expect(levelAtPointAmps(FIT, point)).toBeCloseTo(modulus(measured.differentialAmps), 0);
  });

  test('divides into parts that add up to it', () => {
    const { chargingAmps, leakageAmps, ratioAmps, angleAmps } = partsAt(FIT, point);
    const total = plus(chargingAmps, leakageAmps, ratioAmps, angleAmps);
    expect(modulus(minus(total, predictedDifferentialAmps(FIT, point)))).toBeLessThan(1e-9);
    expect(chargingAmps.re).toBeCloseTo(0, 9);
    expect(chargingAmps.im).toBeCloseTo(0.15 * 64, 6);
    expect(modulus(ratioAmps)).toBeCloseTo(2 * modulus(angleAmps), 6);
  });

  test('has the mismatch in proportion to the load and the charging not', () => {
    const twice = partsAt(FIT, atLoad(point, 2));
    const once = partsAt(FIT, point);
    expect(modulus(twice.ratioAmps)).toBeCloseTo(2 * modulus(once.ratioAmps), 9);
    expect(modulus(twice.chargingAmps)).toBeCloseTo(modulus(once.chargingAmps), 9);
  });

  test('needs the voltage that its coefficients belong to', () => {
    expect(() => predictedDifferentialAmps(FIT, { ...point, voltageKv: undefined })).toThrow(RangeError);
    expect(() => predictedDifferentialAmps(FIT, { ...point, otherCurrentsAmps: [] })).toThrow(RangeError);
  });
});

describe('the polygon of a window', () => {
  test('closes', () => {
    const polygon = compositionPolygon(SUMS, FIT)!;
    const { chargingAmps, leakageAmps, ratioAmps, angleAmps, restAmps, differentialAmps } = polygon;
    const end = plus(chargingAmps, leakageAmps, ratioAmps, angleAmps, restAmps);
    expect(modulus(minus(end, differentialAmps))).toBeLessThan(1e-9);
    expect(modulus(restAmps)).toBeLessThan(1e-6);
    expect(polygon.restRmsAmps).toBeLessThan(1e-4);
  });

  test('of one snapshot ends at its differential against the first terminal’s current', () => {
    const snapshot = snapshotOf(TRUTH, { voltageKv: 63, throughAmps: 410, lagRad: 0.3, turnRad: 2 });
    const polygon = compositionPolygon(sumsOf([snapshot]), FIT, { referenceTerminal: 0 })!;
    const first = minus(snapshot.differentialAmps, snapshot.otherCurrentsAmps[0]!);
    const expected = quotient(snapshot.differentialAmps, first);
    const found = quotient(polygon.differentialAmps, { re: modulus(first), im: 0 });
    expect(modulus(minus(found, expected))).toBeLessThan(1e-9);
  });

  test('has what the coefficients do not know as its rest', () => {
    const moved = { ...TRUTH, mismatches: [{ re: 0.03, im: 0.01 }] };
    const polygon = compositionPolygon(sumsOf(dayOf(moved, 2)), FIT)!;
    expect(modulus(polygon.restAmps) / 320).toBeCloseTo(0.01, 3);
    expect(polygon.restRmsAmps).toBeGreaterThan(2);
  });

  test('does not exist without snapshots', () => {
    const none = emptySums({ terminalCount: 2, hasVoltage: true });
    expect(compositionPolygon(none, FIT)).toBeUndefined();
    expect(typicalPoint(none)).toBeUndefined();
    expect(meanResidueAmps(none, FIT.coefficients)).toBeUndefined();
  });
});

describe('the typical point', () => {
  test('has rms currents at their mean angle against the reference', () => {
    const snapshots = [0, 1, 2].map((turnRad) =>
      snapshotOf(TRUTH, { voltageKv: 63, throughAmps: 410, lagRad: 0.3, turnRad }),
    );
    const point = typicalPoint(sumsOf(snapshots), { referenceTerminal: 0 })!;
    expect(modulus(minus(point.voltageKv!, polar(63, 0.3)))).toBeLessThan(1e-6);
    expect(modulus(point.otherCurrentsAmps[0]!)).toBeCloseTo(modulus(snapshots[0]!.otherCurrentsAmps[0]!), 6);
  });

  test('goes by a terminal that the line has', () => {
    expect(() => typicalPoint(SUMS, { referenceTerminal: 2 })).toThrow(RangeError);
    expect(strongestTerminal(SUMS)).toBe(0);
  });
});
