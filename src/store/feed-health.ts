import { and, asc, desc, eq, lt, sql, type SQL } from 'drizzle-orm';
import { FEED_LIMITS, type RefusalReason } from '../contract/feed';
import type { FeedHealth, FeedTerminal, KeptRefusal } from '../contract/feed-health';
import { expectedTerminals } from '../contract/expected-terminals';
import type { Store } from './client';
import { groupedBy } from './grouped';
import { refusalCount, refusedMessage, terminalState } from './schema/feed';
import { line, substation, terminal } from './schema/register';

/** Every terminal of the register with what has been heard of it, and the refusals by reason. */
export async function readFeedHealth(store: Store, nowMs: number): Promise<FeedHealth> {
  const [terminals, refusals] = await Promise.all([readFeedTerminals(store), readRefusalCounts(store)]);
  return { at: new Date(nowMs).toISOString(), terminals, refusals };
}

interface FeedTerminalRow {
  readonly line: typeof line.$inferSelect;
  readonly terminal: typeof terminal.$inferSelect;
  readonly substationName: string;
  readonly state: typeof terminalState.$inferSelect | null;
}

async function readFeedTerminals(store: Store): Promise<FeedTerminal[]> {
  const rows = await store.db
    .select({ line, terminal, substationName: substation.name, state: terminalState })
    .from(terminal)
    .innerJoin(line, eq(terminal.lineId, line.id))
    .innerJoin(substation, eq(terminal.substation, substation.key))
    .leftJoin(terminalState, eq(terminalState.terminalId, terminal.id))
    .orderBy(asc(line.name), asc(terminal.position));
  const terminalsOf = groupedBy(rows, (row) => row.line.id);
  const isExpected = (row: (typeof rows)[number]) =>
    row.line.inService &&
    expectedTerminals({
      goesBy: row.line.goesBy,
      terminals: terminalsOf.get(row.line.id)!.map(({ terminal: one }) => one),
    }).includes(row.terminal.key);
  return rows.map((row) => feedTerminal(row, isExpected(row)));
}

function feedTerminal(
  { line, terminal, substationName, state }: FeedTerminalRow,
  expected: boolean,
): FeedTerminal {
  return {
    line: line.key,
    lineName: line.name,
    terminal: terminal.key,
    substationName,
    expected,
    presence: state?.presence ?? null,
    lastAt: state?.lastAt?.toISOString() ?? null,
    heardAt: state?.heardAt?.toISOString() ?? null,
    lastSeq: state?.lastSeq ?? null,
    gapCount: state?.gapCount ?? 0,
    missedCount: state?.missedCount ?? 0,
  };
}

async function readRefusalCounts(store: Store): Promise<FeedHealth['refusals']> {
  const rows = await store.db.select().from(refusalCount).orderBy(desc(refusalCount.count));
  return rows.map(({ reason, count, lastAt }) => ({ reason, count, lastAt: lastAt.toISOString() }));
}

/** Which kept messages to read: of one reason, and older than a message. */
export interface RefusalWindow {
  readonly reason?: RefusalReason | undefined;
  readonly before?: number | undefined;
  readonly limit: number;
}

/** Kept messages, newest first. Bytes of a payload that are not UTF-8 become the replacement character. */
export async function readKeptRefusals(
  store: Store,
  { reason, before, limit }: RefusalWindow,
): Promise<KeptRefusal[]> {
  const conditions: SQL[] = [];
  if (reason !== undefined) conditions.push(eq(refusedMessage.reason, reason));
  if (before !== undefined) conditions.push(lt(refusedMessage.id, before));
  const rows = await store.db
    .select()
    .from(refusedMessage)
    .where(conditions.length === 0 ? sql`true` : and(...conditions))
    .orderBy(desc(refusedMessage.id))
    .limit(limit);
  return rows.map((row) => ({
    ...row,
    at: row.at.toISOString(),
    payload: row.payload.toString('utf8'),
    cut: row.payload.length >= FEED_LIMITS.keptPayloadBytes,
  }));
}
