import { asc, eq } from 'drizzle-orm';
import type { NewSettingsVersion, NewTerminal } from '../contract/register';
import { refuse, type Editing, type Transaction } from './register-change';
import { line, settingRecord, terminal } from './schema/register';
import { ensureSubstation } from './substation-edit';

export type LineRow = typeof line.$inferSelect;
export type TerminalRow = typeof terminal.$inferSelect;

export async function lineByKey(transaction: Transaction, key: string): Promise<LineRow | undefined> {
  const [row] = await transaction.select().from(line).where(eq(line.key, key));
  return row;
}

export async function knownLine(transaction: Transaction, key: string): Promise<LineRow> {
  return (
    (await lineByKey(transaction, key)) ??
    refuse('unknown', `The register has no line with the key "${key}".`)
  );
}

export async function terminalsOf(transaction: Transaction, lineId: number): Promise<TerminalRow[]> {
  return transaction
    .select()
    .from(terminal)
    .where(eq(terminal.lineId, lineId))
    .orderBy(asc(terminal.position));
}

export async function knownTerminal(
  transaction: Transaction,
  owner: LineRow,
  key: string,
): Promise<TerminalRow> {
  const found = (await terminalsOf(transaction, owner.id)).find((one) => one.key === key);
  return found ?? refuse('unknown', `The line "${owner.key}" has no terminal with the key "${key}".`);
}

export async function insertTerminalRow(
  transaction: Transaction,
  { substationName: name, ...entry }: NewTerminal,
  { fieldPrefix, ...place }: { lineId: number; position: number; fieldPrefix: string },
): Promise<void> {
  await ensureSubstation(transaction, { key: entry.substation, name, fieldPrefix });
  await transaction.insert(terminal).values({ ...entry, ...place });
}

export async function insertSettingsRow(
  transaction: Transaction,
  { validFrom, ...version }: NewSettingsVersion,
  { lineId, by, nowMs }: Editing & { lineId: number },
): Promise<void> {
  await transaction.insert(settingRecord).values({
    ...{ lineId, ...version },
    validFrom: new Date(validFrom),
    recordedBy: by.name,
    recordedAt: new Date(nowMs),
  });
}
