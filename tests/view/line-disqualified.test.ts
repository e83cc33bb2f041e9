import { describe, expect, it } from 'vitest';
import { uncounted, uncountedWords } from '../../src/view/line-disqualified';

const window = { fromMs: Date.parse('2026-11-01T00:00:00Z'), toMs: Date.parse('2026-11-02T00:00:00Z') };
const level = (hour: number, change: Partial<Parameters<typeof uncounted>[0][number]> = {}) => ({
  start: new Date(window.fromMs + hour * 3_600_000).toISOString(),
  phase: 'b' as const,
  medianAmps: 30,
  qualifiedCount: 1800,
  allCount: 1800,
  disqualified: {},
  ...change,
});

describe('what did not count', () => {
  it('is nothing to speak of where every snapshot counted', () => {
    expect(uncountedWords(uncounted([level(0), level(1)], 'b', window), 'hour')).toBeUndefined();
    expect(uncountedWords(uncounted([], 'b', window), 'hour')).toBeUndefined();
  });

  it('is told by rule, the most frequent first, and how many hours have no level', () => {
    const rows = [
      level(0, { qualifiedCount: 1500, disqualified: { incomplete: 200, unsteady: 100 } }),
      level(1, { qualifiedCount: 0, medianAmps: null, disqualified: { incomplete: 1800 } }),
      level(2),
    ];
    expect(uncountedWords(uncounted(rows, 'b', window), 'hour')).toBe(
      '2,100 of 5,400 snapshots did not count towards these levels: 2,000 without a measurement of every terminal and 100 with a load that changed too much since the one before. 1 hour has no level for it.',
    );
  });

  it('a snapshot that breaks two rules is said to', () => {
    const rows = [
      level(0, { qualifiedCount: 1700, disqualified: { incomplete: 100, 'through current': 100 } }),
    ];
    expect(uncountedWords(uncounted(rows, 'b', window), 'hour')).toMatch(
      /One snapshot may break several rules\.$/,
    );
  });

  it('rows of before the rules were counted are owned up to', () => {
    const rows = [level(0, { qualifiedCount: 1700, disqualified: null })];
    expect(uncountedWords(uncounted(rows, 'b', window), 'day')).toBe(
      '100 of 1,800 snapshots did not count towards these levels. For a part of this time the rules were not counted yet.',
    );
  });

  it('other phases and rows outside of the window are left out', () => {
    const rows = [
      level(0),
      level(1, { phase: 'a', qualifiedCount: 0 }),
      level(30, { qualifiedCount: 0, disqualified: { test: 1800 } }),
    ];
    expect(uncounted(rows, 'b', window)).toMatchObject({
      allCount: 1800,
      qualifiedCount: 1800,
      emptyRows: 0,
    });
  });
});
