import { describe, expect, it } from 'vitest';
import type { LineList } from '../../src/contract/lines';
import type { Result } from '../../src/contract/result';
import type { Warning } from '../../src/contract/warning';
import { mergeLive } from '../../src/view/merge-live';
import { openWarnings } from '../../src/view/open-warnings';
import { AT, lineWith, phaseAt, warningWith } from './sample-lines';

const list = (warnings: Warning[] = []): LineList => ({
  at: AT,
  nearRatio: 0.7,
  lines: [lineWith({ warnings })],
});
const result = (change: Partial<Result>): Result => ({
  line: 'skelder-hask',
  at: '2026-12-01T13:32:10.000Z',
  publishedAt: '2026-12-01T13:32:10.400Z',
  condition: 'near',
  reason: null,
  phases: { a: phaseAt(0.8), b: phaseAt(0.2), c: phaseAt(0.2) },
  throughAmps: 500,
  throughRatio: 0.6,
  compensation: 'none',
  settingsVersion: 2,
  terminals: [],
  ...change,
});
const byKey = (one: Result) => new Map([[one.line, one]]);
const byId = (...warnings: Warning[]) => new Map(warnings.map((warning) => [warning.id, warning]));
const NO_RESULTS = new Map<string, Result>();
const NO_WARNINGS = new Map<number, Warning>();

describe('a list moved on by the stream', () => {
  it('takes figures and condition from a newer result and keeps the rest', () => {
    const [line] = mergeLive(list(), byKey(result({})), NO_WARNINGS);
    expect(line).toMatchObject({
      condition: 'near',
      throughRatio: 0.6,
      name: 'Skelder – Hask',
      pickupAmps: 60,
    });
  });

  it('does not go back to an older result, nor to one that has heard nothing', () => {
    for (const at of ['2026-12-01T13:32:06.000Z', null])
      expect(mergeLive(list(), byKey(result({ at })), NO_WARNINGS)[0]!.condition).toBe('settled');
  });

  it('hands out the same line while nothing of it has changed', () => {
    const known = list();
    const results = byKey(result({}));
    expect(mergeLive(known, results, NO_WARNINGS)[0]).toBe(mergeLive(known, results, NO_WARNINGS)[0]);
    expect(mergeLive(known, NO_RESULTS, NO_WARNINGS)[0]).toBe(known.lines[0]);
  });

  it('keeps the newest of each warning', () => {
    const acknowledged = warningWith({ state: 'acknowledged', changedAt: '2026-12-01T13:32:09.000Z' });
    expect(mergeLive(list([warningWith()]), NO_RESULTS, byId(acknowledged))[0]!.warnings).toEqual([
      acknowledged,
    ]);
    expect(mergeLive(list([acknowledged]), NO_RESULTS, byId(warningWith()))[0]!.warnings).toEqual([
      acknowledged,
    ]);
  });

  it('lets a warning go that is acknowledged and back to normal', () => {
    const gone = warningWith({ state: 'normal', changedAt: '2026-12-01T13:32:09.000Z' });
    expect(mergeLive(list([warningWith()]), NO_RESULTS, byId(gone))[0]!.warnings).toEqual([]);
  });

  it('takes a warning that opened after the list, and none that the list has long been without', () => {
    const opened = warningWith({ id: 2, changedAt: '2026-12-01T13:32:09.000Z' });
    const longGone = warningWith({ id: 3, state: 'acknowledged', changedAt: '2026-12-01T13:20:00.000Z' });
    expect(mergeLive(list(), NO_RESULTS, byId(opened, longGone))[0]!.warnings).toEqual([opened]);
  });
});

describe('open warnings', () => {
  it('stand unacknowledged first, then worse before milder, then the newest', () => {
    const warnings = [
      warningWith({ id: 1, kind: 'near', acknowledgedAt: AT, state: 'acknowledged' }),
      warningWith({ id: 2, kind: 'blind' }),
      warningWith({ id: 3, kind: 'near' }),
      warningWith({ id: 4, kind: 'near', openedAt: '2026-12-01T13:30:00.000Z' }),
      warningWith({ id: 5, kind: 'near', state: 'normal' }),
    ];
    expect(openWarnings([lineWith({ warnings })]).map(({ warning }) => warning.id)).toEqual([4, 3, 2, 1]);
  });
});
