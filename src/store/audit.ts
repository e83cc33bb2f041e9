import type { Store } from './client';
import { auditEntry } from './schema/people';

const SUBJECT_LENGTH = 120;

export interface AuditEntry {
  readonly at: Date;
  /** who did it; undefined when nobody was signed in */
  readonly person: { readonly id: string; readonly name: string } | undefined;
  /** in a few words and the past: 'sign-in', 'warning acknowledged' */
  readonly action: string;
  /** what it was done to: an e-mail address, a line's key */
  readonly subject: string;
  readonly detail: Readonly<Record<string, unknown>>;
}

export async function insertAuditEntry(store: Store, entry: AuditEntry): Promise<void> {
  await store.db.insert(auditEntry).values({
    at: entry.at,
    userId: entry.person?.id ?? null,
    userName: entry.person?.name ?? 'nobody signed in',
    action: entry.action,
    subject: entry.subject.slice(0, SUBJECT_LENGTH),
    detail: entry.detail,
  });
}
