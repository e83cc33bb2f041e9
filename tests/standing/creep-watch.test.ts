import { describe, expect, test } from 'vitest';
import type { DailyLevel } from '../../src/standing/creep';
import { levelsSinceMark, surestRise, watchedCreep } from '../../src/standing/creep-watch';
import type { WatchedCreep } from '../../src/standing/creep-watch';
import { FIRST_DAY, seededLevels } from './seeded-levels';

const PLAN = { pickupAmps: 100, nearRatio: 0.7, horizonDays: 365, markDays: [] };
const flat = (days: number, seed: number): DailyLevel[] =>
  seededLevels(days, { slopeAmpsPerDay: 0, noiseAmps: 1, seed });

function slopeOf({ verdict }: WatchedCreep): number {
  if (verdict.kind === 'too few days') throw new Error('These are enough days.');
  return verdict.slopeAmpsPerDay;
}

describe('watched creep', () => {
  test('finds a drift that began last month after a settled year', () => {
    const levels = flat(330, 3).map((each, index) => ({
      ...each,
      levelAmps: each.levelAmps + 0.15 * Math.max(0, index - 295),
    }));
    const found = watchedCreep(levels, PLAN);
    expect(found.verdict.kind).toBe('creep');
    expect(found.fromDay).toBeGreaterThan(FIRST_DAY + 200);
    expect(found.toDay).toBe(FIRST_DAY + 329);
    expect(found.markDay).toBeUndefined();
  });

  test('does not take a known step for a drift', () => {
    const levels = flat(80, 5).map((each, index) => ({
      ...each,
      levelAmps: each.levelAmps + (index > 40 ? 15 : 0),
    }));
    const unknown = watchedCreep(levels, PLAN);
    const known = watchedCreep(levels, { ...PLAN, markDays: [FIRST_DAY + 40] });
    expect(slopeOf(unknown)).toBeGreaterThan(0.2);
    expect(Math.abs(slopeOf(known))).toBeLessThan(0.05);
    expect(known.verdict.kind).toBe('no trend');
    expect(known).toMatchObject({ markDay: FIRST_DAY + 40, fromDay: FIRST_DAY + 41 });
  });

  test('says that there are too few days since a step', () => {
    const found = watchedCreep(flat(80, 5), { ...PLAN, markDays: [FIRST_DAY + 74] });
    expect(found.verdict).toMatchObject({ kind: 'too few days', days: 5 });
    expect(found.markDay).toBe(FIRST_DAY + 74);
  });

  test('shows a significant drift within its margin, which is no creep', () => {
    const levels = seededLevels(120, { slopeAmpsPerDay: 0.03, noiseAmps: 0.5, seed: 9 });
    expect(watchedCreep(levels, PLAN).verdict.kind).toBe('within margin');
  });

  test('of no levels has nothing to say', () => {
    expect(watchedCreep([], PLAN)).toMatchObject({ verdict: { kind: 'too few days' }, fromDay: undefined });
    expect(surestRise([], { ...PLAN, markDay: undefined })).toBeUndefined();
  });
});

test('marks before the first and after the last level split nothing', () => {
  const levels = flat(20, 2);
  expect(levelsSinceMark(levels, [FIRST_DAY - 1, FIRST_DAY + 20])).toEqual({ levels, markDay: undefined });
  expect(levelsSinceMark(levels, [FIRST_DAY + 3, FIRST_DAY + 9]).levels[0]?.day).toBe(FIRST_DAY + 10);
});
