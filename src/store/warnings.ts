import { and, desc, eq, gte, inArray, isNotNull, isNull, or, sql, type SQL } from 'drizzle-orm';
import type { Warning, WarningCause, WarningKind, WarningState } from '../contract/warning';
import type { Store } from './client';
import { line } from './schema/register';
import { warning } from './schema/warnings';

type WarningRow = typeof warning.$inferSelect;
/** The pool itself, or a transaction of it. */
type Writer = Pick<Store['db'], 'insert' | 'update'>;

const iso = (at: Date | null): string | null => at?.toISOString() ?? null;

/** Whether it stands, and whether somebody has seen it: the two facts that make the state. */
export function warningState({
  returnedAt,
  acknowledgedAt,
}: Pick<WarningRow, 'returnedAt' | 'acknowledgedAt'>): WarningState {
  if (returnedAt === null) return acknowledgedAt === null ? 'unacknowledged' : 'acknowledged';
  return acknowledgedAt === null ? 'returned to normal, unacknowledged' : 'normal';
}

const IN_STATE: Record<WarningState, SQL> = {
  unacknowledged: and(isNull(warning.returnedAt), isNull(warning.acknowledgedAt))!,
  acknowledged: and(isNull(warning.returnedAt), isNotNull(warning.acknowledgedAt))!,
  'returned to normal, unacknowledged': and(isNotNull(warning.returnedAt), isNull(warning.acknowledgedAt))!,
  normal: and(isNotNull(warning.returnedAt), isNotNull(warning.acknowledgedAt))!,
};

function onWire({ warning: row, key, name }: { warning: WarningRow; key: string; name: string }): Warning {
  return {
    id: row.id,
    line: key,
    lineName: name,
    kind: row.kind,
    state: warningState(row),
    cause: row.cause,
    openedAt: row.openedAt.toISOString(),
    returnedAt: iso(row.returnedAt),
    acknowledgedAt: iso(row.acknowledgedAt),
    acknowledgedBy: row.acknowledgedBy,
    note: row.note,
    changedAt: row.changedAt.toISOString(),
  };
}

async function readWhere(store: Store, condition: SQL | undefined, most: number): Promise<Warning[]> {
  const rows = await store.db
    .select({ warning, key: line.key, name: line.name })
    .from(warning)
    .innerJoin(line, eq(warning.lineId, line.id))
    .where(condition)
    .orderBy(desc(warning.openedAt), desc(warning.id))
    .limit(most);
  return rows.map(onWire);
}

const OPEN = or(isNull(warning.returnedAt), isNull(warning.acknowledgedAt));
const OPEN_MOST = 2_000;

/** Warnings that still ask for somebody: standing, or not yet acknowledged. Newest first. */
export const readOpenWarnings = (store: Store): Promise<Warning[]> => readWhere(store, OPEN, OPEN_MOST);

export const readWarningsInState = (store: Store, state: WarningState): Promise<Warning[]> =>
  readWhere(store, IN_STATE[state], OPEN_MOST);

/** Open and past warnings of a line, newest first. */
export const readWarningsOfLine = (store: Store, lineId: number, most: number): Promise<Warning[]> =>
  readWhere(store, eq(warning.lineId, lineId), most);

/** What has changed since an instant: how every web process learns what another one or a worker wrote. */
export const readWarningsChangedSince = (store: Store, since: Date): Promise<Warning[]> =>
  readWhere(store, gte(warning.changedAt, since), OPEN_MOST);

export async function readWarning(store: Store, id: number): Promise<Warning | undefined> {
  return (await readWhere(store, eq(warning.id, id), 1))[0];
}

export type StandingWarning = { id: number; lineId: number; kind: WarningKind; cause: WarningCause };

/** Warnings of these lines that have not returned to normal: what a worker takes up at its start. */
export async function readStandingWarnings(
  store: Store,
  lineIds: readonly number[],
): Promise<StandingWarning[]> {
  if (lineIds.length === 0) return [];
  return store.db
    .select({ id: warning.id, lineId: warning.lineId, kind: warning.kind, cause: warning.cause })
    .from(warning)
    .where(and(inArray(warning.lineId, [...lineIds]), isNull(warning.returnedAt)));
}

export async function openWarning(
  writer: Writer,
  opened: { lineId: number; kind: WarningKind; cause: WarningCause; openedAt: Date },
  changedAt: Date,
): Promise<number> {
  const [result] = await writer.insert(warning).values({ ...opened, changedAt });
  return result.insertId;
}

export async function returnWarning(
  writer: Writer,
  id: number,
  { returnedAt, changedAt }: { returnedAt: Date; changedAt: Date },
): Promise<void> {
  await writer
    .update(warning)
    // instants of the feed and of the worker's clock meet here: no warning returns before it opened
    .set({ returnedAt: sql`greatest(${warning.openedAt}, ${returnedAt})`, changedAt })
    .where(and(eq(warning.id, id), isNull(warning.returnedAt)));
}

/** Acknowledges once: the first note stands, and a second call says that it did nothing. */
export async function acknowledgeWarning(
  store: Store,
  id: number,
  acknowledged: { by: string; note: string; at: Date },
): Promise<'acknowledged' | 'already acknowledged' | 'unknown'> {
  const [result] = await store.db
    .update(warning)
    .set({
      acknowledgedAt: acknowledged.at,
      acknowledgedBy: acknowledged.by,
      note: acknowledged.note,
      changedAt: acknowledged.at,
    })
    .where(and(eq(warning.id, id), isNull(warning.acknowledgedAt)));
  if (result.affectedRows > 0) return 'acknowledged';
  return (await readWarning(store, id)) === undefined ? 'unknown' : 'already acknowledged';
}
