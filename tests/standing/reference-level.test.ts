import { describe, expect, test } from 'vitest';
import { compositionFit } from '../../src/standing/composition-fit';
import { totalOf, emptySums } from '../../src/standing/composition-sums';
import { levelAtPointAmps, typicalPoint } from '../../src/standing/operating-point';
import { levelsAtReferenceLoad } from '../../src/standing/reference-level';
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
