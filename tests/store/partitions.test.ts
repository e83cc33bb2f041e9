import { sql } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { writeLevels } from '../../src/store/levels';
import { keepPartitions, readPartitionDays } from '../../src/store/partitions';
import { readSnapshots } from '../../src/store/snapshots';
import { testStore } from '../database';
import { snapshotRowOf, storeRows } from './made-up-rows';

const store = await testStore();
const daysOf = async () =>
  (await readPartitionDays(store, 'snapshot')).map((dayMs) => new Date(dayMs).toISOString().slice(0, 10));
const keep = (now: string, rawDays: number) =>
  keepPartitions(store, { table: 'snapshot', now: Date.parse(now), days: rawDays });
const instants = async () =>
  (await readSnapshots(store, 7, { from: new Date(0), to: new Date('2030-01-01'), most: 100 })).map((row) =>
    row.at.toISOString().slice(0, 10),
  );

/** Day rows of the line, as the worker builds them: what they hold may be dropped. */
const hold = (...days: string[]) =>
  writeLevels(
    store,
    'day',
    days.map((day) => ({
      lineId: 7,
      phase: 'a',
      start: new Date(`${day}T00:00:00Z`),
      leastAmps: 9,
      p05Amps: 9,
      medianAmps: 9,
      p95Amps: 9,
      greatestAmps: 9,
      meanRestraintAmps: 400,
      meanThroughAmps: 400,
      greatestUtilisation: 0.1,
      qualifiedCount: 1,
      allCount: 1,
      disqualified: {},
      sums: null,
      channelPath: null,
    })),
  );

/** The partition that a day's rows lie in. */
async function partitionOf(day: string): Promise<string[]> {
  const [rows] = (await store.db.execute(
    sql`explain partitions select at from snapshot where at >= ${day} and at < ${`${day} 23:59:59`}`,
  )) as unknown as [{ partitions: string | null }[]];
  return rows.map(({ partitions }) => partitions ?? '');
}

// one story in order: each test goes on from where the one before has left the table
describe('the raw store’s partitions', () => {
  it('take rows before any day has its own', async () => {
    expect(await daysOf()).toEqual([]);
    const days = ['2026-02-27', '2026-02-28', '2026-03-01', '2026-03-02', '2026-03-05'];
    await storeRows(
      store,
      days.map((day) => snapshotRowOf({ id: 7 }, Date.parse(`${day}T12:00:00Z`), 9)),
    );
    expect(await instants()).toEqual(days);
  });

  it('are one a day from the reach of the raw store to three days ahead, and no row is lost over it', async () => {
    await keep('2026-03-02T10:00:00Z', 2);
    expect(await daysOf()).toEqual([
      '2026-02-28',
      '2026-03-01',
      '2026-03-02',
      '2026-03-03',
      '2026-03-04',
      '2026-03-05',
    ]);
    expect(await instants()).toHaveLength(5);
    expect(await partitionOf('2026-03-02')).toEqual(['d20260302']);
  });

  it('stay as they are when they are kept again on the same day, by whomever', async () => {
    const before = await daysOf();
    await Promise.all([keep('2026-03-02T10:00:01Z', 2), keep('2026-03-02T23:59:59Z', 2)]);
    expect(await daysOf()).toEqual(before);
  });

  it('keep a day beyond reach that no day row holds yet', async () => {
    await hold('2026-02-28');
    await keep('2026-03-04T00:00:00Z', 2);
    expect((await daysOf())[0]).toBe('2026-03-01');
    expect(await instants()).toEqual(['2026-03-01', '2026-03-02', '2026-03-05']);
  });

  it('lose the days beyond reach that are held, with their rows and nothing else, as time goes on', async () => {
    await hold('2026-03-01');
    await keep('2026-03-04T00:00:00Z', 2);
    expect(await daysOf()).toEqual([
      '2026-03-02',
      '2026-03-03',
      '2026-03-04',
      '2026-03-05',
      '2026-03-06',
      '2026-03-07',
    ]);
    expect(await instants()).toEqual(['2026-03-02', '2026-03-05']);
  });

  it('are made without a gap after weeks in which nobody kept them', async () => {
    await keep('2026-03-20T10:00:00Z', 2);
    const days = await daysOf();
    expect(days.at(-1)).toBe('2026-03-23');
    expect(days).toContain('2026-03-10');
    await hold('2026-03-02', '2026-03-05');
    await keep('2026-03-20T10:01:00Z', 2);
    expect((await daysOf())[0]).toBe('2026-03-18');
    expect(await instants()).toEqual([]);
  });

  it('are not taken back by a clock that went back', async () => {
    const before = await daysOf();
    await keep('2026-03-01T10:00:00Z', 2);
    expect(await daysOf()).toEqual(before);
  });
});
