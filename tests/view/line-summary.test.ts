import { describe, expect, it } from 'vitest';
import { lineSummarySchema } from '../../src/contract/lines';
import type { Result } from '../../src/contract/result';
import type { LevelRow } from '../../src/store/levels';
import type { RegisteredLine } from '../../src/store/register';
import { type LineKnowledge, lineSummary } from '../../src/view/line-summary';
import { AT_MS, iso, registeredLine, settingsVersion, withTransformer } from '../ingest/made-up-feed';

const SILENT_AFTER_MS = 20_000;
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

const phase = (differentialAmps: number) => ({
  differentialAmps,
  restraintAmps: 400,
  thresholdAmps: 120,
  utilisation: differentialAmps / 120,
});
const result = (change: Partial<Result> = {}): Result => ({
  line: 'arden-birk',
  at: iso(AT_MS - 1_000),
  publishedAt: iso(AT_MS - 900),
  condition: 'settled',
  reason: null,
  phases: { a: phase(9), b: phase(8), c: phase(12) },
  throughAmps: 400,
  throughRatio: 0.4,
  compensation: 'none',
  settingsVersion: 1,
  terminals: [],
  ...change,
});
const level = (startMs: number, of: LevelRow['phase'], medianAmps: number | null): LevelRow => ({
  lineId: 7,
  phase: of,
  start: new Date(startMs),
  leastAmps: medianAmps,
  p05Amps: medianAmps === null ? null : medianAmps - 1,
  medianAmps,
  p95Amps: medianAmps === null ? null : medianAmps + 2,
  greatestAmps: medianAmps,
  meanRestraintAmps: null,
  meanThroughAmps: null,
  greatestUtilisation: null,
  disqualified: {},
  sums: null,
  channelPath: null,
  qualifiedCount: 1,
  allCount: 1,
});

function summary(known: Partial<LineKnowledge> = {}, line: Partial<RegisteredLine> = {}) {
  const all: LineKnowledge = {
    result: result(),
    hours: [],
    days: [],
    creep: [],
    warnings: [],
    nowMs: AT_MS,
    silentAfterMs: SILENT_AFTER_MS,
    nominalFrequencyHz: 50,
    ...known,
  };
  const { id: _id, terminalIds: _terminalIds, ...entry } = registeredLine(line);
  const made = lineSummary(entry, all);
  expect(lineSummarySchema.parse(JSON.parse(JSON.stringify(made)))).toEqual(made);
  return made;
}

describe('the condition of a line in a list', () => {
  it.each(['settled', 'rising', 'near', 'over', 'blind', 'out of service'] as const)(
    'is what the worker has just published: %s',
    (condition) => {
      expect(summary({ result: result({ condition }) }).condition).toBe(condition);
    },
  );

  it.each([
    ['with a fresh result', result()],
    ['with none', undefined],
  ])('is not evaluated without settings, and never settled (%s)', (_, known) => {
    const {
      condition,
      reason,
      pickupAmps,
      settingsVersion: version,
    } = summary({ result: known }, { settings: [] });
    expect(condition).toBe('not evaluated');
    expect(reason).toBe('The register holds no settings for this line.');
    expect([pickupAmps, version]).toEqual([null, null]);
  });

  it('is not evaluated with a transformer in the zone', () => {
    expect(summary({}, withTransformer())).toMatchObject({
      condition: 'not evaluated',
      ...withTransformer(),
    });
  });

  it('is out of service as soon as the register says so, whatever was published before', () => {
    expect(summary({ result: result({ condition: 'near' }) }, { inService: false }).condition).toBe(
      'out of service',
    );
  });

  it('is blind while nothing has been heard, with every figure null', () => {
    const unheard = summary({ result: undefined });
    expect(unheard).toMatchObject({ condition: 'blind', at: null, throughAmps: null, throughRatio: null });
    expect(unheard.reason).toBe('Nothing has been heard of this line yet.');
    for (const one of Object.values(unheard.phases))
      expect(Object.values(one)).toEqual([null, null, null, null]);
  });

  it.each([
    ['as old as is allowed', SILENT_AFTER_MS, 'settled'],
    ['1 ms older', SILENT_AFTER_MS + 1, 'blind'],
  ])('is judged by the age of its result: %s', (_, ageMs, condition) => {
    const old = result({ publishedAt: iso(AT_MS - ageMs) });
    expect(summary({ result: old }).condition).toBe(condition);
  });

  it('that has gone blind by age says who may be away, and keeps its last figures and their instant', () => {
    const old = result({ publishedAt: iso(AT_MS - 60_000), at: iso(AT_MS - 60_100), condition: 'over' });
    expect(summary({ result: old })).toMatchObject({
      condition: 'blind',
      reason: expect.stringMatching(/No new result.*the feed, the broker or the worker/) as string,
      at: iso(AT_MS - 60_100),
      phases: { c: { differentialAmps: 12 } },
    });
  });

  it('keeps the worker’s own reason for blindness, however old', () => {
    const blind = result({
      publishedAt: iso(AT_MS - DAY_MS),
      condition: 'blind',
      reason: 'Birk sent nothing.',
    });
    expect(summary({ result: blind })).toMatchObject({ condition: 'blind', reason: 'Birk sent nothing.' });
  });
});

