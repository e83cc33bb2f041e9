import { describe, expect, it } from 'vitest';
import { timeTicks } from '../../src/view/trend-ticks';

const BERLIN = 'Europe/Berlin';
const labels = (from: string, to: string, { most, timeZone = BERLIN }: { most: number; timeZone?: string }) =>
  timeTicks({ fromMs: Date.parse(from), toMs: Date.parse(to) }, { timeZone, most }).map(({ label }) => label);

describe('ticks of a time axis', () => {
  it('an hour is told in round minutes', () => {
    expect(labels('2026-03-01T10:03:00Z', '2026-03-01T11:03:00Z', { most: 6 })).toEqual([
      '11:10',
      '11:20',
      '11:30',
      '11:40',
      '11:50',
      '12:00',
    ]);
  });

  it('a day is told in hours of the site, midnight by its date', () => {
    expect(labels('2026-03-01T10:00:00Z', '2026-03-02T10:00:00Z', { most: 8 })).toEqual([
      '12:00',
      '15:00',
      '18:00',
      '21:00',
      '2 Mar',
      '03:00',
      '06:00',
      '09:00',
    ]);
  });

  it('days begin at the site’s midnight on both sides of a change of the clocks', () => {
    const ticks = timeTicks(
      { fromMs: Date.parse('2026-03-26T12:00:00Z'), toMs: Date.parse('2026-04-01T12:00:00Z') },
      { timeZone: BERLIN, most: 10 },
    );
    expect(ticks.map(({ atMs }) => new Date(atMs).toISOString())).toContain('2026-03-28T23:00:00.000Z');
    expect(ticks.map(({ atMs }) => new Date(atMs).toISOString())).toContain('2026-03-29T22:00:00.000Z');
    expect(ticks.every(({ label }) => / (Mar|Apr)$/.test(label))).toBe(true);
  });

  it('hours stay round over the missing hour of spring', () => {
    expect(labels('2026-03-28T21:00:00Z', '2026-03-29T09:00:00Z', { most: 5 })).toEqual([
      '29 Mar',
      '03:00',
      '06:00',
      '09:00',
    ]);
  });

  it('a zone that is off by half an hour keeps its own round hours', () => {
    expect(
      labels('2026-03-01T10:00:00Z', '2026-03-01T14:00:00Z', { most: 4, timeZone: 'Asia/Kolkata' }),
    ).toEqual(['16:00', '17:00', '18:00', '19:00']);
  });

  it('no more ticks than asked for', () => {
    expect(labels('2026-01-01T00:00:00Z', '2026-03-01T00:00:00Z', { most: 5 }).length).toBeLessThanOrEqual(5);
  });

  it('years are counted in months, on the site’s first of them, and the year is named where it begins', () => {
    expect(labels('2024-11-15T00:00:00Z', '2026-11-16T00:00:00Z', { most: 10 })).toEqual([
      'Jan 2025',
      'Apr',
      'Jul',
      'Oct',
      'Jan 2026',
      'Apr',
      'Jul',
      'Oct',
    ]);
    const [first] = timeTicks(
      { fromMs: Date.parse('2024-11-15T00:00:00Z'), toMs: Date.parse('2026-11-16T00:00:00Z') },
      { timeZone: BERLIN, most: 10 },
    );
    expect(new Date(first!.atMs).toISOString()).toBe('2024-12-31T23:00:00.000Z');
  });
});
