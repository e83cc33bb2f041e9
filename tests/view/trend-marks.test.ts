import { describe, expect, it } from 'vitest';
import type { SettingsVersion } from '../../src/contract/settings-version';
import type { StepOnWire } from '../../src/contract/standing';
import { fittedAcross, placedMarks, trendMarks } from '../../src/view/trend-marks';
import { AT_MS } from './sample-lines';

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

describe('marks on the trend', () => {
  it('are the step and the later settings inside the window; the first version changed nothing', () => {
    const marks = trendMarks(
      { steps, settings: [version(30), version(20), version(400)], others: [] },
      window,
    );
    expect(marks.map(({ kind, atMs }) => [kind, (AT_MS - atMs) / DAY_MS])).toEqual([
      ['step', 9],
      ['settings', 30],
      ['settings', 20],
    ]);
    expect(
      trendMarks({ steps, settings: [version(30)], others: [] }, { ...window, toMs: AT_MS - 10 * DAY_MS }),
    ).toEqual([]);
  });

  it('are recorded works and changes of the channel once for all phases, and no step or settings twice', () => {
    const on = new Date(AT_MS - 20 * DAY_MS).toISOString().slice(0, 10);
    const others = (['work recorded', 'step', 'settings changed', 'channel path changed'] as const).map(
      (kind) => ({ on, kind }),
    );
    const marks = trendMarks({ steps: [], settings: [], others: [...others, ...others] }, window);
    expect(marks.map(({ kind, words }) => [kind, words])).toEqual([
      ['mark', 'work'],
      ['mark', 'channel path'],
    ]);
  });

  it('words that would meet in one row take another', () => {
    const marks = trendMarks(
      { steps, settings: [version(400), version(9.5), version(9.2)], others: [] },
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
