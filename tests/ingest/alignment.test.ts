import { describe, expect, it } from 'vitest';
import { createAlignment, type Gathered, joined } from '../../src/ingest/alignment';
import type { RosterLine } from '../../src/ingest/roster';
import { AT_MS, iso, measurement, registeredLine, reportedMeasurement, rosterLine } from './made-up-feed';

const LATENESS_MS = 2_000;
const PERIOD_MS = 2_000;
const LIMITS = { latenessMs: LATENESS_MS, closedRemembered: 300, pendingMost: 1_000 };
const LINE = rosterLine();
const THREE_ENDED = rosterLine(registeredLine({ key: 'arden-birk-corl' }, ['arden', 'birk', 'corl']));

/** An alignment to which terminals speak by name; the receipt says who spoke and how often that was. */
function gathering(limits: Partial<typeof LIMITS> = {}, line: RosterLine = LINE) {
  const alignment = createAlignment<string>({ ...LIMITS, ...limits });
  let spoken = 0;
  return {
    alignment,
    hears(terminal: string, said: { atMs?: number; nowMs?: number; seq?: number } = {}) {
      const { atMs = AT_MS, nowMs = atMs, seq = 1 } = said;
      spoken += 1;
      return alignment.take({
        line,
        terminal,
        atMs,
        measurement: measurement({ at: iso(atMs), seq }),
        receipt: `${terminal} ${spoken}`,
        nowMs,
      });
    },
  };
}

function gathered(outcome: Gathered<string> | 'waiting' | 'duplicate'): Gathered<string> {
  if (typeof outcome === 'string') throw new Error(`Nothing was gathered; the outcome is ${outcome}.`);
  return outcome;
}
const seqOf = ({ measurements }: Gathered<string>, terminal: string) => measurements.get(terminal)?.seq;
const terminalsOf = ({ measurements }: Gathered<string>) => [...measurements.keys()].sort();

describe('an instant', () => {
  it('is complete when every expected terminal has spoken, and hands over every receipt', () => {
    const { hears, alignment } = gathering();
    expect(hears('arden')).toBe('waiting');
    const complete = gathered(hears('birk'));
    expect(complete).toMatchObject({
      atMs: AT_MS,
      receipts: ['arden 1', 'birk 2'],
      mayBeStored: false,
    });
    expect(terminalsOf(complete)).toEqual(['arden', 'birk']);
    expect(alignment.pendingCount()).toBe(0);
  });

  it('of three terminals is the same whoever speaks first', () => {
    const orders = [
      ['arden', 'birk', 'corl'],
      ['arden', 'corl', 'birk'],
      ['birk', 'arden', 'corl'],
      ['birk', 'corl', 'arden'],
      ['corl', 'arden', 'birk'],
      ['corl', 'birk', 'arden'],
    ];
    for (const [first, second, last] of orders) {
      const { hears } = gathering({}, THREE_ENDED);
      expect([hears(first!), hears(second!)]).toEqual(['waiting', 'waiting']);
      expect(terminalsOf(gathered(hears(last!)))).toEqual(['arden', 'birk', 'corl']);
    }
  });

  it('is kept apart from another instant and from another line', () => {
    const alignment = createAlignment<string>(LIMITS);
    const hears = (line: RosterLine, terminal: string, atMs: number) =>
      alignment.take({ line, terminal, atMs, measurement: measurement(), receipt: '', nowMs: atMs });
    expect(hears(LINE, 'arden', AT_MS)).toBe('waiting');
    expect(hears(LINE, 'birk', AT_MS + PERIOD_MS)).toBe('waiting');
    expect(hears(THREE_ENDED, 'birk', AT_MS)).toBe('waiting');
    expect(alignment.pendingCount()).toBe(3);
  });

  it('of a line that goes by reported magnitudes is complete with its first terminal alone', () => {
    const line = rosterLine(registeredLine({ goesBy: 'reported' }));
    const alignment = createAlignment<string>(LIMITS);
    const outcome = alignment.take({
      line,
      terminal: 'arden',
      atMs: AT_MS,
      measurement: reportedMeasurement(),
      receipt: 'arden',
      nowMs: AT_MS,
    });
    expect(terminalsOf(gathered(outcome))).toEqual(['arden']);
  });

  it('does not wait for a terminal that is out of service', () => {
    const [arden, birk] = registeredLine().terminals;
    const line = rosterLine(registeredLine({ terminals: [arden!, { ...birk!, inService: false }] }));
    expect(terminalsOf(gathered(gathering({}, line).hears('arden')))).toEqual(['arden']);
  });
});

describe('an instant that lacks a terminal', () => {
  it('is closed as it is when the lateness has passed since its first arrival, and not before', () => {
    const { hears, alignment } = gathering();
    hears('arden', { nowMs: AT_MS + 150 });
    expect(alignment.due(AT_MS + 150 + LATENESS_MS - 1)).toEqual([]);
    const [closed, ...others] = alignment.due(AT_MS + 150 + LATENESS_MS);
    expect(terminalsOf(closed!)).toEqual(['arden']);
    expect(others).toEqual([]);
    expect(alignment.due(AT_MS + 60_000)).toEqual([]);
  });

  it('does not wait for a clock that was set back to catch up', () => {
    const { hears, alignment } = gathering();
    hears('arden');
    expect(alignment.due(AT_MS - 3_600_000)).toHaveLength(1);
  });

  it('is completed by the late measurement, with what it had and the late receipt alone', () => {
    const { hears, alignment } = gathering();
    hears('arden');
    alignment.due(AT_MS + LATENESS_MS);
    const completed = gathered(hears('birk', { nowMs: AT_MS + 30_000 }));
    expect(terminalsOf(completed)).toEqual(['arden', 'birk']);
    expect(completed.receipts).toEqual(['birk 2']);
  });

  it('is closed again, still incomplete, when the late one was not the last that it lacked', () => {
    const { hears, alignment } = gathering({}, THREE_ENDED);
    hears('arden');
    alignment.due(AT_MS + LATENESS_MS);
    expect(hears('corl', { nowMs: AT_MS + 10_000 })).toBe('waiting');
    const [closed] = alignment.due(AT_MS + 10_000 + LATENESS_MS);
    expect(terminalsOf(closed!)).toEqual(['arden', 'corl']);
    expect(terminalsOf(gathered(hears('birk', { nowMs: AT_MS + 60_000 })))).toEqual([
      'arden',
      'birk',
      'corl',
    ]);
  });
});

