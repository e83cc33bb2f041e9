import { describe, expect, it } from 'vitest';
import type { Creep } from '../../src/contract/warning';
import { senPoints } from '../../src/view/trend-sen';
import { creepWords } from '../../src/view/trend-words';

const DAY_MS = 86_400_000;
const creep: Creep = {
  phase: 'b',
  verdict: 'creep',
  slopeAmpsPerMonth: 3.4,
  slopeLowAmpsPerMonth: 2.9,
  slopeHighAmpsPerMonth: 3.9,
  pTwoSided: 0.0004,
  days: 61,
  levelNowAmps: 38,
  near: { earliest: '2026-01-12', likely: '2026-01-20', latest: '2026-02-03' },
  pickup: { earliest: '2026-08-01', likely: '2026-09-01', latest: '2026-10-01' },
};
const toMs = Date.UTC(2025, 11, 1);
const window = { fromMs: toMs - 61 * DAY_MS, toMs };

describe('the Sen line', () => {
  it('ends today at the level that the creep tells', () => {
    expect(senPoints(creep, window).at(-1)?.level).toBeCloseTo(38, 9);
  });

  it('begins with the first day it was taken from and falls back by the slope', () => {
    const [first] = senPoints(creep, window);
    expect(first?.atMs).toBe(toMs - 60 * DAY_MS);
    expect(first?.level).toBeCloseTo(38 - (3.4 * 60) / 30.4375, 9);
  });

  it('the fan is closed in the middle and open at both ends', () => {
    const [first, middle, last] = senPoints(creep, window);
    expect(middle!.high - middle!.low).toBeCloseTo(0, 9);
    expect(first!.high - first!.low).toBeCloseTo(30 / 30.4375, 9);
    expect(last!.high - last!.low).toBeCloseTo(30 / 30.4375, 9);
  });

  it('a shorter window shows the end of the same line', () => {
    const week = senPoints(creep, { fromMs: toMs - 7 * DAY_MS, toMs });
    expect(week).toHaveLength(2);
    expect(week[0]?.level).toBeCloseTo(38 - (3.4 * 7) / 30.4375, 9);
  });

  it('per unit divides by the rating', () => {
    expect(senPoints(creep, window, 380).at(-1)?.level).toBeCloseTo(0.1, 9);
  });
});

describe('a drift in words', () => {
  const context = { unit: 'amperes', ratingAmps: 900, timeZone: 'Europe/Berlin' } as const;

  it('says the slope, its limits, the probability and when the near mark is met', () => {
    expect(creepWords(creep, context)).toBe(
      'rises 3.4 A a month (95 %: 2.9 to 3.9), p = 0.0004, near mark between 12 Jan 2026 and 3 Feb 2026',
    );
  });

  it('a falling level is said to fall and meets no mark', () => {
    const falling = {
      ...creep,
      slopeAmpsPerMonth: -3.4,
      slopeLowAmpsPerMonth: -3.9,
      slopeHighAmpsPerMonth: -2.9,
    };
    expect(creepWords(falling, context)).toBe('falls 3.4 A a month (95 %: 2.9 to 3.9), p = 0.0004');
  });

  it('a mark that is not met within five years is said to be so', () => {
    const far = { earliest: null, likely: null, latest: null };
    expect(creepWords({ ...creep, near: far }, context)).toContain('near mark not within five years');
    const open = { earliest: '2026-01-12', likely: null, latest: null };
    expect(creepWords({ ...creep, near: open }, context)).toContain('near mark 12 Jan 2026 at the earliest');
  });

  it('a probability too small to print is said to be below', () => {
    expect(creepWords({ ...creep, pTwoSided: 2e-7 }, context)).toContain('p < 0.0001');
  });
});
