import { beforeEach, describe, expect, it } from 'vitest';
import type { Creep } from '../../src/contract/warning';
import {
  type LevelRow,
  readCreep,
  readLevels,
  readNewestHour,
  replaceCreep,
  writeLevels,
} from '../../src/store/levels';
import { creepVerdict, dayLevel, hourLevel } from '../../src/store/schema/levels';
import { testStore } from '../database';

const START = Date.parse('2026-03-29T00:00:00Z');
const HOUR_MS = 3_600_000;
const store = await testStore();
beforeEach(async () => {
  for (const table of [hourLevel, dayLevel, creepVerdict]) await store.db.delete(table);
});

const level = (hour: number, phase: 'a' | 'b' | 'c', medianAmps: number | null, lineId = 7): LevelRow => ({
  lineId,
  phase,
  start: new Date(START + hour * HOUR_MS),
  leastAmps: medianAmps && medianAmps - 1,
  p05Amps: medianAmps && medianAmps - 0.5,
  medianAmps,
  p95Amps: medianAmps && medianAmps + 0.5,
  greatestAmps: medianAmps && medianAmps + 1,
  meanRestraintAmps: medianAmps && 400.123456789,
  meanThroughAmps: medianAmps && 400,
  greatestUtilisation: medianAmps && medianAmps / 120,
  qualifiedCount: medianAmps === null ? 0 : 1_800,
  allCount: 1_800,
  disqualified: { unsteady: 3 },
  sums: null,
  channelPath: '1:main 2:main',
});
const hours = (from: number, to: number, lineIds = [7]) =>
  readLevels(store, 'hour', {
    lineIds,
    from: new Date(START + from * HOUR_MS),
    to: new Date(START + to * HOUR_MS),
  });

describe('level rows', () => {
  it('come back as they were written, nulls and all, in the order of time and phase', async () => {
    const rows = [level(0, 'a', 10), level(0, 'b', null), level(1, 'a', 11), level(2, 'a', 12)];
    await writeLevels(store, 'hour', rows.toReversed());
    expect(await hours(0, 24)).toEqual(rows);
  });

  it('written again replace those of the same line, phase and start', async () => {
    await writeLevels(store, 'hour', [level(0, 'a', 10), level(0, 'b', 20)]);
    await writeLevels(store, 'hour', [level(0, 'a', null)]);
    expect(await hours(0, 24)).toEqual([level(0, 'a', null), level(0, 'b', 20)]);
  });

  it('of hours and of days lie apart', async () => {
    await writeLevels(store, 'day', [level(0, 'a', 10)]);
    expect(await hours(0, 24)).toEqual([]);
  });

  it('of a window take its start and leave its end', async () => {
    await writeLevels(
      store,
      'hour',
      [0, 1, 2].map((hour) => level(hour, 'a', 10 + hour)),
    );
    expect((await hours(1, 2)).map(({ medianAmps }) => medianAmps)).toEqual([11]);
  });

  it('of several lines are read together, and of none are none', async () => {
    await writeLevels(store, 'hour', [level(0, 'a', 10, 7), level(0, 'a', 20, 8), level(0, 'a', 30, 9)]);
    expect((await hours(0, 1, [7, 9])).map(({ lineId }) => lineId).sort()).toEqual([7, 9]);
    expect(await hours(0, 1, [])).toEqual([]);
  });

  it('may be more than one statement holds', async () => {
    const rows = Array.from({ length: 1_201 }, (_, hour) => level(hour, 'a', 10));
    await writeLevels(store, 'hour', rows);
    expect(await hours(0, 2_000)).toHaveLength(1_201);
  });

  it('tell the newest hour of a line, or that there is none', async () => {
    await writeLevels(store, 'hour', [level(5, 'a', 10), level(3, 'a', 10), level(9, 'a', 10, 8)]);
    expect(await readNewestHour(store, 7)).toEqual(new Date(START + 5 * HOUR_MS));
    expect(await readNewestHour(store, 99)).toBeUndefined();
  });
});

describe('kept verdicts on drift', () => {
  const drift = (phase: Creep['phase'], slopeAmpsPerMonth: number): Creep => ({
    phase,
    verdict: 'creep',
    slopeAmpsPerMonth,
    slopeLowAmpsPerMonth: 1,
    slopeHighAmpsPerMonth: 3,
    pTwoSided: 0.0012,
    days: 60,
    levelNowAmps: 40,
    near: { earliest: '2026-05-01', likely: '2026-06-01', latest: null },
    pickup: { earliest: null, likely: null, latest: null },
  });
  const replace = (lineId: number, ...creep: Creep[]) =>
    replaceCreep(store, lineId, { creep, computedAt: new Date(START) });

  it('are those of the newest look: what is no longer found is gone', async () => {
    await replace(7, drift('a', 2), drift('b', 1));
    await replace(8, drift('c', 5));
    await replace(7, drift('a', 2.5));
    expect(await readCreep(store, [7, 8, 9])).toEqual(
      new Map([
        [7, [drift('a', 2.5)]],
        [8, [drift('c', 5)]],
        [9, []],
      ]),
    );
    await replace(7);
    expect((await readCreep(store, [7])).get(7)).toEqual([]);
    expect(await readCreep(store, [])).toEqual(new Map());
  });
});
