import { DrizzleMySQLAdapter } from '@lucia-auth/adapter-drizzle';
import { type Cookie, Lucia, TimeSpan } from 'lucia';
import { createHash, randomBytes } from 'node:crypto';
import type { Role } from '../contract/role';
import type { Store } from '../store/client';
import { findSessionPerson } from '../store/people';
import { session, user } from '../store/schema/people';
import type { Person } from './person';

const LIFETIME_DAYS = 14;
const TOKEN_BYTES = 32;

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<Record<never, never>, Omit<Person, 'id'>>;
    DatabaseUserAttributes: { email: string; name: string; role: Role };
  }
}

/** What to send so that the browser keeps, renews or drops its session. */
export type SessionCookie = Pick<Cookie, 'name' | 'value' | 'attributes' | 'serialize'>;

export interface Sessions {
  open(userId: string): Promise<SessionCookie>;
  /** Who is signed in. In the second half of its life the session is extended: then there is a cookie to send. */
  continued(
    cookieHeader: string | null | undefined,
  ): Promise<{ person: Person; renewed?: SessionCookie } | undefined>;
  /** Who is signed in at the instant, extending nothing: an open stream must not keep a session alive by itself. */
  personOfCookie(cookieHeader: string | null | undefined, nowMs: number): Promise<Person | undefined>;
  /** Ends the session of the cookie, if it has one; the answer tells the browser to drop it. */
  end(cookieHeader: string | null | undefined): Promise<SessionCookie>;
  endAllOf(userId: string): Promise<void>;
  forgetExpired(): Promise<void>;
}

/** Lucia on our tables. The cookie holds a token and the database its hash: whoever reads the database has no session. */
export function createSessions(site: { store: Store; publicUrl: string }): Sessions {
  const secure = new URL(site.publicUrl).protocol === 'https:';
  const lucia = new Lucia(new DrizzleMySQLAdapter(site.store.db, session, user), {
    sessionExpiresIn: new TimeSpan(LIFETIME_DAYS, 'd'),
    sessionCookie: {
      // browsers take a __Host- cookie only over TLS and from this very host
      name: secure ? '__Host-tareline' : 'tareline',
      attributes: { sameSite: 'lax', secure, path: '/' },
    },
    getUserAttributes: ({ email, name, role }) => ({ email, name, role }),
  });
  const idOf = (cookieHeader: string | null | undefined) => {
    const token = tokenOf(cookieHeader, lucia.sessionCookieName);
    return token === undefined ? undefined : hashOf(token);
  };

  return {
    async open(userId) {
      const token = randomBytes(TOKEN_BYTES).toString('base64url');
      await lucia.createSession(userId, {}, { sessionId: hashOf(token) });
      return lucia.createSessionCookie(token);
    },
    async continued(cookieHeader) {
      const token = tokenOf(cookieHeader, lucia.sessionCookieName);
      if (token === undefined) return undefined;
      const found = await lucia.validateSession(hashOf(token));
      if (found.session === null) return undefined;
      const { id, email, name, role } = found.user;
      const person = { id, email, name, role };
      return found.session.fresh ? { person, renewed: lucia.createSessionCookie(token) } : { person };
    },
    async personOfCookie(cookieHeader, nowMs) {
      const id = idOf(cookieHeader);
      return id === undefined ? undefined : findSessionPerson(site.store, id, new Date(nowMs));
    },
    async end(cookieHeader) {
      const id = idOf(cookieHeader);
      if (id !== undefined) await lucia.invalidateSession(id);
      return lucia.createBlankSessionCookie();
    },
    endAllOf: (userId) => lucia.invalidateUserSessions(userId),
    forgetExpired: () => lucia.deleteExpiredSessions(),
  };
}

const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

// read here and not by Lucia, whose reader throws on a cookie of some other program that is badly escaped
function tokenOf(cookieHeader: string | null | undefined, name: string): string | undefined {
  const pair = cookieHeader?.split(';').find((part) => part.trim().startsWith(`${name}=`));
  return pair
    ?.trim()
    .slice(name.length + 1)
    .match(/^[\w-]{43}$/)?.[0];
}
