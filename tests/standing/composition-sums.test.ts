import { describe, expect, test } from 'vitest';
import {
  addSnapshot,
  addSums,
  emptySums,
  normalProduct,
  packedSums,
  shapeOf,
  snapshotCount,
  subtractSums,
  sumsFromPacked,
  throughLoad,
  totalOf,
  voltagelessCount,
} from '../../src/standing/composition-sums';
import { dayOf, sumsOf, turned } from './made-up-phase';

const TRUTH = { susceptanceMillisiemens: 0.1, mismatches: [{ re: 0.01, im: -0.02 }] };
const SNAPSHOTS = [...dayOf(TRUTH, 0), ...dayOf(TRUTH, 1)];
const WHOLE = packedSums(sumsOf(SNAPSHOTS));

function expectClose(actual: readonly number[], expected: readonly number[]): void {
  expect(actual).toHaveLength(expected.length);
  actual.forEach((value, at) => {
    expect(Math.abs(value - expected[at]!)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(expected[at]!)));
  });
}

describe('composition sums', () => {
  test.each([0, 1, 7, 24, 47, 48])('add over a split after %i snapshots', (split) => {
    const parts = [SNAPSHOTS.slice(0, split), SNAPSHOTS.slice(split)].map((part) => sumsOf(part));
    expectClose(packedSums(addSums(parts[0]!, parts[1]!)), WHOLE);
    expectClose(packedSums(subtractSums(sumsOf(SNAPSHOTS), parts[0]!)), packedSums(parts[1]!));
  });

  test('of a window are the total of its hours', () => {
    expectClose(packedSums(totalOf(SNAPSHOTS.map((each) => sumsOf([each])))!), WHOLE);
    expect(totalOf([])).toBeUndefined();
  });

  test('stay the same when every phasor of a snapshot is turned', () => {
    expectClose(packedSums(sumsOf(SNAPSHOTS.map((each, index) => turned(each, index * 0.77)))), WHOLE);
  });

  test('come back from their packed numbers', () => {
    const back = sumsFromPacked(JSON.parse(JSON.stringify(WHOLE)) as number[]);
    expect(back && packedSums(back)).toEqual(WHOLE);
    expect(back && shapeOf(back)).toEqual({ terminalCount: 2, hasVoltage: true });
    expect(WHOLE).toHaveLength(18);
  });

  test.each([
    ['another version', [9, ...WHOLE.slice(1)]],
    ['a number missing', WHOLE.slice(0, -1)],
    ['a number that is not finite', [...WHOLE.slice(0, -1), NaN]],
    ['nothing', []],
  ])('do not come back from %s', (_, numbers) => {
    expect(sumsFromPacked(numbers)).toBeUndefined();
  });

  test('leave out a snapshot without voltage, and count it', () => {
    const sums = sumsOf(SNAPSHOTS);
    addSnapshot(sums, { ...SNAPSHOTS[0]!, voltageKv: undefined });
    expect(voltagelessCount(sums)).toBe(1);
    expect(snapshotCount(sums)).toBe(48);
    expectClose(packedSums(sums).slice(5), WHOLE.slice(5));
  });

  test('of a line without voltages take every snapshot', () => {
    const sums = sumsOf(
      SNAPSHOTS.map((each) => ({ ...each, voltageKv: undefined })),
      { hasVoltage: false },
    );
    expect(snapshotCount(sums)).toBe(48);
    expect(normalProduct(sums, 0, 0).re).toBeCloseTo(normalProduct(sumsOf(SNAPSHOTS), 1, 1).re, 6);
  });

  test('know the mean load and how much it varies', () => {
    expect(throughLoad(emptySums({ terminalCount: 2, hasVoltage: true }))).toBeUndefined();
    const load = throughLoad(sumsOf(SNAPSHOTS))!;
    expect(load.meanAmps).toBeCloseTo(300, 6);
    expect(load.variation).toBeCloseTo(150 / Math.SQRT2 / 300, 6);
  });

  test('refuse other shapes, other numbers of terminals and values that are not numbers', () => {
    const sums = emptySums({ terminalCount: 2, hasVoltage: true });
    expect(() => addSums(sums, emptySums({ terminalCount: 3, hasVoltage: true }))).toThrow(RangeError);
    expect(() => totalOf([sums, emptySums({ terminalCount: 2, hasVoltage: false })])).toThrow(RangeError);
    expect(() => addSnapshot(sums, { ...SNAPSHOTS[0]!, otherCurrentsAmps: [] })).toThrow(RangeError);
    expect(() => addSnapshot(sums, { ...SNAPSHOTS[0]!, throughAmps: NaN })).toThrow(RangeError);
    expect(() => emptySums({ terminalCount: 1, hasVoltage: true })).toThrow(RangeError);
  });
});
