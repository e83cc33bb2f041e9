import { describe, expect, test } from 'vitest';
import { creepVerdict } from '../../src/standing/creep';
import type { CreepVerdict } from '../../src/standing/creep';
import { FIRST_DAY, seededLevels } from './seeded-levels';

const LIMITS = { pickupAmps: 100, nearRatio: 0.7, horizonDays: 365 };
const LAST_DAY = FIRST_DAY + 59;

/** The verdict's trend; fails the test when there are too few days for one. */
function trendOf(verdict: CreepVerdict) {
  if (verdict.kind === 'too few days') throw new Error('This series has enough days for a trend.');
  return verdict;
}

describe('a standing level that rises by 0.2 A a day', () => {
  const levels = seededLevels(60, { slopeAmpsPerDay: 0.2, noiseAmps: 1, seed: 21 });
  const verdict = trendOf(creepVerdict(levels, LIMITS));

  test('creeps', () => {
    expect(verdict.kind).toBe('creep');
    expect(verdict.pTwoSided).toBeLessThan(0.001);
    expect(verdict.days).toBe(60);
  });

  test('drifts by what was put in, within its limits', () => {
    expect(verdict.slopeAmpsPerDay).toBeCloseTo(0.2, 1);
    expect(verdict.slopeLowAmpsPerDay).toBeLessThan(0.2);
    expect(verdict.slopeHighAmpsPerDay).toBeGreaterThan(0.2);
    expect(verdict.levelNowAmps).toBeCloseTo(40 + 0.2 * 59, 0);
  });

  test('is forecast to meet the near mark, then the pickup', () => {
    const trueNearDay = FIRST_DAY + (70 - 40) / 0.2;
    const truePickupDay = FIRST_DAY + (100 - 40) / 0.2;
    expect(verdict.near.earliestDay).toBeLessThan(trueNearDay);
    expect(verdict.near.latestDay).toBeGreaterThan(trueNearDay);
    expect(verdict.pickup.earliestDay).toBeLessThan(truePickupDay);
    expect(verdict.pickup.latestDay).toBeGreaterThan(truePickupDay);
  });

  test('creeps all the same with days missing', () => {
    const gappy = levels.filter(({ day }) => day % 7 !== 0 && (day < FIRST_DAY + 20 || day > FIRST_DAY + 30));
    const gappyVerdict = trendOf(creepVerdict(gappy, LIMITS));
    expect(gappyVerdict.kind).toBe('creep');
    expect(gappyVerdict.slopeAmpsPerDay).toBeCloseTo(0.2, 1);
  });

  test('is within margin when the near mark is further than the horizon', () => {
    expect(creepVerdict(levels, { ...LIMITS, horizonDays: 30 }).kind).toBe('within margin');
    expect(creepVerdict(levels, { ...LIMITS, pickupAmps: 2000 }).kind).toBe('within margin');
  });

  test('creeps when it is past the near mark already', () => {
    const past = trendOf(creepVerdict(levels, { ...LIMITS, pickupAmps: 60 }));
    expect(past.kind).toBe('creep');
    expect(past.near).toEqual({ earliestDay: LAST_DAY, likelyDay: LAST_DAY, latestDay: LAST_DAY });
  });
});

describe('a standing level without a rise', () => {
  test('has no trend, and nothing is projected', () => {
    const levels = seededLevels(60, { slopeAmpsPerDay: 0, noiseAmps: 3, seed: 4 });
    const verdict = trendOf(creepVerdict(levels, LIMITS));
    expect(verdict.kind).toBe('no trend');
    expect(verdict.near).toEqual({ earliestDay: undefined, likelyDay: undefined, latestDay: undefined });
  });

  test('has no trend when it falls, however surely', () => {
    const levels = seededLevels(60, { slopeAmpsPerDay: -0.2, noiseAmps: 1, seed: 4 });
    const verdict = trendOf(creepVerdict(levels, LIMITS));
    expect(verdict.pTwoSided).toBeLessThan(0.001);
    expect(verdict.kind).toBe('no trend');
  });

  test('has no trend when it never changes', () => {
    const levels = seededLevels(30, { slopeAmpsPerDay: 0, noiseAmps: 0, seed: 4 });
    expect(creepVerdict(levels, LIMITS)).toMatchObject({
      kind: 'no trend',
      slopeAmpsPerDay: 0,
      pTwoSided: 1,
    });
  });

  test('is rarely taken for a creep: of 300 series of noise, at most one in a hundred', () => {
    const seeds = Array.from({ length: 300 }, (_, index) => 1000 + index);
    const alarms = seeds.filter((seed) => {
      const levels = seededLevels(20, { slopeAmpsPerDay: 0, noiseAmps: 3, seed: seed * 7919 });
      return creepVerdict(levels, LIMITS).kind !== 'no trend';
    });
    expect(alarms.length).toBeLessThanOrEqual(3);
  });
});

describe('a series of daily levels', () => {
  const steep = { slopeAmpsPerDay: 1, noiseAmps: 0.2, seed: 9 };

  test('needs ten days', () => {
    expect(creepVerdict([], LIMITS)).toEqual({ kind: 'too few days', days: 0, daysNeeded: 10 });
    expect(creepVerdict(seededLevels(9, steep), LIMITS)).toEqual({
      kind: 'too few days',
      days: 9,
      daysNeeded: 10,
    });
    expect(creepVerdict(seededLevels(10, steep), LIMITS).kind).toBe('creep');
  });

  test('needs no fewer days than its limits do, whatever is asked', () => {
    const limits = { ...LIMITS, daysLeast: 2, pMost: 0.05 };
    expect(creepVerdict(seededLevels(4, steep), limits)).toMatchObject({
      kind: 'too few days',
      daysNeeded: 5,
    });
    expect(creepVerdict(seededLevels(5, steep), limits).kind).toBe('creep');
  });

  test('that rises in an exactly straight line creeps', () => {
    const straight = seededLevels(12, { slopeAmpsPerDay: 0.3, noiseAmps: 0, seed: 1 });
    expect(creepVerdict(straight, LIMITS)).toMatchObject({
      kind: 'creep',
      slopeAmpsPerDay: expect.closeTo(0.3),
    });
  });

  test('is refused out of order, with a day twice, and with a level that is not a number', () => {
    const levels = seededLevels(12, steep);
    const first = { day: FIRST_DAY, levelAmps: 40 };
    expect(() => creepVerdict(levels.toReversed(), LIMITS)).toThrow(RangeError);
    expect(() => creepVerdict([first, ...levels], LIMITS)).toThrow(RangeError);
    expect(() => creepVerdict([...levels, { day: FIRST_DAY + 40, levelAmps: NaN }], LIMITS)).toThrow(
      RangeError,
    );
  });
});
