import { insertAuditEntry } from '../store/audit';
import type { Store } from '../store/client';
import {
  failuresFrom,
  failuresOf,
  findUserByEmail,
  forgetAttempt,
  forgetAttemptsBefore,
  insertAttempt,
  markAttemptSucceeded,
} from '../store/people';
import { addressBlock } from './client-address';
import type { Credentials } from './credentials';
import { isPassword } from './passwords';
import type { Person } from './person';
import type { SessionCookie, Sessions } from './sessions';
import { SIGN_IN_LIMITS, waitMs } from './throttle';

export interface FrontDesk {
  readonly store: Store;
  readonly sessions: Sessions;
  now(): number;
}

export type SignIn =
  | { readonly kind: 'signed in'; readonly person: Person; readonly cookie: SessionCookie }
  | { readonly kind: 'refused' }
  | { readonly kind: 'slowed'; readonly waitMs: number };

/** The one answer to an unknown person, a wrong password and a password not chosen yet. */
export const REFUSED_SENTENCE = 'This e-mail address and password do not go together.';

const PRUNE_EVERY = 50;

export async function signIn(
  desk: FrontDesk,
  credentials: Credentials,
  fromAddress: string,
): Promise<SignIn> {
  const { store } = desk;
  const at = new Date(desk.now());
  const address = addressBlock(fromAddress);
  // counted as failed before it is judged: attempts sent all at once then see one another
  const attemptId = await insertAttempt(store, { at, email: credentials.email, address });
  if (attemptId % PRUNE_EVERY === 0)
    await forgetAttemptsBefore(store, new Date(at.getTime() - SIGN_IN_LIMITS.keepAttemptsMs));

  const wait = await waitBefore(store, { attemptId, at, email: credentials.email, address });
  if (wait > 0) {
    // one that was not looked at does not count, or whoever keeps trying could shut somebody out for good
    await forgetAttempt(store, attemptId);
    return { kind: 'slowed', waitMs: wait };
  }

  const known = await findUserByEmail(store, credentials.email);
  const matches = await isPassword(credentials.password, known?.passwordHash);
  if (known === undefined || !matches) {
    await insertAuditEntry(store, {
      at,
      person: undefined,
      action: 'sign-in failed',
      subject: credentials.email,
      detail: { address: fromAddress },
    });
    return { kind: 'refused' };
  }
  const { id, email, name, role } = known;
  const person = { id, email, name, role };
  await markAttemptSucceeded(store, attemptId);
  const cookie = await desk.sessions.open(id);
  await desk.sessions.forgetExpired();
  await insertAuditEntry(store, {
    at,
    person,
    action: 'sign-in',
    subject: email,
    detail: { address: fromAddress },
  });
  return { kind: 'signed in', person, cookie };
}

async function waitBefore(
  store: Store,
  attempt: { attemptId: number; at: Date; email: string; address: string },
): Promise<number> {
  const window = {
    before: attempt.attemptId,
    since: new Date(attempt.at.getTime() - SIGN_IN_LIMITS.windowMs),
  };
  const [ofEmail, fromAddress] = await Promise.all([
    failuresOf(store, attempt.email, window),
    failuresFrom(store, attempt.address, window),
  ]);
  const nowMs = attempt.at.getTime();
  return Math.max(
    waitMs(ofEmail, SIGN_IN_LIMITS.failuresPerEmail, nowMs),
    waitMs(fromAddress, SIGN_IN_LIMITS.failuresPerAddress, nowMs),
  );
}

export async function signOut(
  desk: FrontDesk,
  leaving: { person: Person | undefined; cookieHeader: string | null },
): Promise<SessionCookie> {
  const cookie = await desk.sessions.end(leaving.cookieHeader);
  if (leaving.person !== undefined) {
    await insertAuditEntry(desk.store, {
      at: new Date(desk.now()),
      person: leaving.person,
      action: 'sign-out',
      subject: leaving.person.email,
      detail: {},
    });
  }
  return cookie;
}
