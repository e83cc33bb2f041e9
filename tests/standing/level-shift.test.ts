import { describe, expect, test } from 'vitest';
import { levelShift } from '../../src/standing/level-shift';
import { mannWhitney } from '../../src/standing/mann-whitney';
import { uniform } from './trials/seeded-line';

/** Daily levels around 20 A whose noise keeps `rho` of itself from one day to the next. */
function levels(seed: number, { days, rho, shift }: { days: number; rho: number; shift: number }): number[] {
  const random = uniform(seed);
  const normal = () => Math.sqrt(-2 * Math.log(random() + 1e-12)) * Math.cos(2 * Math.PI * random());
  let noise = normal();
  return Array.from({ length: days }, () => {
    noise = rho * noise + Math.sqrt(1 - rho * rho) * normal();
    return 20 + shift + noise;
  });
}

const CASES = 500;

/** How often the 95 % interval holds the shift, over pairs of windows. */
function coverage(rho: number, [m, n]: readonly [number, number]): { widened: number; plain: number } {
  let [widened, plain] = [0, 0];
  for (let seed = 1; seed <= CASES; seed++) {
    const shift = (seed % 5) - 2;
    const before = levels(seed * 31, { days: m, rho, shift: 0 });
    const after = levels(seed * 31 + 7, { days: n, rho, shift });
    const holds = (found: ReturnType<typeof mannWhitney>) =>
      found?.limits !== undefined && found.limits.low <= shift && shift <= found.limits.high;
    if (holds(levelShift(before, after))) widened++;
    if (holds(mannWhitney(before, after))) plain++;
  }
  return { widened: widened / CASES, plain: plain / CASES };
}

describe('the shift between two windows of daily levels', () => {
  test('lies in its 95 % interval about as often as that says, with days that are like their neighbours', () => {
    const table = [
      [0, [60, 40]],
      [0.3, [60, 40]],
      [0.6, [60, 40]],
      [0.6, [180, 30]],
      [0.8, [180, 90]],
    ] as const;
    const rows = table.map(([rho, days]) => ({ rho, days: days.join(' and '), ...coverage(rho, days) }));
    console.table(rows);
    for (const { rho, widened, plain } of rows) {
      expect(widened).toBeGreaterThanOrEqual(0.88);
      expect(widened).toBeLessThan(1);
      // taken as independent they would claim far too much
      if (rho >= 0.6) expect(plain).toBeLessThan(0.75);
    }
  });

  test('is that of Mann–Whitney where the days are independent', () => {
    // alternating days: no correlation that would widen anything
    const before = [10, 12, 10.5, 11.5, 10.2, 11.8, 10.7, 11.2];
    const after = before.map((level) => level + 3.01);
    const found = levelShift(before, after)!;
    expect(found.shift).toBeCloseTo(3.01, 9);
    expect(found).toEqual(mannWhitney(before, after));
  });

  test('is not told without levels on a side', () => {
    expect(levelShift([], [1, 2])).toBeUndefined();
    expect(levelShift([1, 2], [])).toBeUndefined();
    expect(levelShift([1], [2])!.limits).toBeUndefined();
  });
});
