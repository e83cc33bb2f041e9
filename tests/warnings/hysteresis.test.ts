import { describe, expect, it } from 'vitest';
import { AT_REST, type Hysteresis, STANDING, stepHysteresis } from '../../src/warnings/hysteresis';
import { seededRandom } from '../protection/seeded-random';

const DELAYS = { onDelayMs: 60_000, offDelayMs: 30_000 };
const RAISE = { raise: true, clear: false };
const CLEAR = { raise: false, clear: true };
const BETWEEN = { raise: false, clear: false };

const afterAll = (state: Hysteresis, sights: readonly { atMs: number; raise: boolean; clear: boolean }[]) =>
  sights.reduce((so, sight) => stepHysteresis(so, sight, DELAYS), state);

describe('a judgement with hysteresis', () => {
  it('turns on when its condition has held for the whole delay, and not a millisecond before', () => {
    const turning = afterAll(AT_REST, [{ atMs: 0, ...RAISE }]);
    expect(stepHysteresis(turning, { atMs: 59_999, ...RAISE }, DELAYS).active).toBe(false);
    expect(stepHysteresis(turning, { atMs: 60_000, ...RAISE }, DELAYS)).toEqual(STANDING);
  });

  it('turns off after the delay of its own', () => {
    const turning = afterAll(STANDING, [{ atMs: 0, ...CLEAR }]);
    expect(stepHysteresis(turning, { atMs: 29_999, ...CLEAR }, DELAYS).active).toBe(true);
    expect(stepHysteresis(turning, { atMs: 30_000, ...CLEAR }, DELAYS)).toEqual(AT_REST);
  });

  it('starts anew after any break', () => {
    const state = afterAll(AT_REST, [
      { atMs: 0, ...RAISE },
      { atMs: 58_000, ...BETWEEN },
      { atMs: 60_000, ...RAISE },
    ]);
    expect(state).toEqual({ active: false, turningSinceMs: 60_000 });
  });

  it.each([
    ['at rest', AT_REST],
    ['standing', STANDING],
  ])('stays as it is between its two marks, however long that lasts (%s)', (_, state) => {
    expect(
      afterAll(
        state,
        [0, 60_000, 600_000].map((atMs) => ({ atMs, ...BETWEEN })),
      ),
    ).toBe(state);
  });

  it('turns at once without a delay', () => {
    const now = { onDelayMs: 0, offDelayMs: 0 };
    const on = stepHysteresis(AT_REST, { atMs: 5, ...RAISE }, now);
    expect(on).toEqual(STANDING);
    expect(stepHysteresis(on, { atMs: 6, ...CLEAR }, now)).toEqual(AT_REST);
  });

  it('never turns twice within a delay, whatever it sees', () => {
    const random = seededRandom(18);
    let state = AT_REST;
    let turnedAtMs = -Infinity;
    for (let atMs = 0; atMs < 3_600_000; atMs += 2_000) {
      const figure = random();
      const next = stepHysteresis(state, { atMs, raise: figure > 0.05, clear: figure < 0.95 }, DELAYS);
      if (next.active !== state.active) {
        expect(atMs - turnedAtMs).toBeGreaterThanOrEqual(next.active ? DELAYS.onDelayMs : DELAYS.offDelayMs);
        turnedAtMs = atMs;
      }
      state = next;
    }
    expect(turnedAtMs).toBeGreaterThan(0);
  });
});
