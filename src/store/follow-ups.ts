import { and, asc, desc, eq, inArray, isNotNull, isNull, sql, type SQL } from 'drizzle-orm';
import type { z } from 'zod';
import { FOLLOW_UPS_MOST, type FollowUpInFull, type FollowUpQuery } from '../contract/follow-ups';
import type { newFollowUpSchema } from '../contract/standing';
import type { FollowUpDone } from '../contract/works';
import { insertAuditEntry } from './audit';
import { inTransaction, type Store } from './client';
import { groupedBy } from './grouped';
import { line, substation, terminal } from './schema/register';
import { followUp } from './schema/standing';
import { insertWorkWithin, readWorksOfFollowUps, type WorkRefusal } from './works';

interface Keeping {
  readonly by: { readonly id: string; readonly name: string };
  readonly nowMs: number;
}

/** Opens a follow-up and says so in the audit trail; undefined when the register has no such line. */
export async function insertFollowUp(
  store: Store,
  { line: key, ...opened }: z.output<typeof newFollowUpSchema>,
  { by, nowMs }: Keeping,
): Promise<FollowUpInFull | undefined> {
  const [known] = await store.db.select({ id: line.id }).from(line).where(eq(line.key, key));
  if (known === undefined) return undefined;
  const openedAt = new Date(nowMs);
  const [added] = await store.db
    .insert(followUp)
    .values({ ...opened, lineId: known.id, openedBy: by.name, openedAt })
    .$returningId();
  const kept = added && (await readFollowUp(store, added.id));
  if (kept === undefined) throw new Error('The follow-up that was just opened is not there.');
  await insertAuditEntry(store, {
    at: openedAt,
    person: by,
    action: 'follow-up opened',
    subject: key,
    detail: { followUp: kept.id, ...opened },
  });
  return kept;
}

/** Ends a follow-up once, with the work that was done where there is any: both or neither. */
export async function endFollowUp(
  store: Store,
  id: number,
  { work, ...keeping }: Keeping & FollowUpDone,
): Promise<'done' | 'already done' | 'unknown' | WorkRefusal> {
  try {
    return await inTransaction(store, async (_connection, db) => {
      const within = { ...store, db };
      const outcome = await endFollowUpWithin(within, id, keeping);
      if (outcome.kind !== 'done' || work === null) return outcome.kind;
      const recorded = await insertWorkWithin(within, { ...work, line: outcome.line, followUp: id }, keeping);
      if (!recorded.ok) throw new RefusedWork(recorded);
      return 'done';
    });
  } catch (error) {
    if (error instanceof RefusedWork) return error.refusal;
    throw error;
  }
}

/** Takes back all that its transaction has done. */
class RefusedWork extends Error {
  constructor(readonly refusal: WorkRefusal) {
    super(refusal.problem);
  }
}

async function endFollowUpWithin(
  store: Store,
  id: number,
  { by, nowMs }: Keeping,
): Promise<{ kind: 'done'; line: string } | { kind: 'already done' | 'unknown' }> {
  const at = new Date(nowMs);
  const [result] = await store.db
    .update(followUp)
    .set({ doneAt: at })
    .where(and(eq(followUp.id, id), isNull(followUp.doneAt)));
  const kept = await readFollowUp(store, id);
  if (kept === undefined) return { kind: 'unknown' };
  if (result.affectedRows === 0) return { kind: 'already done' };
  await insertAuditEntry(store, {
    at,
    person: by,
    action: 'follow-up done',
    subject: kept.line,
    detail: { followUp: id },
  });
  return { kind: 'done', line: kept.line };
}

export async function readFollowUp(store: Store, id: number): Promise<FollowUpInFull | undefined> {
  return (await readWhere(store, eq(followUp.id, id)))[0];
}

/** Follow-ups, open ones before done ones; among the open the one due first, those without a date last. */
export const readFollowUps = (store: Store, asked: FollowUpQuery = {}): Promise<FollowUpInFull[]> =>
  readWhere(
    store,
    and(
      asked.line === undefined ? undefined : eq(line.key, asked.line),
      asked.state === undefined
        ? undefined
        : asked.state === 'open'
          ? isNull(followUp.doneAt)
          : isNotNull(followUp.doneAt),
    ),
    asked.limit,
  );

async function readWhere(
  store: Store,
  condition: SQL | undefined,
  most = FOLLOW_UPS_MOST,
): Promise<FollowUpInFull[]> {
  const rows = await store.db
    .select({ followUp, key: line.key, name: line.name })
    .from(followUp)
    .innerJoin(line, eq(followUp.lineId, line.id))
    .where(condition)
    .orderBy(
      sql`${followUp.doneAt} is not null`,
      desc(followUp.doneAt),
      sql`${followUp.due} is null`,
      asc(followUp.due),
      desc(followUp.id),
    )
    .limit(most);
  const [works, terminals] = await Promise.all([
    readWorksOfFollowUps(
      store,
      rows.map((row) => row.followUp.id),
    ),
    readTerminalNames(
      store,
      rows.map((row) => row.followUp.lineId),
    ),
  ]);
  const worksOf = groupedBy(works, (work) => work.followUp);
  return rows.map(({ followUp: { lineId, openedAt, doneAt, ...rest }, key, name }) => ({
    ...rest,
    line: key,
    lineName: name,
    state: doneAt === null ? 'open' : 'done',
    openedAt: openedAt.toISOString(),
    doneAt: doneAt?.toISOString() ?? null,
    terminals: (terminals.get(lineId) ?? []).map(({ key, name }) => ({ key, name })),
    works: worksOf.get(rest.id) ?? [],
  }));
}

/** The terminals of these lines in their order, each by the name of its substation. */
async function readTerminalNames(store: Store, lineIds: readonly number[]) {
  if (lineIds.length === 0) return new Map<number, never[]>();
  const rows = await store.db
    .select({ lineId: terminal.lineId, key: terminal.key, name: substation.name })
    .from(terminal)
    .innerJoin(substation, eq(terminal.substation, substation.key))
    .where(inArray(terminal.lineId, [...new Set(lineIds)]))
    .orderBy(asc(terminal.position));
  return groupedBy(rows, ({ lineId }) => lineId);
}
