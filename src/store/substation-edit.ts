import { eq } from 'drizzle-orm';
import { refuseField, type Transaction } from './register-change';
import { substation } from './schema/register';

/** A substation as an entry names it, and the path of the entry's fields for what is said beside them. */
export interface NamedSubstation {
  readonly key: string;
  readonly name: string;
  readonly fieldPrefix: string;
}

/** Makes sure that a substation exists under this key; one that does keeps its name, and an entry may not contradict it. */
export async function ensureSubstation(
  transaction: Transaction,
  { key, name, fieldPrefix }: NamedSubstation,
): Promise<void> {
  const existing = await substationName(transaction, key);
  if (existing === undefined) await transaction.insert(substation).values({ key, name });
  else if (existing !== name)
    refuseField(
      'not allowed',
      `${fieldPrefix}substationName`,
      `The substation key "${key}" belongs to ${existing}. Give that name, or another key.`,
    );
}

export async function substationName(transaction: Transaction, key: string): Promise<string | undefined> {
  const [row] = await transaction.select().from(substation).where(eq(substation.key, key));
  return row?.name;
}

export async function renameSubstation(
  transaction: Transaction,
  { key, name }: { key: string; name: string },
): Promise<void> {
  await transaction.update(substation).set({ name }).where(eq(substation.key, key));
}
