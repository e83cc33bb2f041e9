import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createSessions, type SessionCookie, type Sessions } from '../../src/auth/sessions';
import type { Store } from '../../src/store/client';
import { insertUser } from '../../src/store/people';
import { session } from '../../src/store/schema/people';
import { testStore } from '../database';

const DAY_MS = 86_400_000;
let store: Store;
let sessions: Sessions;
let userId: string;

beforeAll(async () => {
  store = await testStore();
  sessions = createSessions({ store, publicUrl: 'http://localhost:8720' });
  userId = await insertUser(store, {
    email: 'Edda@Example.org',
    name: 'Edda',
    role: 'engineer',
    passwordHash: null,
    createdAt: new Date(0),
  });
});
beforeEach(() => store.db.delete(session).then(() => undefined));

const headerOf = ({ name, value }: SessionCookie) => `theme=dark; ${name}=${value}`;
// Lucia reads the clock itself, so the tests move the session and not the time
const expireIn = (ms: number) => store.db.update(session).set({ expiresAt: new Date(Date.now() + ms) });

describe('a session', () => {
  it('tells who is signed in', async () => {
    const header = headerOf(await sessions.open(userId));
    const person = { id: userId, email: 'edda@example.org', name: 'Edda', role: 'engineer' };
    expect(await sessions.continued(header)).toEqual({ person });
    expect(await sessions.personOfCookie(header, Date.now())).toEqual(person);
  });

  it('keeps no token in the database', async () => {
    const cookie = await sessions.open(userId);
    const [row] = await store.db.select().from(session);
    expect(row?.id).toMatch(/^[0-9a-f]{64}$/);
    expect(row?.id).not.toContain(cookie.value);
    expect(await sessions.continued(`${cookie.name}=${row?.id}`)).toBeUndefined();
  });

  it('is over when its time is', async () => {
    const header = headerOf(await sessions.open(userId));
    await expireIn(-1);
    expect(await sessions.personOfCookie(header, Date.now())).toBeUndefined();
    expect(await sessions.continued(header)).toBeUndefined();
    expect(await store.db.select().from(session)).toEqual([]);
  });

  it('is extended by pages in the second half of its life, and not by an open stream', async () => {
    const cookie = await sessions.open(userId);
    await expireIn(3 * DAY_MS);
    const readExpiry = async () => (await store.db.select().from(session))[0]!.expiresAt.getTime();
    const before = await readExpiry();
    await sessions.personOfCookie(headerOf(cookie), Date.now());
    expect(await readExpiry()).toBe(before);
    const { renewed } = (await sessions.continued(headerOf(cookie)))!;
    expect(renewed?.value).toBe(cookie.value);
    expect(await readExpiry()).toBeGreaterThan(Date.now() + 13 * DAY_MS);
  });

  it('ends at sign-out, for the pages and for the stream', async () => {
    const header = headerOf(await sessions.open(userId));
    const blank = await sessions.end(header);
    expect(blank.attributes.maxAge).toBe(0);
    expect(await sessions.continued(header)).toBeUndefined();
    expect(await sessions.personOfCookie(header, Date.now())).toBeUndefined();
  });

  it.each([undefined, null, '', 'tareline=', 'tareline=short', 'other=%E0%A4%A; tareline=%', 'tareline'])(
    'is not made by a cookie header like %j',
    async (header) => {
      expect(await sessions.continued(header)).toBeUndefined();
      expect(await sessions.personOfCookie(header, Date.now())).toBeUndefined();
    },
  );
});

describe('the cookie of a session', () => {
  it('cannot be read by a script nor sent by another site', async () => {
    const text = (await sessions.open(userId)).serialize();
    expect(text).toMatch(/^tareline=[\w-]{43}; HttpOnly; Max-Age=1209600; Path=\/; SameSite=Lax$/);
  });
  it('goes over TLS alone, and to this host alone, where the site is reached by TLS', async () => {
    const secure = createSessions({ store, publicUrl: 'https://tareline.example' });
    const text = (await secure.open(userId)).serialize();
    expect(text).toMatch(
      /^__Host-tareline=[\w-]{43}; HttpOnly; Max-Age=1209600; Path=\/; SameSite=Lax; Secure$/,
    );
  });
});
