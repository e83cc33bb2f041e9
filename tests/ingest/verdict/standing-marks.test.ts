import { describe, expect, it } from 'vitest';
import { type LineHistory, rowsOf } from '../../../src/ingest/verdict/line-history';
import { pathChangeStarts, standingMarks } from '../../../src/ingest/verdict/standing-marks';
import type { LevelRow } from '../../../src/store/levels';
import { dateOfDay } from '../../../src/view/day-sums';
import { demoHistoryOf, demoRosterLine, verdictOf } from '../demo-history';

const NOW_MS = Date.UTC(2026, 0, 12);
const DAY_MS = 86_400_000;
const TODAY = NOW_MS / DAY_MS;
const day = (ago: number): string => dateOfDay(TODAY - ago);

const line = demoRosterLine('dunmarsh-oxhollow');
const history = demoHistoryOf(line, { nowMs: NOW_MS, epochMs: NOW_MS, days: 60, sampleMs: 1_800_000 });
const withWork = (ago: number): LineHistory => ({
  ...history,
  works: [{ doneOn: day(ago), terminal: null }],
});

const row = (hour: number, channelPath: string | null): LevelRow => ({
  ...history.hours[0]!,
  start: new Date(hour * 3_600_000),
  channelPath,
});

describe('a channel’s path', () => {
  it('has changed where a terminal says another one than before', () => {
    const rows = [row(0, '1:main 2:main'), row(1, '1:main 2:main'), row(2, '1:reserve 2:main')];
    expect(pathChangeStarts(rows)).toEqual([2 * 3_600_000]);
  });

  it('has not changed where a terminal was silent, or said nothing of it', () => {
    const rows = [row(0, '1:main 2:main'), row(1, '1:main'), row(2, null), row(3, '1:main 2:main')];
    expect(pathChangeStarts(rows)).toEqual([]);
  });
});

describe('what parts a phase’s history', () => {
  it('is nothing on a line to which nothing was done', () => {
    expect(standingMarks(line, history, { phase: 'a', step: null })).toEqual([]);
  });

  it('is a change of the channel’s path by the days’ rows, newest first with recorded work', () => {
    const changed = demoRosterLine('dunmarsh-pellan-cross');
    const told = demoHistoryOf(changed, { nowMs: NOW_MS, epochMs: NOW_MS, days: 30, sampleMs: 1_800_000 });
    const marks = standingMarks(
      changed,
      { ...told, works: [{ doneOn: day(20), terminal: null }] },
      { phase: 'a', step: null },
    );
    expect(marks).toEqual([
      { day: TODAY - 13, kind: 'channel path changed' },
      { day: TODAY - 20, kind: 'work recorded' },
    ]);
  });

  it('is a change of the number of terminals', () => {
    const three = demoHistoryOf(demoRosterLine('low-pell-skelder-hask'), {
      nowMs: NOW_MS,
      epochMs: NOW_MS,
      days: 10,
      sampleMs: 1_800_000,
    });
    const days = [
      ...rowsOf(history.days, 'a').filter(({ start }) => start.getTime() < NOW_MS - 10 * DAY_MS),
      ...three.days,
    ];
    const marks = standingMarks(line, { ...history, days }, { phase: 'a', step: null });
    expect(marks).toEqual([{ day: TODAY - 10, kind: 'terminals changed' }]);
  });

  it('is no work from before the history or after today', () => {
    for (const ago of [61, -3])
      expect(standingMarks(line, withWork(ago), { phase: 'a', step: null })).toEqual([]);
  });
});

describe('utilisation at emergency rating', () => {
  it('rises with a creeping ratio, and is forecast', () => {
    const { emergencyCreep, emergencyUtilisation } = verdictOf(line, history, 'a');
    expect(emergencyCreep!.utilisationNow).toBeCloseTo(emergencyUtilisation!, 1);
    expect(emergencyCreep!.slopeLowPerMonth).toBeGreaterThan(0);
    expect(emergencyCreep!.near.likely! > day(0)).toBe(true);
    expect(emergencyCreep!.over.likely! > emergencyCreep!.near.likely!).toBe(true);
  });

  it('has no rise on a settled phase', () => {
    const settled = verdictOf(line, history, 'b');
    expect(settled.emergencyUtilisation).toBeGreaterThan(0);
    expect(settled.emergencyCreep).toBeNull();
  });
});

describe('a creep on a line on which work was recorded', () => {
  const creeping = verdictOf(line, history, 'a');
  const worked = verdictOf(line, withWork(25), 'a');

  it('is taken since the work alone, and says so', () => {
    expect(creeping.driftSince).toBeNull();
    expect(worked.driftSince).toEqual({ on: day(25), kind: 'work recorded' });
    expect(creeping.creepAtReference!.creep.days).toBeGreaterThan(24);
    expect(worked.creepAtReference!.creep.days).toBe(24);
    expect(worked.marks).toEqual([{ on: day(25), kind: 'work recorded' }]);
  });

  it('has its composition since the work, and what moved held against the days since then', () => {
    expect(worked.composition).toMatchObject({ from: day(24), to: day(0) });
    // a fortnight of it changes the ratio by less than the load’s unbalance wanders: both ends are named
    expect([worked.likelyCause, worked.causePlace]).toEqual([
      'ratio mismatch',
      { terminal: 'oxhollow', against: 'dunmarsh' },
    ]);
  });
});