describe('what cannot be told', () => {
  it('stays null where the result holds null', () => {
    const nothing = { differentialAmps: null, restraintAmps: null, thresholdAmps: null, utilisation: null };
    const phases = { a: nothing, b: nothing, c: nothing };
    const made = summary({ result: result({ phases, throughAmps: null, throughRatio: null }) });
    expect(made).toMatchObject({ phases, throughAmps: null, throughRatio: null });
  });

  it('is the charging current of a line whose capacitance is not known', () => {
    expect(summary({}, { capacitanceNfPerKm: null }).chargingAmps).toBeNull();
    // 2π · 50 Hz · 8.9 nF/km · 42.5 km · 220 kV / √3
    expect(summary().chargingAmps).toBeCloseTo(15.094, 3);
    expect(summary({ nominalFrequencyHz: 60 }).chargingAmps).toBeCloseTo(18.112, 3);
  });

  it('is the last day of a phase without a qualified hour', () => {
    const hours = [level(AT_MS - HOUR_MS, 'a', null), level(AT_MS - HOUR_MS, 'b', 10)];
    const { lastDay } = summary({ hours });
    expect(lastDay.a).toBeNull();
    expect(lastDay.c).toBeNull();
    // one hour is no standing level of a day
    expect(lastDay.b).toEqual({ standingAmps: null, p05Amps: 9, p95Amps: 12 });
  });
});

describe('the last day of a phase', () => {
  it('is the median of its hours, and the band from the lowest to the highest of their percentiles', () => {
    const hours = [5, 30, 10, 12].map((amps, hour) => level(AT_MS - (4 - hour) * HOUR_MS, 'a', amps));
    expect(summary({ hours }).lastDay.a).toEqual({ standingAmps: 11, p05Amps: 4, p95Amps: 32 });
  });
});

describe('the daily history in small', () => {
  const day = (offset: number) => Date.parse('2026-02-20T00:00:00Z') + offset * DAY_MS;

  it('is that of the phase which stands highest now, with null for days that have no level', () => {
    const days = [
      level(day(0), 'a', 50),
      level(day(0), 'b', 10),
      level(day(1), 'a', null),
      level(day(1), 'b', null),
      level(day(2), 'a', 20),
      level(day(2), 'b', 30),
    ];
    expect(summary({ days }).dailyLevels).toEqual([
      { day: '2026-02-20', levelAmps: 10 },
      { day: '2026-02-21', levelAmps: null },
      { day: '2026-02-22', levelAmps: 30 },
    ]);
  });

  it('is empty without any day', () => {
    expect(summary().dailyLevels).toEqual([]);
  });
});

describe('the settings in a list', () => {
  const settings = [
    settingsVersion(1, '2026-01-01T00:00:00.000Z', 120),
    settingsVersion(2, '2026-06-01T00:00:00.000Z', 200),
  ];
  it('are those in force now', () => {
    expect(summary({}, { settings })).toMatchObject({ pickupAmps: 120, settingsVersion: 1 });
    const later = { nowMs: Date.parse('2026-06-01T00:00:00Z') };
    expect(summary(later, { settings })).toMatchObject({ pickupAmps: 200, settingsVersion: 2 });
  });
});
