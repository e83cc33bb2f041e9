import { sql } from 'drizzle-orm';
import type { Store } from './client';

const DAY_MS = 86_400_000;
const DAYS_AHEAD = 3;
const name = (dayMs: number): string => `d${new Date(dayMs).toISOString().slice(0, 10).replaceAll('-', '')}`;
const literal = (dayMs: number): string => `'${new Date(dayMs).toISOString().slice(0, 10)}'`;
const startOfDay = (ms: number): number => Math.floor(ms / DAY_MS) * DAY_MS;

/** The day partitions of the raw store, oldest first. */
export async function readPartitionDays(store: Store): Promise<number[]> {
  const [rows] = (await store.db.execute(
    sql`select partition_name as name from information_schema.partitions
        where table_schema = database() and table_name = 'snapshot' and partition_name like 'd%'
        order by partition_ordinal_position`,
  )) as unknown as [{ name: string }[]];
  return rows.map(({ name: day }) => Date.parse(`${day.slice(1, 5)}-${day.slice(5, 7)}-${day.slice(7, 9)}`));
}

/**
 * Keeps one partition a day from the reach of the raw store to a few days ahead, and drops the days beyond its reach.
 * Safe to run at any time and from any process: what is there already is left alone.
 */
export async function keepPartitions(
  store: Store,
  { now, rawDays }: { now: number; rawDays: number },
): Promise<void> {
  const oldest = startOfDay(now) - rawDays * DAY_MS;
  const there = await readPartitionDays(store);
  const newest = there.at(-1);
  const first = newest === undefined ? oldest : newest + DAY_MS;
  const wanted: number[] = [];
  for (let day = first; day <= startOfDay(now) + DAYS_AHEAD * DAY_MS; day += DAY_MS) wanted.push(day);
  if (wanted.length > 0) {
    const parts = wanted.map((day) => `PARTITION ${name(day)} VALUES LESS THAN (${literal(day + DAY_MS)})`);
    await store.db.execute(
      sql.raw(
        `ALTER TABLE snapshot REORGANIZE PARTITION ahead INTO (${parts.join(', ')}, PARTITION ahead VALUES LESS THAN (MAXVALUE))`,
      ),
    );
  }
  const retired = there.filter((day) => day < oldest);
  if (retired.length > 0)
    await store.db.execute(sql.raw(`ALTER TABLE snapshot DROP PARTITION ${retired.map(name).join(', ')}`));
}