describe('a duplicate', () => {
  it('of a pending instant changes nothing: the first word stands, and both receipts are handed over', () => {
    const { hears } = gathering();
    hears('arden', { seq: 1 });
    expect(hears('arden', { seq: 99 })).toBe('waiting');
    const complete = gathered(hears('birk'));
    expect(seqOf(complete, 'arden')).toBe(1);
    expect(complete.receipts).toEqual(['arden 1', 'arden 2', 'birk 3']);
  });

  it.each(['arden', 'birk'])('of a complete instant changes nothing (%s)', (terminal) => {
    const { hears, alignment } = gathering();
    hears('arden');
    hears('birk');
    expect(hears(terminal, { seq: 99 })).toBe('duplicate');
    expect(alignment.pendingCount()).toBe(0);
  });

  it('of an instant closed as incomplete changes nothing, and the missing terminal still completes it', () => {
    const { hears, alignment } = gathering();
    hears('arden', { seq: 1 });
    alignment.due(AT_MS + LATENESS_MS);
    expect(hears('arden', { seq: 99 })).toBe('duplicate');
    expect(seqOf(gathered(hears('birk')), 'arden')).toBe(1);
  });
});

describe('what the store may hold already', () => {
  it('is an instant no newer than the newest recalled', () => {
    const { hears, alignment } = gathering();
    alignment.recall('arden-birk', AT_MS);
    const outcomes = [AT_MS - PERIOD_MS, AT_MS, AT_MS + PERIOD_MS].map((atMs) => {
      hears('arden', { atMs });
      return gathered(hears('birk', { atMs })).mayBeStored;
    });
    expect(outcomes).toEqual([true, true, false]);
  });

  it('is not what another line recalls', () => {
    const { hears, alignment } = gathering();
    alignment.recall('corl-dorn', AT_MS + 60_000);
    hears('arden');
    expect(gathered(hears('birk')).mayBeStored).toBe(false);
  });

  it('is an older instant that comes for the first time after a newer one', () => {
    const { hears } = gathering();
    hears('arden', { atMs: AT_MS + PERIOD_MS });
    hears('arden');
    expect(gathered(hears('birk')).mayBeStored).toBe(true);
  });

  it('is an instant that was closed as incomplete: its row may hold more than this run has heard', () => {
    const { hears, alignment } = gathering();
    alignment.recall('arden-birk', AT_MS);
    hears('arden');
    alignment.due(AT_MS + LATENESS_MS);
    expect(gathered(hears('birk', { nowMs: AT_MS + 3_000 })).mayBeStored).toBe(true);
  });

  it('is an instant so long closed that it is no longer remembered', () => {
    const { hears, alignment } = gathering({ closedRemembered: 3 });
    for (let period = 0; period < 4; period += 1) {
      hears('arden', { atMs: AT_MS + period * PERIOD_MS });
      hears('birk', { atMs: AT_MS + period * PERIOD_MS });
    }
    expect(hears('arden', { atMs: AT_MS + PERIOD_MS })).toBe('duplicate');
    expect(hears('arden', { atMs: AT_MS })).toBe('waiting');
    expect(alignment.due(AT_MS + 60_000)[0]).toMatchObject({ atMs: AT_MS, mayBeStored: true });
  });
});

describe('more pending instants than are allowed', () => {
  it('close the oldest arrivals at once, until as many wait as may', () => {
    const { hears, alignment } = gathering({ pendingMost: 3 });
    for (let period = 0; period < 5; period += 1)
      hears('arden', { atMs: AT_MS + period * PERIOD_MS, nowMs: AT_MS });
    expect(alignment.due(AT_MS).map(({ atMs }) => atMs)).toEqual([AT_MS, AT_MS + PERIOD_MS]);
    expect(alignment.pendingCount()).toBe(3);
  });
});

describe('parts of one instant, gathered at different times', () => {
  it('are joined into one, in which the first word of a terminal stands', () => {
    const part = (terminals: string[], seq: number, mayBeStored: boolean): Gathered<string> => ({
      line: THREE_ENDED,
      atMs: AT_MS,
      measurements: new Map(terminals.map((terminal) => [terminal, measurement({ seq })])),
      receipts: terminals.map((terminal) => `${terminal} ${seq}`),
      mayBeStored,
    });
    const other = { ...part(['arden'], 3, false), atMs: AT_MS + PERIOD_MS };
    const [whole, ...others] = joined([
      part(['arden', 'corl'], 1, false),
      other,
      part(['corl', 'birk'], 2, true),
    ]);
    expect(others).toEqual([other]);
    expect(whole).toMatchObject({
      mayBeStored: true,
      receipts: ['arden 1', 'corl 1', 'corl 2', 'birk 2'],
    });
    expect(['arden', 'birk', 'corl'].map((terminal) => seqOf(whole!, terminal))).toEqual([1, 2, 1]);
  });
});
