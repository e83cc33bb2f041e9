import { describe, expect, test } from 'vitest';
import { DEFAULT_QUALIFICATION_LIMITS, disqualifications } from '../../src/standing/qualification';
import type { SnapshotFacts } from '../../src/standing/qualification';

const GOOD: SnapshotFacts = {
  atMs: 2000,
  complete: true,
  validityGood: true,
  test: false,
  clocksWithinLimit: true,
  breakersClosed: true,
  throughAmps: 500,
};
const BEFORE: SnapshotFacts = { ...GOOD, atMs: 0 };
const LINE = { ratingAmps: 1000, limits: DEFAULT_QUALIFICATION_LIMITS };

describe('a snapshot', () => {
  test('under ordinary steady load is qualified', () => {
    expect(disqualifications(GOOD, BEFORE, LINE)).toEqual([]);
  });

  test.each([
    { change: { complete: false }, reason: 'incomplete' },
    { change: { validityGood: false }, reason: 'validity' },
    { change: { test: true }, reason: 'test' },
    { change: { clocksWithinLimit: false }, reason: 'clock' },
    { change: { breakersClosed: false }, reason: 'breaker' },
  ])('is disqualified as $reason for $change', ({ change, reason }) => {
    expect(disqualifications({ ...GOOD, ...change }, BEFORE, LINE)).toEqual([reason]);
  });

  test.each([
    { throughAmps: 19, reasons: ['through current'] },
    { throughAmps: 20, reasons: [] },
    { throughAmps: 1200, reasons: [] },
    { throughAmps: 1201, reasons: ['through current'] },
  ])('with a steady through current of $throughAmps A on a rating of 1000 A has $reasons', (load) => {
    const steady = { throughAmps: load.throughAmps };
    expect(disqualifications({ ...GOOD, ...steady }, { ...BEFORE, ...steady }, LINE)).toEqual(load.reasons);
  });

  test.each([
    { before: 301, reasons: [] },
    { before: 300, reasons: ['unsteady'] },
    { before: 700, reasons: ['unsteady'] },
    { before: 699, reasons: [] },
  ])('with 500 A after $before A has $reasons', ({ before, reasons }) => {
    expect(disqualifications(GOOD, { ...BEFORE, throughAmps: before }, LINE)).toEqual(reasons);
  });

  test('with nothing before it to be steady against is unsteady', () => {
    expect(disqualifications(GOOD, undefined, LINE)).toEqual(['unsteady']);
    expect(disqualifications(GOOD, { ...BEFORE, throughAmps: undefined }, LINE)).toEqual(['unsteady']);
  });

  test('without a through current meets no rule about it', () => {
    const reasons = disqualifications({ ...GOOD, complete: false, throughAmps: undefined }, BEFORE, LINE);
    expect(reasons).toEqual(['incomplete', 'through current', 'unsteady']);
  });

  test('whose through current is not a number is not qualified', () => {
    expect(disqualifications({ ...GOOD, throughAmps: NaN }, BEFORE, LINE)).not.toEqual([]);
  });

  test('names every reason at once', () => {
    const worst = {
      ...GOOD,
      complete: false,
      validityGood: false,
      test: true,
      clocksWithinLimit: false,
      breakersClosed: false,
      throughAmps: 0,
    };
    expect(disqualifications(worst, BEFORE, LINE)).toHaveLength(7);
  });

  test('is never judged against itself or a later one', () => {
    expect(() => disqualifications(GOOD, GOOD, LINE)).toThrow(RangeError);
    expect(() => disqualifications(BEFORE, GOOD, LINE)).toThrow(RangeError);
  });

  test.each([0, -1, NaN])('on a line rated %d A is refused', (ratingAmps) => {
    expect(() => disqualifications(GOOD, BEFORE, { ...LINE, ratingAmps })).toThrow(RangeError);
  });

  test('is held to limits that are settings', () => {
    const limits = { throughRatioLeast: 0.6, throughRatioMost: 1, stepRatioMost: 0.001 };
    const before = { ...BEFORE, throughAmps: 502 };
    expect(disqualifications(GOOD, before, { ...LINE, limits })).toEqual(['through current', 'unsteady']);
  });
});
