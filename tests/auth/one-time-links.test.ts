import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makeFirstAdmin } from '../../src/auth/first-admin';
import { choosePassword, createOneTimeLink, personOfLink } from '../../src/auth/one-time-links';
import { isPassword } from '../../src/auth/passwords';
import { createSessions } from '../../src/auth/sessions';
import type { Store } from '../../src/store/client';
import { findUserByEmail, insertUser, readAdmins } from '../../src/store/people';
import { auditEntry, oneTimeLink, session, user } from '../../src/store/schema/people';
import { testStore } from '../database';

const NOW = Date.UTC(2026, 2, 1, 10);
const HOUR_MS = 3_600_000;
const PUBLIC_URL = 'https://tareline.example';
const PASSWORD = 'four unrelated words';
const tokenOf = (link: string) => new URL(link).pathname.split('/').at(-1)!;

let store: Store;
beforeAll(async () => {
  store = await testStore();
});
beforeEach(async () => {
  await store.db.delete(user);
  await store.db.delete(auditEntry);
});

describe('a one-time link', () => {
  let userId: string;
  let token: string;
  beforeEach(async () => {
    const createdAt = new Date(NOW);
    userId = await insertUser(store, {
      email: 'pia@example.org',
      name: 'Pia',
      role: 'planner',
      passwordHash: null,
      createdAt,
    });
    token = tokenOf(await createOneTimeLink(store, { userId, publicUrl: PUBLIC_URL, nowMs: NOW }));
  });
  const choose = (password: string, nowMs = NOW) => choosePassword(store, { token, password, nowMs });

  it('sets the password of the person it was made for', async () => {
    expect(await choose(PASSWORD)).toMatchObject({ kind: 'welcome', person: { email: 'pia@example.org' } });
    expect(await isPassword(PASSWORD, (await findUserByEmail(store, 'pia@example.org'))?.passwordHash)).toBe(
      true,
    );
    const trail = await store.db.select().from(auditEntry);
    expect(trail.map(({ userName, action }) => [userName, action])).toEqual([['Pia', 'password chosen']]);
  });
  it('works once', async () => {
    await choose(PASSWORD);
    expect(await choose('another long password')).toEqual({ kind: 'link spent' });
    expect(await personOfLink(store, token, NOW)).toBeUndefined();
  });
  it('works once even when it is used twice at the same moment', async () => {
    const outcomes = await Promise.all([choose(PASSWORD), choose('another long password')]);
    expect(outcomes.map(({ kind }) => kind).toSorted()).toEqual(['link spent', 'welcome']);
  });
  it('is over after 24 hours', async () => {
    expect(await choose(PASSWORD, NOW + 24 * HOUR_MS)).toEqual({ kind: 'link spent' });
  });
  it('survives a password that is refused', async () => {
    expect(await choose('short')).toMatchObject({ kind: 'password refused' });
    expect(await choose(PASSWORD)).toMatchObject({ kind: 'welcome' });
  });
  it('stops working when a newer one is made', async () => {
    await createOneTimeLink(store, { userId, publicUrl: PUBLIC_URL, nowMs: NOW });
    expect(await choose(PASSWORD)).toEqual({ kind: 'link spent' });
  });
  it('ends the sessions that the older password opened', async () => {
    await createSessions({ store, publicUrl: PUBLIC_URL }).open(userId);
    await choose(PASSWORD);
    expect(await store.db.select().from(session)).toEqual([]);
  });
  it('is kept as a hash alone', async () => {
    const [row] = await store.db.select().from(oneTimeLink);
    expect(row?.tokenHash).toMatch(/^[0-9a-f]{64}$/);
    expect(row?.tokenHash).not.toBe(token);
  });
  it('is not found by a token of another shape', async () => {
    expect(await personOfLink(store, "' or 1=1 --", NOW)).toBeUndefined();
  });
});

describe('the first admin', () => {
  const make = (email: string, name = 'Ada') =>
    makeFirstAdmin(store, { email, name, publicUrl: PUBLIC_URL, nowMs: NOW });

  it('is made without a password and chooses it by the link', async () => {
    const made = await make('ada@example.org');
    if (made.kind !== 'made') throw new Error(made.problem);
    expect(made.link).toMatch(/^https:\/\/tareline\.example\/welcome\/[\w-]{43}$/);
    expect((await findUserByEmail(store, 'ada@example.org'))?.passwordHash).toBeNull();
    const chosen = await choosePassword(store, { token: tokenOf(made.link), password: PASSWORD, nowMs: NOW });
    expect(chosen).toMatchObject({ kind: 'welcome', person: { role: 'admin' } });
  });
  it('is refused when there is one already', async () => {
    const made = await make('ada@example.org');
    if (made.kind !== 'made') throw new Error(made.problem);
    await choosePassword(store, { token: tokenOf(made.link), password: PASSWORD, nowMs: NOW });
    expect(await make('eve@example.org')).toEqual({
      kind: 'refused',
      problem: 'There is an admin already: ada@example.org. Nothing was changed.',
    });
  });
  it('gets a new link, and a corrected address, until a password has been chosen', async () => {
    await make('ada@exmaple.org');
    expect(await make('ada@example.org')).toMatchObject({ kind: 'made' });
    expect((await readAdmins(store)).map(({ email }) => email)).toEqual(['ada@example.org']);
    expect(await store.db.select().from(oneTimeLink)).toHaveLength(1);
  });
  it('is refused an address that somebody else has', async () => {
    const createdAt = new Date(NOW);
    await insertUser(store, {
      email: 'olive@example.org',
      name: 'Olive',
      role: 'operator',
      passwordHash: null,
      createdAt,
    });
    expect(await make('olive@example.org')).toMatchObject({ kind: 'refused' });
  });
});
