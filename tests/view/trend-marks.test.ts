import { describe, expect, it } from 'vitest';
import type { SettingsVersion } from '../../src/contract/settings-version';
import type { StepOnWire } from '../../src/contract/standing';
import { fittedAcross, markDay, marksTold, placedMarks, trendMarks } from '../../src/view/trend-marks';
import { AT_MS, SITE } from './sample-lines';

const DAY_MS = 86_400_000;
const window = { fromMs: AT_MS - 60 * DAY_MS, toMs: AT_MS };
const version = (daysAgo: number) =>
  ({ validFrom: new Date(AT_MS - daysAgo * DAY_MS).toISOString() }) as SettingsVersion;
const step: StepOnWire = {
  at: new Date(AT_MS - 9 * DAY_MS).toISOString(),
  fromAmps: 28,
  toAmps: 60,
  cause: 'angle mismatch',
  place: { terminal: 'hask', against: null },
  isTime: false,
  channelPathChanged: true,
};
const steps = [{ step, words: 'step 28 to 60 A' }];
const terminals = [{ key: 'hask-2', name: 'Hask' }];
const dayAt = (daysAgo: number) => new Date(AT_MS - daysAgo * DAY_MS).toISOString().slice(0, 10);
const workOf = (doneOn: string) => ({
  doneOn,
  terminal: 'hask-2',
  what: 'Transformer of phase L2 exchanged',
});
const nothing = { steps: [], settings: [], works: [], terminals, others: [] };

describe('marks on the trend', () => {
  it('are the step and the later settings inside the window; the first version changed nothing', () => {
    const marks = trendMarks(
      { ...nothing, steps, settings: [version(30), version(20), version(400)] },
      window,
    );
    expect(marks.map(({ kind, atMs }) => [kind, (AT_MS - atMs) / DAY_MS])).toEqual([
      ['step', 9],
      ['settings', 30],
      ['settings', 20],
    ]);
    expect(
      trendMarks({ ...nothing, steps, settings: [version(30)] }, { ...window, toMs: AT_MS - 10 * DAY_MS }),
    ).toEqual([]);
  });

  it('are changes of the channel once for all phases; a step, settings and works are told by their own records', () => {
    const on = new Date(AT_MS - 20 * DAY_MS).toISOString().slice(0, 10);
    const others = (['work recorded', 'step', 'settings changed', 'channel path changed'] as const).map(
      (kind) => ({ on, kind }),
    );
    const marks = trendMarks({ ...nothing, others: [...others, ...others] }, window);
    expect(marks.map(({ kind, words }) => [kind, words])).toEqual([['mark', 'channel path']]);
  });

  it('recorded work stands in the middle of its day, and says in full what was done', () => {
    const works = [workOf(dayAt(12)), workOf(dayAt(90))];
    const marks = trendMarks({ ...nothing, works }, window);
    expect(marks).toEqual([
      {
        kind: 'work',
        atMs: Date.parse(`${dayAt(12)}T12:00:00Z`),
        words: 'work',
        told: 'work at Hask: Transformer of phase L2 exchanged',
      },
    ]);
    expect(markDay(marks[0]!, SITE.timeZone)).toBe(dayAt(12));
  });

  it('recorded work is not marked in a window of hours, for which its day is too coarse', () => {
    const day = { fromMs: AT_MS - DAY_MS, toMs: AT_MS };
    expect(trendMarks({ ...nothing, works: [workOf(dayAt(0))] }, day)).toEqual([]);
    const week = { fromMs: AT_MS - 7 * DAY_MS, toMs: AT_MS };
    expect(trendMarks({ ...nothing, works: [workOf(dayAt(1))] }, week)).toHaveLength(1);
  });

  it('a change is compared at the site’s day', () => {
    const mark = { kind: 'settings', atMs: Date.parse('2026-11-22T23:30:00Z'), words: '', told: '' } as const;
    expect(markDay(mark, SITE.timeZone)).toBe('2026-11-23');
  });

  it('are told at the day or the hour that they lie in, long words cut', () => {
    const [mark] = trendMarks({ ...nothing, works: [workOf('2026-11-20')] }, window);
    expect(marksTold([mark!], Date.parse('2026-11-20T12:00:00Z'), 'day')).toEqual([mark!.told]);
    expect(marksTold([mark!], Date.parse('2026-11-21T12:00:00Z'), 'day')).toEqual([]);
    expect(marksTold([mark!], Date.parse('2026-11-20T12:30:00Z'), 'hour')).toEqual([mark!.told]);
    expect(marksTold([mark!], Date.parse('2026-11-20T14:30:00Z'), 'hour')).toEqual([]);
    const [told] = marksTold([{ ...mark!, told: 'x'.repeat(300) }], mark!.atMs, 'day');
    expect(told).toHaveLength(80);
  });

  it('words that would meet in one row take another', () => {
    const marks = trendMarks(
      { ...nothing, steps, settings: [version(400), version(9.5), version(9.2)] },
      window,
    );
    const rows = placedMarks(marks, window, 270).map(({ row, anchor }) => `${row} ${anchor}`);
    expect(new Set(rows).size).toBe(marks.length);
  });

  it('a trend of more days than have passed since the step was fitted across it', () => {
    expect(fittedAcross(step, 60, AT_MS)).toBe(true);
    expect(fittedAcross(step, 10, AT_MS)).toBe(false);
    expect(fittedAcross(null, 60, AT_MS)).toBe(false);
  });
});
