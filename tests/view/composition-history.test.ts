import { describe, expect, it } from 'vitest';
import type { LineComposition } from '../../src/contract/composition';
import {
  causeOutline,
  causeSpanFromAddress,
  causeSpanInAddress,
  causeTable,
  causeWindow,
  CAUSE_SPANS,
  dayStretches,
  stackedDays,
  stackMost,
} from '../../src/view/composition-history';
import { AT_MS } from './sample-lines';

const DAY_MS = 86_400_000;
const row = (day: string, phase: 'a' | 'b' | 'c' = 'b') => ({
  day,
  phase,
  chargingAmps: 10,
  ratioAmps: 20,
  angleAmps: 5,
  restAmps: 1,
  differentialAmps: 30,
});
const history: LineComposition['history'] = [
  row('2026-11-03'),
  row('2026-11-01'),
  row('2026-11-02'),
  row('2026-11-02', 'a'),
  row('2026-11-06'),
];

describe('the causes by day', () => {
  it('are stacked one on the other, oldest day first, of one phase alone', () => {
    const days = stackedDays(history, 'b');
    expect(days.map(({ startMs }) => new Date(startMs).toISOString().slice(0, 10))).toEqual([
      '2026-11-01',
      '2026-11-02',
      '2026-11-03',
      '2026-11-06',
    ]);
    expect(days[0]!.shares).toEqual({
      charging: { low: 0, high: 10 },
      ratio: { low: 10, high: 30 },
      angle: { low: 30, high: 35 },
      rest: { low: 35, high: 36 },
    });
    expect(stackMost(days)).toBe(36);
  });

  it('days that are missing stay a gap', () => {
    expect(dayStretches(stackedDays(history, 'b')).map((stretch) => stretch.length)).toEqual([3, 1]);
    expect(dayStretches([])).toEqual([]);
  });

  it('a day by itself has the width of a day', () => {
    const [day] = stackedDays([row('2026-11-06')], 'b');
    expect(causeOutline([day!], 'ratio')).toEqual([
      [day!.startMs, 30],
      [day!.startMs + DAY_MS, 30],
      [day!.startMs + DAY_MS, 10],
      [day!.startMs, 10],
    ]);
  });

  it('the table has them newest first, per unit where that is shown', () => {
    const table = causeTable(history, 'b', {
      caption: 'x',
      letter: 'L2',
      unit: 'per unit',
      ratingAmps: 100,
    });
    expect(table.rows[0]).toEqual(['2026-11-06', 'L2', 0.1, 0.2, 0.05, 0.01, 0.3]);
    expect(table.rows).toHaveLength(4);
  });

  it('the span is kept in the address, and the window holds whole days up to today', () => {
    for (const span of CAUSE_SPANS) expect(causeSpanFromAddress(causeSpanInAddress(span) ?? null)).toBe(span);
    const { fromMs, toMs } = causeWindow('30 days', AT_MS);
    expect((toMs - fromMs) / DAY_MS).toBe(30);
    expect(toMs).toBeGreaterThan(AT_MS);
    expect(fromMs % DAY_MS).toBe(0);
  });
});
