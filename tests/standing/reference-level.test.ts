import { describe, expect, test } from 'vitest';
import { compositionFit } from '../../src/standing/composition-fit';
import { totalOf, emptySums } from '../../src/standing/composition-sums';
import { levelAtPointAmps, typicalPoint } from '../../src/standing/operating-point';
import { levelsAtReferenceLoad, loadAdjustedLevels } from '../../src/standing/reference-level';
import { dayOf, sumsOf } from './made-up-phase';

const TRUTH = { susceptanceMillisiemens: 0.15, mismatches: [{ re: 0.02, im: 0.01 }] };

describe('levels at reference load', () => {
  const days = Array.from({ length: 40 }, (_, day) => ({
    day,
    sums: sumsOf(dayOf(TRUTH, day, { meanAmps: 200 + 5 * day, swingAmps: 100 })),
  }));
  const total = totalOf(days.map(({ sums }) => sums))!;
  const fit = compositionFit(total)!;
  const point = typicalPoint(total)!;

  test('stay where they are while the load doubles', () => {
    for (const { levelAmps } of levelsAtReferenceLoad(days, fit, point)) {
      expect(levelAmps).toBeCloseTo(levelAtPointAmps(fit, point), 4);
    }
  });

  test('move with a mismatch that moves', () => {
    const moved = { ...TRUTH, mismatches: [{ re: 0.03, im: 0.01 }] };
    const sums = sumsOf(dayOf(moved, 3));
    const [level] = levelsAtReferenceLoad([{ day: 99, sums }], fit, point);
    const expected = levelAtPointAmps(compositionFit(sums)!, point);
    expect(level!.levelAmps).toBeCloseTo(expected, 1);
    expect(Math.abs(expected - levelAtPointAmps(fit, point))).toBeGreaterThan(1);
  });

  test('leave out days without snapshots', () => {
    const none = { day: 7, sums: emptySums({ terminalCount: 2, hasVoltage: true }) };
    expect(levelsAtReferenceLoad([none], fit, point)).toEqual([]);
  });
});

describe('levels adjusted for load without a composition', () => {
  const hours = Array.from({ length: 24 * 30 }, (_, hour) => {
    const throughAmps = 200 + 3 * (hour / 24) + 80 * Math.sin(hour / 3.9);
    return { hour: hour + 480_000, throughAmps, levelAmps: 2 + 0.015 * throughAmps };
  });

  test('stay where they are while the load grows', () => {
    const found = loadAdjustedLevels(hours, 250)!;
    expect(found.loadSlope).toBeCloseTo(0.015, 6);
    expect(found.levels).toHaveLength(30);
    for (const { levelAmps } of found.levels) expect(levelAmps).toBeCloseTo(2 + 0.015 * 250, 6);
  });

  test('do not exist where the load never changes', () => {
    expect(loadAdjustedLevels(hours.map((each) => ({ ...each, throughAmps: 200 })))).toBeUndefined();
    expect(loadAdjustedLevels([])).toBeUndefined();
  });
});
