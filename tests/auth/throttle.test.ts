import { describe, expect, it } from 'vitest';
import { SIGN_IN_LIMITS, waitMs, waitSentence } from '../../src/auth/throttle';

const NOW = Date.UTC(2026, 2, 1);
const after = (count: number, agoMs = 0) => waitMs({ count, lastAtMs: NOW - agoMs }, 5, NOW);

describe('the wait after failed sign-ins', () => {
  it('is none before the limit', () => {
    expect(waitMs({ count: 0, lastAtMs: undefined }, 5, NOW)).toBe(0);
    expect(after(4)).toBe(0);
  });
  it('begins at the limit and doubles with each failure beyond it', () => {
    expect([5, 6, 7, 8].map((count) => after(count))).toEqual([30_000, 60_000, 120_000, 240_000]);
  });
  it('never grows past its longest', () => {
    expect(after(40)).toBe(SIGN_IN_LIMITS.longestWaitMs);
  });
  it('counts from the newest failure', () => {
    expect(after(5, 29_000)).toBe(1_000);
    expect(after(5, 31_000)).toBe(0);
  });
  it('is told in seconds, then in minutes', () => {
    expect(waitSentence(29_001)).toBe('Too many failed sign-ins. Try again in 30 seconds.');
    expect(waitSentence(240_000)).toBe('Too many failed sign-ins. Try again in 4 minutes.');
  });
});
