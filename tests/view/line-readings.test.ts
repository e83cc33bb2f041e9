import { describe, expect, it } from 'vitest';
import { mergedReadings, readingsOf, unbrokenSpacingMs } from '../../src/view/line-readings';

const phases = (differentialAmps: number) => {
  const phase = {
    differentialAmps,
    restraintAmps: 500,
    thresholdAmps: 100,
    utilisation: differentialAmps / 100,
  };
  return { a: phase, b: phase, c: phase };
};
const reading = (atMs: number, amps = 20) => ({ atMs, phases: phases(amps) });

describe('readings', () => {
  it('a result of which nothing was heard gives no reading', () => {
    expect(readingsOf([{ at: null, phases: phases(1) }])).toEqual([]);
  });

  it('stored and live readings come back in the order of their instants', () => {
    const merged = mergedReadings([reading(2_000), reading(6_000)], [reading(4_000)], {
      nowMs: 6_000,
      windowMs: 60_000,
    });
    expect(merged.map(({ atMs }) => atMs)).toEqual([2_000, 4_000, 6_000]);
  });

  it('a late correction of an instant takes the place of what was known', () => {
    const merged = mergedReadings([reading(2_000, 20)], [reading(2_000, 21)], {
      nowMs: 2_000,
      windowMs: 60_000,
    });
    expect(merged.map((each) => each.phases.a.differentialAmps)).toEqual([21]);
  });

  it('what is older than the window leaves it', () => {
    const merged = mergedReadings([reading(0), reading(1_000), reading(2_000)], [], {
      nowMs: 3_000,
      windowMs: 2_000,
    });
    expect(merged.map(({ atMs }) => atMs)).toEqual([1_000, 2_000]);
  });

  it('three usual spacings are still unbroken, whatever the period', () => {
    expect(unbrokenSpacingMs([0, 2_000, 4_000, 30_000])).toBe(6_000);
    expect(unbrokenSpacingMs([0, 500, 1_000])).toBe(1_500);
  });

  it('a single instant has no spacing to break', () => {
    expect(unbrokenSpacingMs([5])).toBe(Infinity);
  });
});
