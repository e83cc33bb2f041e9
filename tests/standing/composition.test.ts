import { describe, expect, test } from 'vitest';
import {
  againstBudget,
  chargingAgainstExpected,
  chargingInMismatch,
  composition,
} from '../../src/standing/composition';
import type { SeparatedComposition } from '../../src/standing/composition';
import { emptySums } from '../../src/standing/composition-sums';
import type { CompositionSums } from '../../src/standing/composition-sums';
import { dayOf, snapshotOf, sumsOf, turned } from './made-up-phase';
import type { PhaseTruth } from './made-up-phase';

const PLAN = { frequencyHz: 50 };
const TRUTH: PhaseTruth = {
  susceptanceMillisiemens: 0.15,
  conductanceMillisiemens: 0.004,
  mismatches: [{ re: 0.05, im: -0.03 }],
};
const days = (truth: PhaseTruth, count: number): CompositionSums[] =>
  Array.from({ length: count }, (_, day) => sumsOf(dayOf(truth, day)));

function separatedOf(sums: readonly CompositionSums[]): SeparatedComposition {
  const found = composition(sums, PLAN);
  if (found.kind !== 'separated') throw new Error(JSON.stringify(found.reason));
  return found;
}

function refusedOf(sums: readonly CompositionSums[]) {
  const found = composition(sums, PLAN);
  if (found.kind === 'separated') throw new Error('This window can’t be told apart.');
  return found;
}

describe('the composition of a phase without noise', () => {
  const found = separatedOf(days(TRUTH, 10));
  const mismatch = found.mismatches[0]!;

  test('is what was put in', () => {
    expect(found.susceptanceMillisiemens?.value).toBeCloseTo(0.15, 9);
    expect(found.conductanceMillisiemens?.value).toBeCloseTo(0.004, 9);
    expect(mismatch.ratio.value).toBeCloseTo(0.05, 9);
    expect(mismatch.angleRad.value).toBeCloseTo(-0.03, 9);
    expect(found.residualRmsAmps).toBeLessThan(1e-4);
    expect(found).toMatchObject({ days: 10, count: 240 });
  });

  test('gives e and not E, which would be off by e²', () => {
    expect(found.coefficients[1]!.re - 0.05).toBeLessThan(-0.001);
  });

  test('gives the angle as a time error and as an asymmetry of the channel', () => {
    expect(mismatch.timeErrorMs.value).toBeCloseTo((-0.03 / (2 * Math.PI * 50)) * 1000, 6);
    expect(mismatch.asymmetryMs.value).toBeCloseTo(2 * mismatch.timeErrorMs.value, 9);
  });

  test('stays the same when every phasor is turned', () => {
    const turnedDays = Array.from({ length: 10 }, (_, day) =>
      sumsOf(dayOf(TRUTH, day).map((each, hour) => turned(each, 0.3 * day + hour))),
    );
    expect(separatedOf(turnedDays).mismatches[0]!.ratio.value).toBeCloseTo(mismatch.ratio.value, 10);
  });

  test('keeps its coefficients when every phasor grows by the same factor, and its residue grows', () => {
    const grown = Array.from({ length: 10 }, (_, day) =>
      sumsOf(dayOf(TRUTH, day).map((each) => turned(each, 0, 3))),
    );
    const again = separatedOf(grown);
    expect(again.susceptanceMillisiemens?.value).toBeCloseTo(0.15, 9);
    expect(again.condition / found.condition).toBeCloseTo(1, 6);
  });

  test('holds measured against expected charging', () => {
    const charging = chargingAgainstExpected(found, 0.12)!;
    expect(charging.measuredAmps.value / charging.expectedAmps).toBeCloseTo(0.15 / 0.12, 6);
    expect(charging.expectedAmps).toBeCloseTo(0.12 * 63.5, 1);
  });
});

test('the composition of a line with three terminals tells the two others apart', () => {
  const truth = {
    susceptanceMillisiemens: 0.1,
    mismatches: [
      { re: 0.01, im: 0.004 },
      { re: -0.02, im: 0.01 },
    ],
  };
  const found = separatedOf(days(truth, 8));
  expect(found.susceptanceMillisiemens?.value).toBeCloseTo(0.1, 8);
  expect(found.mismatches.map(({ terminal }) => terminal)).toEqual([1, 2]);
  expect(found.mismatches[0]!.ratio.value).toBeCloseTo(0.01, 8);
  expect(found.mismatches[1]!.angleRad.value).toBeCloseTo(0.01, 8);
});

