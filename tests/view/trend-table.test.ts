import { describe, expect, it } from 'vitest';
import type { TrendMark } from '../../src/view/trend-marks';
import type { TrendPoint } from '../../src/view/trend-points';
import { trendTable } from '../../src/view/trend-table';
import { SITE } from './sample-lines';

const DAY_MS = 86_400_000;
const START_MS = Date.parse('2026-05-01T00:00:00Z');
const point = (day: number, medianAmps: number): TrendPoint => ({
  startMs: START_MS + day * DAY_MS,
  atMs: START_MS + (day + 0.5) * DAY_MS,
  medianAmps,
  lowAmps: medianAmps - 1,
  highAmps: medianAmps + 1,
  qualifiedCount: 40_000,
  allCount: 43_200,
});
const mark = (day: number, told: string): TrendMark => ({
  kind: 'work',
  atMs: START_MS + (day + 0.5) * DAY_MS,
  words: 'work',
  told,
});
const context = {
  source: 'day' as const,
  phases: ['a', 'b'] as const,
  letters: SITE.phaseLetters,
  unit: 'amperes' as const,
  ratingAmps: 600,
  caption: 'Standing differential',
};
const series = { a: [point(0, 20), point(2, 12)], b: [point(0, 22)], c: [point(0, 99)] };
const rowsWith = (marks: TrendMark[]) =>
  trendTable(series, { ...context, marks }).rows.map((row) => [row[0], row[1], row[2], row.at(-1)]);

describe('the table behind the trend', () => {
  it('has the days of the phases shown, newest first, and beside them what changed on them', () => {
    expect(rowsWith([mark(0, 'work: a joint remade'), mark(0, 'settings changed')])).toEqual([
      [START_MS + 2 * DAY_MS, 'L1', 12, ''],
      [START_MS, 'L1', 20, 'work: a joint remade; settings changed'],
      [START_MS, 'L2', 22, 'work: a joint remade; settings changed'],
    ]);
  });

  it('a change on a day without levels has a row of its own, as wide as the others', () => {
    const marks = [mark(1, 'work: the line earthed')];
    const table = trendTable(series, { ...context, marks });
    expect(rowsWith(marks)[1]).toEqual([START_MS + 1.5 * DAY_MS, null, null, 'work: the line earthed']);
    for (const row of table.rows) expect(row).toHaveLength(table.columns.length);
  });
});
