import { sql } from 'drizzle-orm';
import type { Store } from './client';

const DAY_MS = 86_400_000;
const DAYS_AHEAD = 3;
const name = (dayMs: number): string => `d${new Date(dayMs).toISOString().slice(0, 10).replaceAll('-', '')}`;
const literal = (dayMs: number): string => `'${new Date(dayMs).toISOString().slice(0, 10)}'`;
const startOfDay = (ms: number): number => Math.floor(ms / DAY_MS) * DAY_MS;

/** The tables that are kept in one partition a day. */
export type PartitionedTable = 'snapshot' | 'minute_level';

/** The instant by which a row falls into its day. */
const INSTANT_COLUMN: Readonly<Record<PartitionedTable, string>> = { snapshot: 'at', minute_level: 'start' };

/** The day partitions of a table, oldest first. */
export async function readPartitionDays(store: Store, table: PartitionedTable): Promise<number[]> {
  const [rows] = (await store.db.execute(
    sql`select partition_name as name from information_schema.partitions
        where table_schema = database() and table_name = ${table} and partition_name like 'd%'
        order by partition_ordinal_position`,
  )) as unknown as [{ name: string }[]];
  return rows.map(({ name: day }) => Date.parse(`${day.slice(1, 5)}-${day.slice(5, 7)}-${day.slice(7, 9)}`));
}

/**
 * Keeps one partition a day from the reach of a table to a few days ahead, and drops the days beyond its reach that
 * the day rows hold for every line. Safe to run at any time and from any process: what is there already is left alone.
 */
export async function keepPartitions(
  store: Store,
  { table, now, days }: { table: PartitionedTable; now: number; days: number },
): Promise<void> {
  const oldest = startOfDay(now) - days * DAY_MS;
  const there = await readPartitionDays(store, table);
  const newest = there.at(-1);
  const first = newest === undefined ? oldest : newest + DAY_MS;
  const wanted: number[] = [];
  for (let day = first; day <= startOfDay(now) + DAYS_AHEAD * DAY_MS; day += DAY_MS) wanted.push(day);
  if (wanted.length > 0) {
    const parts = wanted.map((day) => `PARTITION ${name(day)} VALUES LESS THAN (${literal(day + DAY_MS)})`);
    await store.db.execute(
      sql.raw(
        `ALTER TABLE ${table} REORGANIZE PARTITION ahead INTO (${parts.join(', ')}, PARTITION ahead VALUES LESS THAN (MAXVALUE))`,
      ),
    );
  }
  const retired: number[] = [];
  for (const day of there.filter((one) => one < oldest))
    if (await isHeldByDayRows(store, table, day)) retired.push(day);
  if (retired.length > 0)
    await store.db.execute(sql.raw(`ALTER TABLE ${table} DROP PARTITION ${retired.map(name).join(', ')}`));
}

/** Whether every line with rows of this day has its day row: what is dropped can't be built again. */
async function isHeldByDayRows(store: Store, table: PartitionedTable, dayMs: number): Promise<boolean> {
  const [[row]] = (await store.db.execute(
    sql.raw(
      `select count(*) as unheld
       from (select distinct line_id from ${table} partition (${name(dayMs)}) where ${INSTANT_COLUMN[table]} is not null) below
       where not exists (select 1 from day_level d where d.line_id = below.line_id and d.start = ${literal(dayMs)})`,
    ),
  )) as unknown as [[{ unheld: number }]];
  return Number(row.unheld) === 0;
}
