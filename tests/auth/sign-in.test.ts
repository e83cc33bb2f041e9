import { eq } from 'drizzle-orm';
import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { hashPassword } from '../../src/auth/passwords';
import { createSessions } from '../../src/auth/sessions';
import { signIn, signOut, type FrontDesk } from '../../src/auth/sign-in';
import { SIGN_IN_LIMITS } from '../../src/auth/throttle';
import type { Store } from '../../src/store/client';
import { insertUser } from '../../src/store/people';
import { auditEntry, session, signInAttempt } from '../../src/store/schema/people';
import { testStore } from '../database';

const PASSWORD = 'four unrelated words';
const EMAIL = 'olive@example.org';
const ADDRESS = '192.0.2.10';

let store: Store;
let nowMs: number;
let desk: FrontDesk;

beforeAll(async () => {
  store = await testStore();
  const createdAt = new Date(0);
  const passwordHash = await hashPassword(PASSWORD);
  await insertUser(store, { email: EMAIL, name: 'Olive', role: 'operator', passwordHash, createdAt });
  await insertUser(store, {
    email: 'new@example.org',
    name: 'New',
    role: 'planner',
    passwordHash: null,
    createdAt,
  });
});
beforeEach(async () => {
  await store.db.delete(signInAttempt);
  await store.db.delete(auditEntry);
  await store.db.delete(session);
  nowMs = Date.UTC(2026, 2, 1, 10);
  const sessions = createSessions({ store, publicUrl: 'http://localhost:8720' });
  desk = { store, sessions, now: () => nowMs };
});

const attempt = (email: string, password: string, address = ADDRESS) =>
  signIn(desk, { email, password }, address);
const failTimes = async (times: number, email = EMAIL, address = ADDRESS) => {
  for (let n = 0; n < times; n += 1) await attempt(email, 'not the password', address);
};

describe('signing in', () => {
  it('opens a session for who gives the right password', async () => {
    const outcome = await attempt(EMAIL, PASSWORD);
    expect(outcome).toMatchObject({
      kind: 'signed in',
      person: { email: EMAIL, name: 'Olive', role: 'operator' },
    });
    expect(JSON.stringify(outcome)).not.toContain('argon2');
  });

  it('gives an unknown person, a wrong password and a password not chosen yet the same answer', async () => {
    const answers = [
      await attempt('nobody@example.org', PASSWORD),
      await attempt(EMAIL, 'wrong'),
      await attempt('new@example.org', PASSWORD),
    ];
    expect(answers).toEqual([{ kind: 'refused' }, { kind: 'refused' }, { kind: 'refused' }]);
  });

  it('spends a password check on an unknown person too', async () => {
    const spanMs = async (email: string) => {
      const spans: number[] = [];
      for (let n = 0; n < 4; n += 1) {
        const began = performance.now();
        await attempt(email, 'not the password', `192.0.2.${n}`);
        spans.push(performance.now() - began);
      }
      return Math.min(...spans);
    };
    const ratio = (await spanMs('nobody@example.org')) / (await spanMs(EMAIL));
    expect(ratio).toBeGreaterThan(0.4);
    expect(ratio).toBeLessThan(2.5);
  });

  it('slows the sixth attempt after five failures, right password or not', async () => {
    await failTimes(5);
    expect(await attempt(EMAIL, PASSWORD)).toEqual({ kind: 'slowed', waitMs: SIGN_IN_LIMITS.firstWaitMs });
  });

  it('slows an unknown person just the same', async () => {
    await failTimes(5, 'nobody@example.org');
    expect(await attempt('nobody@example.org', PASSWORD)).toEqual({
      kind: 'slowed',
      waitMs: SIGN_IN_LIMITS.firstWaitMs,
    });
  });

  it('lets the person in once the wait is over, and then counts anew', async () => {
    await failTimes(5);
    nowMs += SIGN_IN_LIMITS.firstWaitMs;
    expect(await attempt(EMAIL, PASSWORD)).toMatchObject({ kind: 'signed in' });
    expect(await attempt(EMAIL, 'wrong')).toEqual({ kind: 'refused' });
  });

  it('doubles the wait with each failure after the fifth', async () => {
    await failTimes(5);
    nowMs += SIGN_IN_LIMITS.firstWaitMs;
    expect(await attempt(EMAIL, 'wrong')).toEqual({ kind: 'refused' });
    expect(await attempt(EMAIL, PASSWORD)).toEqual({
      kind: 'slowed',
      waitMs: 2 * SIGN_IN_LIMITS.firstWaitMs,
    });
  });

  it('does not count what it did not look at, so nobody can be shut out by hammering', async () => {
    await failTimes(5);
    await failTimes(10);
    nowMs += SIGN_IN_LIMITS.firstWaitMs;
    expect(await attempt(EMAIL, PASSWORD)).toMatchObject({ kind: 'signed in' });
  });

  it('lets no more through when attempts come all at once', async () => {
    const outcomes = await Promise.all(Array.from({ length: 12 }, () => attempt(EMAIL, 'wrong')));
    expect(outcomes.filter(({ kind }) => kind === 'refused').length).toBeLessThanOrEqual(
      SIGN_IN_LIMITS.failuresPerEmail,
    );
  });

  it('slows an address that tries many people, but not a person tried from there who comes from elsewhere', async () => {
    for (let n = 0; n < SIGN_IN_LIMITS.failuresPerAddress; n += 1) await failTimes(1, `p${n}@example.org`);
    expect(await attempt(EMAIL, PASSWORD)).toMatchObject({ kind: 'slowed' });
    expect(await attempt(EMAIL, PASSWORD, '198.51.100.1')).toMatchObject({ kind: 'signed in' });
  });

  it('forgets failures after a quarter of an hour', async () => {
    await failTimes(5);
    nowMs += SIGN_IN_LIMITS.windowMs + 1;
    await failTimes(1);
    expect(await attempt(EMAIL, PASSWORD)).toMatchObject({ kind: 'signed in' });
  });

  it('leaves a trail: failed, in and out', async () => {
    await attempt('nobody@example.org', 'wrong');
    const inside = await attempt(EMAIL, PASSWORD);
    if (inside.kind !== 'signed in') throw new Error(inside.kind);
    const cookieHeader = `${inside.cookie.name}=${inside.cookie.value}`;
    await signOut(desk, { person: inside.person, cookieHeader });
    const trail = await store.db.select().from(auditEntry).orderBy(auditEntry.id);
    expect(trail.map(({ userName, action, subject, detail }) => [userName, action, subject, detail])).toEqual(
      [
        ['nobody signed in', 'sign-in failed', 'nobody@example.org', { address: ADDRESS }],
        ['Olive', 'sign-in', EMAIL, { address: ADDRESS }],
        ['Olive', 'sign-out', EMAIL, {}],
      ],
    );
  });

  it('keeps attempts for a day', async () => {
    await failTimes(1);
    nowMs += SIGN_IN_LIMITS.keepAttemptsMs + 1;
    for (let n = 0; n < 50; n += 1) await failTimes(1, `q${n}@example.org`, `198.51.100.${n}`);
    expect(await store.db.select().from(signInAttempt).where(eq(signInAttempt.email, EMAIL))).toEqual([]);
  });
});
