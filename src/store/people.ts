import { and, count, desc, eq, gt, isNull, lt, max } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import type { Role } from '../contract/role';
import type { Store } from './client';
import { oneTimeLink, session, signInAttempt, user } from './schema/people';

export type UserRow = typeof user.$inferSelect;

/** A person as the sessions and links tell of them: everything but the password. */
const personColumns = { id: user.id, email: user.email, name: user.name, role: user.role };

export async function findUserByEmail(store: Store, email: string): Promise<UserRow | undefined> {
  const [row] = await store.db.select().from(user).where(eq(user.email, email));
  return row;
}

/** Every admin, those without a password first. */
export async function readAdmins(store: Store): Promise<UserRow[]> {
  return store.db
    .select()
    .from(user)
    .where(eq(user.role, 'admin'))
    .orderBy(user.passwordHash, user.createdAt);
}

/** Adds a person and says their id; a password hash of null waits for a one-time link. */
export async function insertUser(
  store: Store,
  person: { email: string; name: string; role: Role; passwordHash: string | null; createdAt: Date },
): Promise<string> {
  const id = randomUUID();
  await store.db.insert(user).values({ id, ...person, email: person.email.toLowerCase() });
  return id;
}

export async function renameUser(
  store: Store,
  id: string,
  to: { email: string; name: string },
): Promise<void> {
  await store.db.update(user).set(to).where(eq(user.id, id));
}

export async function findSessionPerson(store: Store, sessionId: string, at: Date) {
  const [row] = await store.db
    .select(personColumns)
    .from(session)
    .innerJoin(user, eq(session.userId, user.id))
    .where(and(eq(session.id, sessionId), gt(session.expiresAt, at)));
  return row;
}

export async function replaceOneTimeLink(
  store: Store,
  link: { tokenHash: string; userId: string; expiresAt: Date },
): Promise<void> {
  await store.db.transaction(async (tx) => {
    await tx.delete(oneTimeLink).where(eq(oneTimeLink.userId, link.userId));
    await tx.insert(oneTimeLink).values(link);
  });
}

const unspent = (tokenHash: string, at: Date) =>
  and(eq(oneTimeLink.tokenHash, tokenHash), isNull(oneTimeLink.usedAt), gt(oneTimeLink.expiresAt, at));

export async function findLinkPerson(store: Store, tokenHash: string, at: Date) {
  const [row] = await store.db
    .select(personColumns)
    .from(oneTimeLink)
    .innerJoin(user, eq(oneTimeLink.userId, user.id))
    .where(unspent(tokenHash, at));
  return row;
}

/** Spends the link, sets the password and ends the person's sessions, all or nothing; false when it was spent. */
export async function spendOneTimeLink(
  store: Store,
  choice: { tokenHash: string; userId: string; passwordHash: string; at: Date },
): Promise<boolean> {
  return store.db.transaction(async (tx) => {
    const [marked] = await tx
      .update(oneTimeLink)
      .set({ usedAt: choice.at })
      .where(unspent(choice.tokenHash, choice.at));
    if (marked.affectedRows !== 1) return false;
    await tx.update(user).set({ passwordHash: choice.passwordHash }).where(eq(user.id, choice.userId));
    await tx.delete(session).where(eq(session.userId, choice.userId));
    return true;
  });
}

/** Records an attempt as failed, which it is until it is marked otherwise, and says its id. */
export async function insertAttempt(
  store: Store,
  attempt: { at: Date; email: string; address: string },
): Promise<number> {
  const [inserted] = await store.db.insert(signInAttempt).values({ ...attempt, succeeded: false });
  return inserted.insertId;
}

export async function markAttemptSucceeded(store: Store, id: number): Promise<void> {
  await store.db.update(signInAttempt).set({ succeeded: true }).where(eq(signInAttempt.id, id));
}

export async function forgetAttempt(store: Store, id: number): Promise<void> {
  await store.db.delete(signInAttempt).where(eq(signInAttempt.id, id));
}

export async function forgetAttemptsBefore(store: Store, at: Date): Promise<void> {
  await store.db.delete(signInAttempt).where(lt(signInAttempt.at, at));
}

/** Attempts older than the one being judged, and not before the window. */
interface AttemptWindow {
  readonly before: number;
  readonly since: Date;
}

/** Failures to sign in as somebody since they last succeeded. */
export async function failuresOf(store: Store, email: string, window: AttemptWindow) {
  const theirs = and(eq(signInAttempt.email, email), gt(signInAttempt.at, window.since));
  const [success] = await store.db
    .select({ id: signInAttempt.id })
    .from(signInAttempt)
    .where(and(theirs, eq(signInAttempt.succeeded, true), lt(signInAttempt.id, window.before)))
    .orderBy(desc(signInAttempt.id))
    .limit(1);
  return countFailures(store, and(theirs, gt(signInAttempt.id, success?.id ?? 0)), window);
}

/** Failures from an address, whoever was tried; a success does not clear them, or one's own account would. */
export async function failuresFrom(store: Store, address: string, window: AttemptWindow) {
  return countFailures(
    store,
    and(eq(signInAttempt.address, address), gt(signInAttempt.at, window.since)),
    window,
  );
}

async function countFailures(store: Store, which: ReturnType<typeof and>, window: AttemptWindow) {
  const [row] = await store.db
    .select({ count: count(), lastAt: max(signInAttempt.at) })
    .from(signInAttempt)
    .where(and(which, eq(signInAttempt.succeeded, false), lt(signInAttempt.id, window.before)));
  return { count: row?.count ?? 0, lastAtMs: row?.lastAt?.getTime() };
}
