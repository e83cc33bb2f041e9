import { describe, expect, it } from 'vitest';
import { standingLevelCause } from '../../src/warnings/standing-level';

const MARKS = { nearRatio: 0.7, returnBand: 0.05, standing: false };
const PICKUP_AMPS = 120;
const levels = (a?: number, b?: number, c?: number) => ({ a, b, c });

describe('a 24-hour standing level', () => {
  it('raises near at 70 % of the pickup, and tells the phase, the level and the mark', () => {
    expect(standingLevelCause(levels(10, 84, 20), PICKUP_AMPS, MARKS)).toEqual({
      basis: 'standing level',
      phase: 'b',
      levelAmps: 84,
      pickupAmps: 120,
      limit: 0.7,
    });
  });

  it.each([
    ['below the mark, not standing', 83.9, false, false],
    ['at the mark, not standing', 84, false, true],
    ['between mark and band, standing', 80, true, true],
    ['at the lower end of the band, standing', 78.1, true, true],
    ['below the band, standing', 77.9, true, false],
  ])('has a return of its own below the band: %s', (_, level, standing, stands) => {
    const cause = standingLevelCause(levels(level), PICKUP_AMPS, { ...MARKS, standing });
    expect(cause !== undefined).toBe(stands);
  });

  it('that is not known raises nothing', () => {
    expect(standingLevelCause(levels(), PICKUP_AMPS, { ...MARKS, standing: true })).toBeUndefined();
  });

  it('that is known of one phase alone is judged', () => {
    expect(standingLevelCause(levels(undefined, undefined, 90), PICKUP_AMPS, MARKS)?.basis).toBe(
      'standing level',
    );
  });
});
