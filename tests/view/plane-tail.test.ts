import { describe, expect, it } from 'vitest';
import { tails } from '../../src/view/plane-tail';

const NOW_MS = 1_000_000_000;
const phase = (differentialAmps: number | null) => ({
  differentialAmps,
  restraintAmps: differentialAmps === null ? null : 500,
  thresholdAmps: 100,
  utilisation: null,
});
const reading = (agoMs: number, amps: number | null = 20) => ({
  atMs: NOW_MS - agoMs,
  phases: { a: phase(amps), b: phase(amps), c: phase(amps) },
});

describe('tails', () => {
  it('a tail holds the last ten minutes and nothing older', () => {
    const { a } = tails([reading(700_000), reading(600_000), reading(598_000), reading(0)], NOW_MS);
    expect(a.flat().map(({ ageRatio }) => ageRatio)).toEqual([1, 598 / 600, 0]);
  });

  it('an instant that could not be computed breaks the tail', () => {
    const { a } = tails(
      [reading(8_000), reading(6_000), reading(4_000, null), reading(2_000), reading(0)],
      NOW_MS,
    );
    expect(a.map((stretch) => stretch.length)).toEqual([2, 2]);
  });

  it('a time without readings breaks the tail', () => {
    const { b } = tails(
      [reading(64_000), reading(62_000), reading(60_000), reading(4_000), reading(2_000), reading(0)],
      NOW_MS,
    );
    expect(b.map((stretch) => stretch.length)).toEqual([3, 3]);
  });

  it('no readings leave no tail', () => {
    expect(tails([], NOW_MS)).toEqual({ a: [], b: [], c: [] });
  });
});
