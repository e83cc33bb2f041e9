import { describe, expect, it } from 'vitest';
import { causeWindows } from '../../../src/ingest/verdict/cause-windows';

const TODAY = 1000;

describe('the days that say what moved', () => {
  it('are the last month against one two months earlier where no mark is between', () => {
    expect(causeWindows({ kind: 'drift' }, { today: TODAY, sinceDay: 200 })).toEqual({
      now: { from: 970, to: 1000 },
      before: { from: 910, to: 940 },
    });
  });

  it('are the end against the beginning of a shorter history, never across its mark', () => {
    expect(causeWindows({ kind: 'drift' }, { today: TODAY, sinceDay: 960 })).toEqual({
      now: { from: 980, to: 1000 },
      before: { from: 960, to: 980 },
    });
  });

  it('are none where a fortnight has not passed since the mark', () => {
    expect(causeWindows({ kind: 'drift' }, { today: TODAY, sinceDay: 990 })).toBeUndefined();
  });

  it('of a step lie on either side of it, without its own day and not across the mark before it', () => {
    const step = { kind: 'step', stepDay: 900, markDayBefore: 880 } as const;
    expect(causeWindows(step, { today: TODAY, sinceDay: 901 })).toEqual({
      now: { from: 901, to: 931 },
      before: { from: 881, to: 900 },
    });
  });

  it('of a new step are none until a week has passed', () => {
    const step = { kind: 'step', stepDay: 996, markDayBefore: undefined } as const;
    expect(causeWindows(step, { today: TODAY, sinceDay: 997 })).toBeUndefined();
  });

  it('of a level that stands still are none', () => {
    expect(causeWindows({ kind: 'nothing' }, { today: TODAY, sinceDay: 0 })).toBeUndefined();
  });
});
