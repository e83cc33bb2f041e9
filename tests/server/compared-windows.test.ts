import { describe, expect, it } from 'vitest';
import { comparedWindows } from '../../src/server/reading/comparison';

const AT_MS = Date.UTC(2026, 4, 3);
const dates = (marks: string[]) => {
  const { before, after } = comparedWindows(
    AT_MS,
    marks.map((on) => ({ on })),
  );
  return [before.from, before.to, after.from, after.to].map((at) => at.toISOString().slice(0, 10));
};

describe('the sides of a comparison', () => {
  it('reach half a year, and the day itself is in neither', () => {
    expect(dates([])).toEqual(['2025-11-04', '2026-05-03', '2026-05-04', '2026-10-30']);
  });

  it('end at the nearest other mark, whose own day is in neither', () => {
    expect(dates(['2025-12-01', '2026-03-20', '2026-06-01', '2026-08-01'])).toEqual([
      '2026-03-21',
      '2026-05-03',
      '2026-05-04',
      '2026-06-01',
    ]);
  });

  it('are not cut by the mark that the date is about', () => {
    expect(dates(['2026-05-02', '2026-05-03', '2026-05-04'])).toEqual(dates([]));
  });
});