test('without voltages the charging is in the mismatch, and how much of it can be said', () => {
  const sums = Array.from({ length: 8 }, (_, day) => sumsOf(dayOf(TRUTH, day), { hasVoltage: false }));
  const found = separatedOf(sums);
  expect(found.susceptanceMillisiemens).toBeUndefined();
  expect(chargingAgainstExpected(found, 0.15)).toBeUndefined();
  const most = chargingInMismatch(0.15 * 63.5, 320)!;
  const { ratio, angleRad } = found.mismatches[0]!;
  expect(Math.hypot(ratio.value - 0.05, angleRad.value + 0.03)).toBeLessThan(1.1 * most);
});

describe('a window that can’t be told apart says why', () => {
  test('without snapshots', () => {
    expect(refusedOf([]).reason).toEqual({ kind: 'no snapshots' });
    expect(refusedOf([emptySums({ terminalCount: 2, hasVoltage: true })]).lumped).toBeUndefined();
  });

  test('without a single valid voltage', () => {
    const voltageless = Array.from({ length: 8 }, (_, day) =>
      sumsOf(dayOf(TRUTH, day).map((each) => ({ ...each, voltageKv: undefined }))),
    );
    expect(refusedOf(voltageless).reason).toEqual({ kind: 'no voltage', snapshots: 8 * 24 });
  });

  test('with too few days, and days without snapshots do not count', () => {
    const sums = [...days(TRUTH, 6), emptySums({ terminalCount: 2, hasVoltage: true })];
    expect(refusedOf(sums).reason).toEqual({ kind: 'too few days', days: 6, daysNeeded: 7 });
  });

  test('with too few snapshots', () => {
    const sums = [sumsOf([snapshotOf(TRUTH, { voltageKv: 63, throughAmps: 200, lagRad: 0.1 })])];
    expect(refusedOf(sums).reason).toMatchObject({ kind: 'too few snapshots', snapshots: 1 });
  });

  test('with a constant load, and gives all causes together', () => {
    const constant = Array.from({ length: 8 }, (_, day) =>
      sumsOf(
        Array.from({ length: 24 }, (_, hour) =>
          snapshotOf(TRUTH, {
            voltageKv: 63.5 + 0.05 * Math.sin(hour),
            throughAmps: 300 + Math.cos(hour * 2.2),
            lagRad: 0.2,
            turnRad: hour + day,
          }),
        ),
      ),
    );
    const found = refusedOf(constant);
    expect(found.reason).toMatchObject({ kind: 'constant load' });
    expect(found.lumped && Math.hypot(found.lumped.re, found.lumped.im)).toBeGreaterThan(0.03);
  });

  test('with a load that goes along with the voltage', () => {
    const along = Array.from({ length: 8 }, (_, day) =>
      sumsOf(
        Array.from({ length: 24 }, (_, hour) => {
          const share = 1 + 0.3 * Math.sin(hour / 4 + day);
          return snapshotOf(TRUTH, { voltageKv: 63.5 * share, throughAmps: 300 * share, lagRad: 0.2 });
        }),
      ),
    );
    expect(refusedOf(along).reason).toMatchObject({ kind: 'voltage and load proportional', terminal: 1 });
  });

  test('with a terminal that carries nothing', () => {
    const truth = { susceptanceMillisiemens: 0.1, mismatches: [TRUTH.mismatches[0]!, { re: -1, im: 0 }] };
    expect(refusedOf(days(truth, 8)).reason).toEqual({ kind: 'idle terminal', terminal: 2 });
  });

  test('with two terminals loaded alike', () => {
    const truth = { susceptanceMillisiemens: 0.1, mismatches: [TRUTH.mismatches[0]!, { re: 0.01, im: 0 }] };
    const alike = Array.from({ length: 8 }, (_, day) => sumsOf(dayOf(truth, day, { shareSwing: 0 })));
    expect(refusedOf(alike).reason).toMatchObject({ kind: 'terminals proportional', terminals: [1, 2] });
  });
});

test('an estimate is within its budget, beyond it, or reaches across', () => {
  expect(againstBudget({ value: 0, low: -0.01, high: 0.01 }, 0.02)).toBe('within');
  expect(againstBudget({ value: -0.03, low: -0.04, high: -0.025 }, 0.02)).toBe('beyond');
  expect(againstBudget({ value: 0.02, low: 0.01, high: 0.03 }, 0.02)).toBe('undecided');
});
