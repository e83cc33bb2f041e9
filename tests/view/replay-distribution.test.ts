import { describe, expect, it } from 'vitest';
import {
  distributionTable,
  histogramOutline,
  shareAtOrAbove,
  spanOf,
} from '../../src/view/replay-distribution';

const three = (counts: number[]) => ({ a: counts, b: counts, c: counts });

describe('the share at or above a utilisation', () => {
  it('falls from the whole to the last share above zero', () => {
    // bins of 10 %: four snapshots below 10 %, none, one from 20 to 30 %
    expect(shareAtOrAbove([4, 0, 1, 0], 0.1)).toEqual([
      [0, 100],
      [10, 20],
      [20, 20],
    ]);
  });

  it('of nothing is nothing', () => {
    expect(shareAtOrAbove([0, 0], 0.1)).toEqual([]);
  });
});

describe('the histogram', () => {
  it('has its bars where the counts are and closes at the ground', () => {
    expect(histogramOutline([0, 3, 1, 0], { binRatio: 0.1, span: [1, 2] })).toEqual([
      [10, 0],
      [10, 75],
      [20, 75],
      [20, 25],
      [30, 25],
      [30, 0],
    ]);
  });

  it('joins bins to bars rather than drawing hundreds', () => {
    const counts = Array.from({ length: 401 }, () => 1);
    const outline = histogramOutline(counts, { binRatio: 0.005, span: [0, 400] });
    expect(outline.length).toBeLessThan(130);
    const bars = outline.filter((_, index) => index % 2 === 1).slice(0, -1);
    expect(bars.reduce((sum, [, share]) => sum + share, 0)).toBeCloseTo(100, 9);
  });

  it('spans what either side holds', () => {
    const distribution = {
      binRatio: 0.1,
      recorded: three([0, 0, 2, 0, 0]),
      replayed: three([0, 1, 0, 0, 0]),
    };
    expect(spanOf(distribution)).toEqual([1, 2]);
    expect(distributionTable(distribution, { a: 'A', b: 'B', c: 'C' }).rows).toEqual([
      [10, 20, 1, 0, 1, 0, 1, 0],
      [20, 30, 0, 2, 0, 2, 0, 2],
    ]);
  });
});
