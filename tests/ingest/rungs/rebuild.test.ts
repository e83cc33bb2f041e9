import { beforeEach, describe, expect, it } from 'vitest';
import { commitBatch } from '../../../src/ingest/commit';
import { catchUpRungs, rebuildRung } from '../../../src/ingest/rungs/rebuild';
import { type RosterLine, rosterLine } from '../../../src/ingest/roster';
import {
  type LevelRow,
  readLevels,
  readStaleHours,
  writeLevels,
  writeStaleHours,
} from '../../../src/store/levels';
import { staleHour } from '../../../src/store/schema/levels';
import { dayLevel, hourLevel } from '../../../src/store/schema/levels';
import { line as lineTable } from '../../../src/store/schema/register';
import { snapshot } from '../../../src/store/schema/snapshots';
import { testStore } from '../../database';
import { seededRandom } from '../../protection/seeded-random';
import { snapshotRowOf, storedLine, storeRows } from '../../store/made-up-rows';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const DAY = Date.parse('2026-03-02T00:00:00Z');
const RAW_REACH_MS = 14 * DAY_MS;
const ALL = { from: new Date(0), to: new Date(DAY + 30 * DAY_MS) };

const store = await testStore();
let line: RosterLine;
beforeEach(async () => {
  for (const table of [snapshot, hourLevel, dayLevel, staleHour, lineTable]) await store.db.delete(table);
  line = rosterLine(await storedLine(store), 50);
});

const levels = (rung: 'hour' | 'day'): Promise<LevelRow[]> =>
  readLevels(store, rung, { lineIds: [line.id], ...ALL });
const hoursOf = (rows: readonly LevelRow[]): number[] => [
  ...new Set(rows.map(({ start }) => (start.getTime() - DAY) / HOUR_MS)),
];
const catchUp = (nowMs: number) =>
  catchUpRungs(store, line, { nowMs, rawReachMs: RAW_REACH_MS, caughtUpMs: undefined });

/** Raw rows every minute of an hour of the day, at a level all their own. */
const storeHour = (hour: number, levelAmps: number, { from = 0, to = 60 } = {}): Promise<void> => {
  const random = seededRandom(hour + 1);
  const rows = Array.from({ length: to - from }, (_, index) =>
    snapshotRowOf(line, DAY + hour * HOUR_MS + (from + index) * 60_000, levelAmps + random()),
  );
  return storeRows(store, rows);
};

describe('rebuilding', () => {
  it('an hour twice gives identical rows', async () => {
    await storeHour(9, 10);
    await storeHour(10, 10);
    const window = { rung: 'hour', startMs: DAY + 10 * HOUR_MS } as const;
    await rebuildRung(store, line, window);
    const first = await levels('hour');
    await rebuildRung(store, line, window);
    expect(first).toHaveLength(3);
    expect(first[0]).toMatchObject({ phase: 'a', qualifiedCount: 60, allCount: 60 });
    expect(await levels('hour')).toEqual(first);
  });

  it('gives the same rows whatever the order in which the raw rows were written', async () => {
    const rows = [0, 1, 2, 3, 4, 5].map((minute) => snapshotRowOf(line, DAY + minute * 60_000, 10 + minute));
    await storeRows(store, rows.toReversed());
    await rebuildRung(store, line, { rung: 'hour', startMs: DAY });
    const reversed = await levels('hour');
    await store.db.delete(snapshot);
    for (const row of rows) await storeRows(store, [row]);
    await rebuildRung(store, line, { rung: 'hour', startMs: DAY });
    expect(await levels('hour')).toEqual(reversed);
  });

  it('a window without raw rows leaves what was built of it', async () => {
    await storeHour(10, 10);
    await catchUp(DAY + 11 * HOUR_MS);
    const built = await levels('hour');
    await store.db.delete(snapshot);
    await rebuildRung(store, line, { rung: 'hour', startMs: DAY + 10 * HOUR_MS });
    expect(await levels('hour')).toEqual(built);
  });
});

