import { createHash, randomBytes } from 'node:crypto';
import { insertAuditEntry } from '../store/audit';
import type { Store } from '../store/client';
import { findLinkPerson, replaceOneTimeLink, spendOneTimeLink } from '../store/people';
import { hashPassword, passwordProblem } from './passwords';
import type { Person } from './person';

const LIFETIME_MS = 24 * 3_600_000;
const TOKEN_BYTES = 32;
const TOKEN = /^[\w-]{43}$/;

export const LINK_SPENT_SENTENCE =
  'This link has been used, or its 24 hours are over. Ask whoever sent it for a new one.';

/** Makes the address at which a person chooses a password, once; whatever link they had before stops working. */
export async function createOneTimeLink(
  store: Store,
  link: { userId: string; publicUrl: string; nowMs: number },
): Promise<string> {
  const token = randomBytes(TOKEN_BYTES).toString('base64url');
  await replaceOneTimeLink(store, {
    userId: link.userId,
    tokenHash: hashOf(token),
    expiresAt: new Date(link.nowMs + LIFETIME_MS),
  });
  return new URL(`/welcome/${token}`, link.publicUrl).href;
}

/** Whose link it is; undefined when it is unknown, used or over. */
export async function personOfLink(store: Store, token: string, nowMs: number): Promise<Person | undefined> {
  return TOKEN.test(token) ? findLinkPerson(store, hashOf(token), new Date(nowMs)) : undefined;
}

export type Welcome =
  | { readonly kind: 'welcome'; readonly person: Person }
  | { readonly kind: 'link spent' }
  | { readonly kind: 'password refused'; readonly problem: string };

/** Sets the password by a link and spends the link; the person's older sessions end with their older password. */
export async function choosePassword(
  store: Store,
  choice: { token: string; password: string; nowMs: number },
): Promise<Welcome> {
  const person = await personOfLink(store, choice.token, choice.nowMs);
  if (person === undefined) return { kind: 'link spent' };
  const problem = passwordProblem(choice.password, person.email);
  if (problem !== undefined) return { kind: 'password refused', problem };
  const at = new Date(choice.nowMs);
  const passwordHash = await hashPassword(choice.password);
  const spent = await spendOneTimeLink(store, {
    tokenHash: hashOf(choice.token),
    userId: person.id,
    passwordHash,
    at,
  });
  if (!spent) return { kind: 'link spent' };
  await insertAuditEntry(store, { at, person, action: 'password chosen', subject: person.email, detail: {} });
  return { kind: 'welcome', person };
}

const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');
