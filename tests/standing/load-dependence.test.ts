import { describe, expect, test } from 'vitest';
import type { HourSums } from '../../src/standing/composition-step';
import { emptySums } from '../../src/standing/composition-sums';
import { loadDependence } from '../../src/standing/load-dependence';
import { addSums } from '../../src/standing/composition-sums';
import { withSteadyCurrent } from '../../src/standing/steady-current';
import { snapshotOf, sumsOf } from './made-up-phase';
import { hourSums } from './trials/line-sums';
import { measuredHours } from './trials/seeded-line';
import type { LineTruth } from './trials/seeded-line';

const LINE: LineTruth = {
  seed: 11,
  ratingAmps: 1000,
  voltageKv: 127,
  susceptanceMillisiemens: 0.4,
  mismatch: { re: 0.01, im: -0.005 },
  loadShare: 0.4,
  noiseShare: 0.0004,
};
const PLAN = { frequencyHz: 50 };

const hoursOf = (truth: LineTruth): HourSums[] =>
  Array.from(measuredHours(truth, 24 * 30), (each) => ({ hour: each.hour, sums: hourSums(each) }));

describe('a mismatch’s dependence on load', () => {
  test('is told with its size where a transformer’s error grows at small current', () => {
    const found = loadDependence(
      hoursOf({ ...LINE, smallCurrentError: 0.02, smallCurrentAt: 'second' }),
      PLAN,
    );
    if (found.kind !== 'told') throw new Error(found.kind);
    const expected = 0.02 * 100 * (1 / found.lightAmps - 1 / found.heavyAmps);
    expect(found).toMatchObject({ isSignificant: true, terminal: 1, days: 30 });
    expect(found.changeAtLightLoad.re / expected).toBeCloseTo(1, 0);
    expect(found.changeAtLightLoad.im / expected).toBeCloseTo(1, 0);
  });

  test('is not told of a line that has none, and its charging keeps the value of the composition', () => {
    const found = loadDependence(hoursOf(LINE), PLAN);
    if (found.kind !== 'told') throw new Error(found.kind);
    expect(found.isSignificant).toBe(false);
    const { low, value, high } = found.susceptanceEither;
    expect(low).toBeLessThanOrEqual(found.susceptanceMillisiemens.low);
    expect(high).toBeGreaterThanOrEqual(found.susceptanceMillisiemens.high);
    expect(value).toBeCloseTo(0.4, 2);
  });

  test('cannot be told without hours, without a voltage, and of a composition that is none', () => {
    const none = { kind: 'no composition' };
    expect(loadDependence([], PLAN)).toEqual(none);
    const empty = { hour: 0, sums: emptySums({ terminalCount: 2, hasVoltage: true }) };
    expect(loadDependence([empty], PLAN)).toEqual(none);
    const voltageless = hoursOf(LINE).map(({ hour }) => ({
      hour,
      sums: sumsOf([snapshotOf(STEADY, LOAD)], { hasVoltage: false }),
    }));
    expect(loadDependence(voltageless, PLAN)).toEqual(none);
    expect(loadDependence(hoursOf(LINE).slice(0, 100), PLAN)).toEqual(none);
    const steady = hoursOf(LINE).map(({ hour }) => ({ hour, sums: sumsOf([snapshotOf(STEADY, LOAD)]) }));
    expect(loadDependence(steady, PLAN)).toEqual(none);
  });
});

const STEADY = { susceptanceMillisiemens: 0.4, mismatches: [{ re: 0.01, im: 0 }] };
const LOAD = { voltageKv: 127, throughAmps: 300, lagRad: 0.2 };

test('sums with a steady current are those of a terminal more that carries it', () => {
  const loads = [200, 500].map((throughAmps) => ({ ...LOAD, throughAmps }));
  const plain = loads.map((load) => snapshotOf(STEADY, load));
  const widened = plain.map((snapshot) => {
    const { re, im } = snapshot.otherCurrentsAmps[0]!;
    const factor = 250 / Math.hypot(re, im);
    const steady = { re: re * factor, im: im * factor };
    return { ...snapshot, otherCurrentsAmps: [...snapshot.otherCurrentsAmps, steady] };
  });
  const found = plain.map((snapshot) =>
    withSteadyCurrent(sumsOf([snapshot]), { terminal: 1, steadyAmps: 250 }),
  );
  const total = addSums(found[0]!, found[1]!);
  sumsOf(widened).values.forEach((value, at) => expect(total.values[at]).toBeCloseTo(value, 6));
});