describe('catching up', () => {
  it('builds every hour since the newest one, the current one in part, and the day so far', async () => {
    await storeHour(9, 10);
    await storeHour(10, 20);
    await storeHour(11, 30, { to: 20 });
    expect(await catchUp(DAY + 11 * HOUR_MS + 20 * 60_000)).toMatchObject({ hourClosed: true });
    const hours = await levels('hour');
    expect(hoursOf(hours)).toEqual([9, 10, 11]);
    expect(hours.filter(({ phase }) => phase === 'a').map(({ allCount }) => allCount)).toEqual([60, 60, 20]);
    const [day] = await levels('day');
    expect(day).toMatchObject({ phase: 'a', allCount: 140 });
    expect(day?.medianAmps).toBeGreaterThan(20);
  });

  it('within an hour builds it again and says that none has closed', async () => {
    await storeHour(10, 10, { to: 20 });
    await catchUp(DAY + 10 * HOUR_MS + 20 * 60_000);
    await storeHour(10, 10, { from: 20, to: 40 });
    expect(await catchUp(DAY + 10 * HOUR_MS + 40 * 60_000)).toMatchObject({ hourClosed: false });
    expect((await levels('hour'))[0]).toMatchObject({ allCount: 40 });
  });

  it('twice gives identical rows', async () => {
    await storeHour(10, 10);
    await catchUp(DAY + 11 * HOUR_MS);
    const [hours, days] = [await levels('hour'), await levels('day')];
    await catchUp(DAY + 11 * HOUR_MS);
    expect([await levels('hour'), await levels('day')]).toEqual([hours, days]);
  });
});

describe('a late completion', () => {
  const nowMs = DAY + 12 * HOUR_MS + 60_000;
  const lateAtMs = DAY + 10 * HOUR_MS + 30 * 60_000;
  const batchOf = (differentialAmps: number, start: number) => ({
    rows: [snapshotRowOf(line, lateAtMs, differentialAmps)],
    refusals: { kept: [], counts: new Map() },
    terminals: [],
    warnings: [],
    staleHours: [{ lineId: line.id, start: new Date(start) }],
  });

  beforeEach(async () => {
    await storeHour(10, 10);
    await storeHour(11, 10);
    await storeRows(store, [snapshotRowOf(line, lateAtMs, null)]);
    await catchUp(nowMs);
  });

  it('corrects the hour that was closed, and its day', async () => {
    const before = await levels('day');
    // the rows after the incomplete one have nothing to be steady against
    expect((await levels('hour'))[0]).toMatchObject({ allCount: 60, qualifiedCount: 57 });
    await commitBatch(store, batchOf(99, DAY + 10 * HOUR_MS), new Date(nowMs));
    expect(await readStaleHours(store, [line.id])).toHaveLength(1);
    expect(await catchUp(nowMs)).toMatchObject({ hourClosed: true });
    expect((await levels('hour'))[0]).toMatchObject({ allCount: 60, qualifiedCount: 59, greatestAmps: 99 });
    const [day] = await levels('day');
    expect(day).toMatchObject({ greatestAmps: 99 });
    expect(before[0]?.greatestAmps).toBeLessThan(12);
    expect(await readStaleHours(store, [line.id])).toEqual([]);
  });

  it('gives the same rows as if it had come in time', async () => {
    await commitBatch(store, batchOf(99, DAY + 10 * HOUR_MS), new Date(nowMs));
    await catchUp(nowMs);
    const late = [await levels('hour'), await levels('day')];
    await store.db.delete(hourLevel);
    await store.db.delete(dayLevel);
    await catchUp(nowMs);
    expect([await levels('hour'), await levels('day')]).toEqual(late);
  });

  it('of an hour whose raw rows have gone in part leaves that hour as it was built', async () => {
    const reachMs = nowMs - (DAY + 10.5 * HOUR_MS);
    const [before] = await levels('hour');
    await commitBatch(store, batchOf(99, DAY + 10 * HOUR_MS), new Date(nowMs));
    await catchUpRungs(store, line, { nowMs, rawReachMs: reachMs, caughtUpMs: undefined });
    expect((await levels('hour'))[0]).toEqual(before);
    expect(await readStaleHours(store, [line.id])).toEqual([]);
  });
});

describe('an hour marked as stale', () => {
  it('is marked once however often that is said', async () => {
    const hour = { lineId: line.id, start: new Date(DAY) };
    await writeStaleHours(store.db, [hour, hour]);
    await writeStaleHours(store.db, [hour]);
    expect(await readStaleHours(store, [line.id])).toEqual([hour]);
    expect(await readStaleHours(store, [line.id + 1])).toEqual([]);
  });
});

describe('a day that raw rows cover only in part', () => {
  it('keeps the row that was built from more', async () => {
    const nowMs = DAY + 2 * DAY_MS;
    await storeHour(22, 10);
    await storeHour(23, 10);
    await rebuildRung(store, line, { rung: 'day', startMs: DAY });
    const whole = await levels('day');
    await writeLevels(
      store,
      'day',
      whole.map((row) => ({ ...row, allCount: 43_200 })),
    );
    // the reach of the raw store begins in the afternoon of that day
    await catchUpRungs(store, line, {
      nowMs,
      rawReachMs: nowMs - (DAY + 15 * HOUR_MS),
      caughtUpMs: undefined,
    });
    expect(hoursOf(await levels('hour'))).toEqual([22, 23]);
    expect((await levels('day'))[0]).toMatchObject({ allCount: 43_200 });
  });
});
