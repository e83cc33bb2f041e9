import { describe, expect, it } from 'vitest';
import type { Level } from '../../src/contract/lines';
import { stretches, trendOfLevels, trendOfReadings, unbrokenMs } from '../../src/view/trend-points';
import { trendLevelMax } from '../../src/view/trend-shape';

const HOUR_MS = 3_600_000;
const FROM_MS = Date.UTC(2026, 2, 1);
const level = (hour: number, medianAmps: number | null, phase: Level['phase'] = 'b'): Level => ({
  start: new Date(FROM_MS + hour * HOUR_MS).toISOString(),
  phase,
  leastAmps: medianAmps,
  p05Amps: medianAmps,
  medianAmps,
  p95Amps: medianAmps,
  greatestAmps: medianAmps,
  meanRestraintAmps: 500,
  meanThroughAmps: 500,
  greatestUtilisation: 0.3,
  qualifiedCount: medianAmps === null ? 0 : 1_700,
  disqualified: null,
  allCount: 1_800,
});
const window = { fromMs: FROM_MS, toMs: FROM_MS + 10 * HOUR_MS };
const hours = (levels: Level[]) => trendOfLevels(levels, 'b', { rung: 'hour', window });

describe('the points of a trend', () => {
  it('an hour is drawn at its middle', () => {
    expect(hours([level(2, 20)])[0]?.atMs).toBe(FROM_MS + 2.5 * HOUR_MS);
  });

  it('the hour that is still being filled is drawn inside the window', () => {
    const [point] = trendOfLevels([level(9, 20)], 'b', {
      rung: 'hour',
      window: { ...window, toMs: FROM_MS + 9.2 * HOUR_MS },
    });
    expect(point!.atMs).toBeLessThan(FROM_MS + 9.2 * HOUR_MS);
  });

  it('other phases and other times stay out', () => {
    expect(hours([level(2, 20, 'a'), level(-3, 20), level(12, 20), level(4, 21)])).toHaveLength(1);
  });

  it('rows come back oldest first, in whatever order they were given', () => {
    expect(hours([level(4, 21), level(2, 20)]).map((point) => point.medianAmps)).toEqual([20, 21]);
  });

  it('readings of the window become points without a spread', () => {
    const phase = { differentialAmps: 20, restraintAmps: 500, thresholdAmps: 100, utilisation: 0.2 };
    const readings = [-1, 1].map((hour) => ({
      atMs: FROM_MS + hour * HOUR_MS,
      phases: { a: phase, b: phase, c: phase },
    }));
    expect(trendOfReadings(readings, 'a', window)).toMatchObject([{ medianAmps: 20, lowAmps: null }]);
  });
});

describe('gaps', () => {
  const lengths = (levels: Level[]) =>
    stretches(hours(levels), unbrokenMs([], 'hour')).map(({ length }) => length);

  it('neighbouring hours hang together', () => {
    expect(lengths([level(1, 20), level(2, 21), level(3, 22)])).toEqual([3]);
  });

  it('an hour without a row is a gap', () => {
    expect(lengths([level(1, 20), level(2, 21), level(4, 22)])).toEqual([2, 1]);
  });

  it('an hour in which nothing qualified is a gap', () => {
    expect(lengths([level(1, 20), level(2, null), level(3, 22)])).toEqual([1, 1]);
  });
});

describe('the height of a trend', () => {
  it('the pickup lies inside, also when nothing else is drawn', () => {
    expect(trendLevelMax([], [{ fromMs: 0, toMs: 1, pickup: 60 }], [])).toBeGreaterThan(60);
  });

  it('a level above the pickup lies inside', () => {
    const high = hours([level(1, 200)]);
    expect(trendLevelMax([high], [{ fromMs: 0, toMs: 1, pickup: 60 }], [])).toBeGreaterThan(200);
  });

  it('nothing at all still has a height', () => {
    expect(trendLevelMax([], [], [])).toBe(1);
  });
});
