import { asc, eq, getTableColumns, sql } from 'drizzle-orm';
import type { StandingVerdict } from '../contract/standing';
import type { Store } from './client';
import { standingVerdict } from './schema/standing';

const KEYS: readonly string[] = ['lineId', 'phase'];
const REPLACED = Object.fromEntries(
  Object.entries(getTableColumns(standingVerdict))
    .filter(([property]) => !KEYS.includes(property))
    .map(([property, column]) => [property, sql.raw(`values(\`${column.name}\`)`)]),
);

export type VerdictRow = typeof standingVerdict.$inferInsert;

/** Replaces the newest findings on these phases. */
export async function writeVerdicts(store: Store, rows: readonly VerdictRow[]): Promise<void> {
  if (rows.length === 0) return;
  await store.db
    .insert(standingVerdict)
    .values([...rows])
    .onDuplicateKeyUpdate({ set: REPLACED });
}

export async function readVerdictsOfLine(store: Store, lineId: number): Promise<StandingVerdict[]> {
  const rows = await store.db
    .select({ verdict: standingVerdict.verdict })
    .from(standingVerdict)
    .where(eq(standingVerdict.lineId, lineId))
    .orderBy(asc(standingVerdict.phase));
  return rows.map(({ verdict }) => verdict);
}
