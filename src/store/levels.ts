import { and, asc, desc, eq, getTableColumns, gte, inArray, lt, sql, type SQL } from 'drizzle-orm';
import type { Rung } from '../contract/lines';
import type { Creep } from '../contract/warning';
import type { Store } from './client';
import { creepVerdict, dayLevel, hourLevel, minuteLevel, staleHour } from './schema/levels';

export type LevelRow = typeof hourLevel.$inferSelect;
/** A level row without what only the composition and the marks need, which is most of its bytes. */
export type LevelFigures = Omit<LevelRow, 'sums' | 'channelPath'>;

const TABLES = { minute: minuteLevel, hour: hourLevel, day: dayLevel } as const;
const KEYS: readonly string[] = ['lineId', 'phase', 'start'];
const ROWS_A_STATEMENT = 500;

/** Writes level rows, or replaces those of the same line, phase and start. */
export async function writeLevels(store: Store, rung: Rung, rows: readonly LevelRow[]): Promise<void> {
  const table = TABLES[rung];
  const replaced = Object.fromEntries(
    Object.entries(getTableColumns(table))
      .filter(([property]) => !KEYS.includes(property))
      .map(([property, column]) => [property, sql.raw(`values(\`${column.name}\`)`)]),
  );
  for (let from = 0; from < rows.length; from += ROWS_A_STATEMENT)
    await store.db
      .insert(table)
      .values(rows.slice(from, from + ROWS_A_STATEMENT))
      .onDuplicateKeyUpdate({ set: replaced });
}

interface LevelWindow {
  readonly lineIds: readonly number[];
  readonly from: Date;
  readonly to: Date;
}

/** Level rows of these lines with a start in [from, to), oldest first. */
export async function readLevels(store: Store, rung: Rung, window: LevelWindow): Promise<LevelRow[]> {
  if (window.lineIds.length === 0) return [];
  const table = TABLES[rung];
  return store.db
    .select()
    .from(table)
    .where(startsWithin(table, window))
    .orderBy(asc(table.start), asc(table.phase));
}

/** The same rows, their figures alone: two years of a line are read in a third of the time. */
export async function readLevelFigures(
  store: Store,
  rung: Rung,
  window: LevelWindow,
): Promise<LevelFigures[]> {
  if (window.lineIds.length === 0) return [];
  const table = TABLES[rung];
  const { sums: _sums, channelPath: _channelPath, ...figures } = getTableColumns(table);
  return store.db
    .select(figures)
    .from(table)
    .where(startsWithin(table, window))
    .orderBy(asc(table.start), asc(table.phase));
}

const startsWithin = (table: (typeof TABLES)[Rung], { lineIds, from, to }: LevelWindow): SQL | undefined =>
  and(inArray(table.lineId, [...lineIds]), gte(table.start, from), lt(table.start, to));

/** The level of an hour beside its load, without the rest of its row. */
export interface HourOfLoad {
  readonly phase: LevelRow['phase'];
  readonly start: Date;
  readonly medianAmps: number;
  readonly meanThroughAmps: number;
}

/** The hours of a line in [from, to) that have a level and a load, oldest first: a year of them is read at once. */
export async function readHoursOfLoad(
  store: Store,
  { lineId, from, to }: { lineId: number; from: Date; to: Date },
): Promise<HourOfLoad[]> {
  const rows = await store.db
    .select({
      phase: hourLevel.phase,
      start: hourLevel.start,
      medianAmps: hourLevel.medianAmps,
      meanThroughAmps: hourLevel.meanThroughAmps,
    })
    .from(hourLevel)
    .where(and(eq(hourLevel.lineId, lineId), gte(hourLevel.start, from), lt(hourLevel.start, to)))
    .orderBy(asc(hourLevel.start), asc(hourLevel.phase));
  return rows.flatMap(({ medianAmps, meanThroughAmps, ...row }) =>
    medianAmps === null || meanThroughAmps === null ? [] : [{ ...row, medianAmps, meanThroughAmps }],
  );
}

/** The start of the newest hour row of a line. */
export async function readNewestHour(store: Store, lineId: number): Promise<Date | undefined> {
  const [row] = await store.db
    .select({ start: hourLevel.start })
    .from(hourLevel)
    .where(eq(hourLevel.lineId, lineId))
    .orderBy(desc(hourLevel.start))
    .limit(1);
  return row?.start;
}

/** Replaces the kept verdicts of a line: only significant drifts are kept. */
export async function replaceCreep(
  store: Store,
  lineId: number,
  { creep, computedAt }: { creep: readonly Creep[]; computedAt: Date },
): Promise<void> {
  await store.db.transaction(async (transaction) => {
    await transaction.delete(creepVerdict).where(eq(creepVerdict.lineId, lineId));
    if (creep.length > 0)
      await transaction
        .insert(creepVerdict)
        .values(creep.map((verdict) => ({ lineId, phase: verdict.phase, computedAt, creep: verdict })));
  });
}

export async function readCreep(store: Store, lineIds: readonly number[]): Promise<Map<number, Creep[]>> {
  const found = new Map<number, Creep[]>(lineIds.map((id) => [id, []]));
  if (lineIds.length === 0) return found;
  const rows = await store.db
    .select()
    .from(creepVerdict)
    .where(inArray(creepVerdict.lineId, [...lineIds]));
  for (const row of rows) found.get(row.lineId)?.push(row.creep);
  return found;
}

export type StaleHour = typeof staleHour.$inferSelect;

export async function writeStaleHours(
  writer: Pick<Store['db'], 'insert'>,
  hours: readonly StaleHour[],
): Promise<void> {
  if (hours.length === 0) return;
  await writer
    .insert(staleHour)
    .ignore()
    .values([...hours]);
}

export async function readStaleHours(store: Store, lineIds: readonly number[]): Promise<StaleHour[]> {
  if (lineIds.length === 0) return [];
  return store.db
    .select()
    .from(staleHour)
    .where(inArray(staleHour.lineId, [...lineIds]))
    .orderBy(asc(staleHour.start));
}

export async function dropStaleHour(store: Store, { lineId, start }: StaleHour): Promise<void> {
  await store.db.delete(staleHour).where(and(eq(staleHour.lineId, lineId), eq(staleHour.start, start)));
}

/**
 * Drops hour rows beyond their reach, except of days that no day row holds: what is dropped can't be built again. Each
 * line and phase by itself, from the front of its own rows: there are years of others, which need not be gone through.
 */
export async function dropHourLevelsBefore(store: Store, before: Date): Promise<void> {
  const series = await store.db
    .selectDistinct({ lineId: hourLevel.lineId, phase: hourLevel.phase })
    .from(hourLevel);
  for (const { lineId, phase } of series)
    await store.db.execute(
      sql`delete hour_level from hour_level
          join day_level on day_level.line_id = hour_level.line_id and day_level.phase = hour_level.phase
            and day_level.start = date(hour_level.start)
          where hour_level.line_id = ${lineId} and hour_level.phase = ${phase} and hour_level.start < ${before}`,
    );
}
