import { and, asc, desc, eq, inArray, isNull, type SQL } from 'drizzle-orm';
import type { NewWork, Work } from '../contract/works';
import { insertAuditEntry } from './audit';
import { inTransaction, type Store } from './client';
import { line, terminal } from './schema/register';
import { followUp, recordedWork } from './schema/standing';

const WORKS_MOST = 500;
/** It is tomorrow nowhere by more than this: a day by the site's clock is not taken for the future. */
const AHEAD_MS = 14 * 3_600_000;

export interface Recording {
  readonly by: { readonly id: string; readonly name: string };
  readonly nowMs: number;
}

/** `unknown`: what the work is recorded for is not there. `not allowed`: the value itself. */
export type WorkRefusal = {
  readonly ok: false;
  readonly kind: 'unknown' | 'not allowed';
  readonly field: 'line' | 'terminal' | 'doneOn' | 'followUp';
  readonly problem: string;
};

/** Records work done on a line, and says so in the audit trail. */
export const insertWork = (
  store: Store,
  work: NewWork,
  recording: Recording,
): Promise<{ ok: true; work: Work } | WorkRefusal> =>
  inTransaction(store, (_connection, db) => insertWorkWithin({ ...store, db }, work, recording));

/** The same within a transaction that does more. */
export async function insertWorkWithin(
  store: Store,
  { line: key, ...work }: NewWork,
  { by, nowMs }: Recording,
): Promise<{ ok: true; work: Work } | WorkRefusal> {
  const [known] = await store.db.select({ id: line.id }).from(line).where(eq(line.key, key));
  if (known === undefined)
    return { ok: false, kind: 'unknown', field: 'line', problem: `The register has no line ${key}.` };
  const refused = await refusalOf(store, { lineId: known.id, key, ...work }, nowMs);
  if (refused !== undefined) return refused;
  const { followUp: followUpId, ...rest } = work;
  const [added] = await store.db
    .insert(recordedWork)
    .values({ ...rest, followUpId, lineId: known.id, recordedBy: by.name, recordedAt: new Date(nowMs) })
    .$returningId();
  const [kept] = added === undefined ? [] : await readWhere(store, eq(recordedWork.id, added.id));
  if (kept === undefined) throw new Error('The work that was just recorded is not there.');
  await insertAuditEntry(store, {
    at: new Date(nowMs),
    person: by,
    action: 'work recorded',
    subject: key,
    detail: { work: kept.id, ...work },
  });
  return { ok: true, work: kept };
}

async function refusalOf(
  store: Store,
  work: Omit<NewWork, 'line'> & { readonly lineId: number; readonly key: string },
  nowMs: number,
): Promise<WorkRefusal | undefined> {
  if (Date.parse(`${work.doneOn}T00:00:00Z`) > nowMs + AHEAD_MS)
    return notAllowed('doneOn', 'This day has not come yet. Record work once it is done.');
  if (work.terminal !== null) {
    const terminals = await store.db
      .select({ key: terminal.key })
      .from(terminal)
      .where(eq(terminal.lineId, work.lineId))
      .orderBy(asc(terminal.position));
    const keys = terminals.map(({ key }) => key);
    if (!keys.includes(work.terminal))
      return notAllowed(
        'terminal',
        `The line ${work.key} has no terminal ${work.terminal}. It has ${keys.join(', ')}.`,
      );
  }
  if (work.followUp !== null) {
    const [own] = await store.db
      .select({ lineId: followUp.lineId })
      .from(followUp)
      .where(eq(followUp.id, work.followUp));
    if (own?.lineId !== work.lineId)
      return notAllowed(
        'followUp',
        `The line ${work.key} has no follow-up with the number ${work.followUp}.`,
      );
  }
  return undefined;
}

const notAllowed = (field: WorkRefusal['field'], problem: string): WorkRefusal => ({
  ok: false,
  kind: 'not allowed',
  field,
  problem,
});

/** Withdraws a record made in error, once: a second call says that it did nothing. */
export const withdrawWork = (
  store: Store,
  id: number,
  { by, nowMs }: Recording,
): Promise<'withdrawn' | 'already withdrawn' | 'unknown'> =>
  inTransaction(store, async (_connection, db) => {
    const within = { ...store, db };
    const at = new Date(nowMs);
    const [result] = await db
      .update(recordedWork)
      .set({ withdrawnBy: by.name, withdrawnAt: at })
      .where(and(eq(recordedWork.id, id), isNull(recordedWork.withdrawnAt)));
    const kept = await readWork(within, id);
    if (kept === undefined) return 'unknown';
    if (result.affectedRows === 0) return 'already withdrawn';
    await insertAuditEntry(within, {
      at,
      person: by,
      action: 'work withdrawn',
      subject: kept.line,
      detail: { work: id },
    });
    return 'withdrawn';
  });

export async function readWork(store: Store, id: number): Promise<Work | undefined> {
  return (await readWhere(store, eq(recordedWork.id, id)))[0];
}

/** Recorded works, the newest first, those withdrawn among them. */
export const readWorks = (
  store: Store,
  asked: { readonly line?: string | undefined } = {},
): Promise<Work[]> => readWhere(store, asked.line === undefined ? undefined : eq(line.key, asked.line));

/** The works of a line that stand, the oldest first. */
export async function readWorksOfLine(store: Store, lineId: number): Promise<Work[]> {
  const works = await readWhere(
    store,
    and(eq(recordedWork.lineId, lineId), isNull(recordedWork.withdrawnAt)),
  );
  return works.reverse();
}

/** The works recorded with these follow-ups, the newest first, those withdrawn among them. */
export async function readWorksOfFollowUps(store: Store, ids: readonly number[]): Promise<Work[]> {
  return ids.length === 0 ? [] : readWhere(store, inArray(recordedWork.followUpId, [...ids]));
}

async function readWhere(store: Store, condition: SQL | undefined): Promise<Work[]> {
  const rows = await store.db
    .select({ work: recordedWork, key: line.key, name: line.name })
    .from(recordedWork)
    .innerJoin(line, eq(recordedWork.lineId, line.id))
    .where(condition)
    .orderBy(desc(recordedWork.doneOn), desc(recordedWork.id))
    .limit(WORKS_MOST);
  return rows.map(({ work, key, name }) => ({
    id: work.id,
    line: key,
    lineName: name,
    terminal: work.terminal,
    doneOn: work.doneOn,
    what: work.what,
    followUp: work.followUpId,
    recordedBy: work.recordedBy,
    recordedAt: work.recordedAt.toISOString(),
    withdrawn:
      work.withdrawnAt === null ? null : { by: work.withdrawnBy ?? '', at: work.withdrawnAt.toISOString() },
  }));
}
