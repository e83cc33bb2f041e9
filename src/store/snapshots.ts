import { and, asc, desc, eq, getTableColumns, gte, inArray, lt, or, sql } from 'drizzle-orm';
import type { PoolConnection } from 'mysql2/promise';
import type { Store } from './client';
import { snapshot } from './schema/snapshots';

export type SnapshotRow = typeof snapshot.$inferSelect;
export type InstantOfLine = { lineId: number; at: Date };

const COLUMNS = Object.entries(getTableColumns(snapshot));
const PROPERTIES = COLUMNS.map(([property]) => property as keyof SnapshotRow);
const NAMES = COLUMNS.map(([, column]) => `\`${column.name}\``);
const CORRECTED = NAMES.filter((name) => name !== '`line_id`' && name !== '`at`');
const UPSERT = `INSERT INTO snapshot (${NAMES.join(', ')}) VALUES ? ON DUPLICATE KEY UPDATE ${CORRECTED.map(
  (name) => `${name} = VALUES(${name})`,
).join(', ')}`;

/**
 * Writes raw rows, or corrects those already there: the worker's hot path. The query builder costs three times
 * the rest of the ingest together, so the batch goes to the driver as it is; the columns are the schema's.
 */
export async function writeSnapshots(
  connection: PoolConnection,
  rows: readonly SnapshotRow[],
): Promise<void> {
  if (rows.length === 0) return;
  await connection.query(UPSERT, [rows.map((row) => PROPERTIES.map((property) => row[property]))]);
}

/** The rows already stored for these instants. */
export async function readSnapshotsAt(
  store: Store,
  instants: readonly InstantOfLine[],
): Promise<SnapshotRow[]> {
  if (instants.length === 0) return [];
  return store.db
    .select()
    .from(snapshot)
    .where(or(...instants.map(({ lineId, at }) => and(eq(snapshot.lineId, lineId), eq(snapshot.at, at)))));
}

/** Raw rows of a line in [from, to), oldest first, at most `most`. */
export async function readSnapshots(
  store: Store,
  lineId: number,
  window: { from: Date; to: Date; most: number },
): Promise<SnapshotRow[]> {
  return store.db
    .select()
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), gte(snapshot.at, window.from), lt(snapshot.at, window.to)))
    .orderBy(asc(snapshot.at))
    .limit(window.most);
}

const { phasors: _phasors, ...FIGURES } = getTableColumns(snapshot);
export type SnapshotFigures = Omit<SnapshotRow, 'phasors'>;

/** As readSnapshots, without the packed phasors and without a bound: what the level rows are built from. */
export async function readSnapshotFigures(
  store: Store,
  lineId: number,
  window: { from: Date; to: Date },
): Promise<SnapshotFigures[]> {
  return store.db
    .select(FIGURES)
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), gte(snapshot.at, window.from), lt(snapshot.at, window.to)))
    .orderBy(asc(snapshot.at));
}

/** The newest raw row before an instant, if there is one. */
export async function readSnapshotBefore(
  store: Store,
  lineId: number,
  before: Date,
): Promise<SnapshotFigures | undefined> {
  const [row] = await store.db
    .select(FIGURES)
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), lt(snapshot.at, before)))
    .orderBy(desc(snapshot.at))
    .limit(1);
  return row;
}

/** The newest stored instant of each of these lines. */
export async function readNewestInstants(
  store: Store,
  lineIds: readonly number[],
): Promise<Map<number, Date>> {
  if (lineIds.length === 0) return new Map();
  const rows = await store.db
    .select({ lineId: snapshot.lineId, at: sql<Date>`max(${snapshot.at})`.mapWith(snapshot.at) })
    .from(snapshot)
    .where(inArray(snapshot.lineId, [...lineIds]))
    .groupBy(snapshot.lineId);
  return new Map(rows.map((row) => [row.lineId, row.at]));
}

/** The oldest stored instant of a line, if there is one. */
export async function readOldestInstant(store: Store, lineId: number): Promise<Date | undefined> {
  const [row] = await store.db
    .select({ at: snapshot.at })
    .from(snapshot)
    .where(eq(snapshot.lineId, lineId))
    .orderBy(asc(snapshot.at))
    .limit(1);
  return row?.at;
}
