import { inArray, lt, sql } from 'drizzle-orm';
import type { RefusalReason } from '../contract/feed';
import type { Store } from './client';
import { refusalCount, refusedMessage, terminalState } from './schema/feed';

export type TerminalStateRow = typeof terminalState.$inferSelect;
export type RefusedMessage = Omit<typeof refusedMessage.$inferInsert, 'id'>;
type Writer = Pick<Store['db'], 'insert'>;

export async function readTerminalStates(
  store: Store,
  terminalIds: readonly number[],
): Promise<TerminalStateRow[]> {
  if (terminalIds.length === 0) return [];
  return store.db
    .select()
    .from(terminalState)
    .where(inArray(terminalState.terminalId, [...terminalIds]));
}

export async function writeTerminalStates(writer: Writer, rows: readonly TerminalStateRow[]): Promise<void> {
  if (rows.length === 0) return;
  await writer
    .insert(terminalState)
    .values([...rows])
    .onDuplicateKeyUpdate({
      set: {
        presence: sql`values(presence)`,
        lastAt: sql`values(last_at)`,
        heardAt: sql`values(heard_at)`,
        lastSeq: sql`values(last_seq)`,
        gapCount: sql`values(gap_count)`,
        missedCount: sql`values(missed_count)`,
      },
    });
}

/** Keeps refused messages and counts them; `counts` may hold more than `kept` when a flood was cut. */
export async function writeRefusals(
  writer: Writer,
  {
    kept,
    counts,
    lastAt,
  }: { kept: readonly RefusedMessage[]; counts: ReadonlyMap<RefusalReason, number>; lastAt: Date },
): Promise<void> {
  if (kept.length > 0) await writer.insert(refusedMessage).values([...kept]);
  for (const [reason, count] of counts)
    await writer
      .insert(refusalCount)
      .values({ reason, count, lastAt })
      .onDuplicateKeyUpdate({ set: { count: sql`count + values(count)`, lastAt: sql`values(last_at)` } });
}

export async function dropRefusalsBefore(store: Store, before: Date): Promise<void> {
  await store.db.delete(refusedMessage).where(lt(refusedMessage.at, before));
}
