import { describe, expect, test } from 'vitest';
import { expectedStanding, standingJudgement } from '../../src/protection/expected-standing';
import type { StandingCauses } from '../../src/protection/expected-standing';

const CABLE: StandingCauses = {
  throughAmps: 400,
  chargingAmps: 120,
  classBudget: { differentialRatio: 0.04, isDisplacementStated: true },
  channel: undefined,
};
/** 1 ms of time error is 18° at 50 Hz: 0.31287 of the load. */
const CHANNEL = { timeErrorMs: 1, frequencyHz: 50 };

describe('expected standing level', () => {
  test('adds its causes up as worst case and as independent of each other', () => {
    expect(expectedStanding(CABLE)).toEqual({
      terms: [
        { cause: 'charging', amps: 120 },
        { cause: 'transformers', amps: 16 },
      ],
      missing: [],
      worstCaseAmps: 136,
      rootSumSquareAmps: expect.closeTo(Math.hypot(120, 16), 10),
      leastAmps: 104,
    });
  });

  test('has a term of the channel where the scheme takes its time from it', () => {
    const found = expectedStanding({ ...CABLE, channel: CHANNEL });
    expect(found.terms[2]).toEqual({ cause: 'channel', amps: expect.closeTo(125.15, 2) });
    expect(found.worstCaseAmps).toBeCloseTo(261.15, 2);
    // Charging and transformers may oppose the channel's part, which is the greatest.
    expect(found.leastAmps).toBe(0);
    const short = expectedStanding({ ...CABLE, chargingAmps: 4, channel: CHANNEL });
    expect(short.leastAmps).toBeCloseTo(125.15 - 4 - 16, 2);
  });

  test('is the same whichever way the channel is uneven', () => {
    const back = { ...CHANNEL, timeErrorMs: -1 };
    expect(expectedStanding({ ...CABLE, channel: back })).toEqual(
      expectedStanding({ ...CABLE, channel: CHANNEL }),
    );
  });

  test('has no total while a cause is missing, and names it', () => {
    const found = expectedStanding({
      ...CABLE,
      chargingAmps: undefined,
      channel: { ...CHANNEL, timeErrorMs: undefined },
    });
    expect(found).toEqual({
      terms: [{ cause: 'transformers', amps: 16 }],
      missing: ['charging', 'channel'],
      worstCaseAmps: undefined,
      rootSumSquareAmps: undefined,
      leastAmps: undefined,
    });
    expect(expectedStanding({ ...CABLE, classBudget: undefined }).missing).toEqual(['transformers']);
    expect(standingJudgement(500, found)).toBeUndefined();
  });
});

describe('judgement of a standing level', () => {
  test.each([
    { measured: 137, judgement: 'above' },
    { measured: 136, judgement: 'within' },
    { measured: 60, judgement: 'within' },
    { measured: 51, judgement: 'far below' },
    { measured: 0, judgement: 'far below' },
  ])('$measured A on a line that charges with 120 A is $judgement', ({ measured, judgement }) => {
    expect(standingJudgement(measured, expectedStanding(CABLE))).toBe(judgement);
  });

  test('a small level is within where nothing need be left', () => {
    const compensated = expectedStanding({ ...CABLE, chargingAmps: 0 });
    expect(compensated.leastAmps).toBe(0);
    expect(standingJudgement(0.2, compensated)).toBe('within');
  });
});
