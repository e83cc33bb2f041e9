import { eq, sql } from 'drizzle-orm';
import type { Problem } from '../contract/problem';
import { insertAuditEntry } from './audit';
import type { Store } from './client';
import { readRegisterLine, type RegisteredLine } from './register';
import { registerRevision } from './schema/register';

export type Transaction = Parameters<Parameters<Store['db']['transaction']>[0]>[0];

/** Who changes the register, and when. */
export interface Editing {
  readonly by: { readonly id: string; readonly name: string };
  readonly nowMs: number;
}

/** `unknown`: what was to be changed is not there. `taken`: a key or instant is in use. `not allowed`: the value itself. */
export type RefusalKind = 'unknown' | 'taken' | 'not allowed';
export type RegisterRefusal = { ok: false; kind: RefusalKind; problem: Problem };
export type RegisterEdit = { ok: true; line: RegisteredLine } | RegisterRefusal;

/** What the audit trail says of a change. */
export interface AuditNote {
  readonly action: string;
  readonly subject: string;
  readonly detail: Record<string, unknown>;
}

/** One change within a transaction, and what the audit trail says of it; undefined when there was nothing to change. */
export type Change = (transaction: Transaction) => Promise<AuditNote | undefined>;

export class Refused extends Error {
  constructor(
    readonly kind: RefusalKind,
    readonly refusal: Problem,
  ) {
    super(refusal.problem);
  }
}

/** Ends the change that is under way; nothing of it is written. */
export function refuse(kind: RefusalKind, problem: string, fields: Problem['fields'] = []): never {
  throw new Refused(kind, { problem, fields });
}

/** Refuses over a single field, whose sentence says all there is to say. */
export function refuseField(kind: RefusalKind, field: string, problem: string): never {
  refuse(kind, problem, [{ field, problem }]);
}

/** Ends a change that would change nothing, so that neither the revision nor the audit trail tells of one. */
class NothingToChange extends Error {}

/**
 * Runs one change of a line's entry as a whole or not at all: the change, the register's revision and the
 * audit entry. Answers with the line as it then stands.
 */
export async function changeRegister(
  store: Store,
  { key, by, nowMs }: Editing & { key: string },
  change: Change,
): Promise<RegisterEdit> {
  try {
    await store.db.transaction(async (transaction) => {
      await lockRegister(transaction);
      const note = await change(transaction);
      if (note === undefined) throw new NothingToChange();
      await insertAuditEntry(within(store, transaction), { at: new Date(nowMs), person: by, ...note });
    });
  } catch (error) {
    if (error instanceof Refused) return { ok: false, kind: error.kind, problem: error.refusal };
    if (!(error instanceof NothingToChange)) throw error;
  }
  const line = await readRegisterLine(store, key);
  if (line === undefined) throw new Error(`The line "${key}" was changed and is gone.`);
  return { ok: true, line };
}

/**
 * Counts the revision up. First of all in every change: the row's lock makes changes wait for each other, so that
 * what one has checked still holds.
 */
export async function lockRegister(transaction: Transaction): Promise<void> {
  await transaction
    .update(registerRevision)
    .set({ revision: sql`${registerRevision.revision} + 1` })
    .where(eq(registerRevision.id, 1));
}

/** The store as its queries see it inside a transaction; they use nothing that a transaction has not. */
export function within(store: Store, transaction: Transaction): Store {
  return { ...store, db: transaction as unknown as Store['db'] };
}
