import { beforeAll, describe, expect, it } from 'vitest';
import { invite } from '../../src/auth/invitation';
import { personOfLink } from '../../src/auth/one-time-links';
import type { Store } from '../../src/store/client';
import { testStore } from '../database';

const NOW_MS = Date.UTC(2026, 2, 1, 10);
const person = {
  email: 'ann@site.example',
  name: 'Ann',
  role: 'operator',
  publicUrl: 'https://site.example',
  nowMs: NOW_MS,
} as const;

let store: Store;
beforeAll(async () => {
  store = await testStore();
});

const tokenOf = (link: string): string => link.split('/').at(-1)!;

describe('an invitation', () => {
  it('gives a link by which the person is known in the role', async () => {
    const invitation = await invite(store, person);
    if (invitation.kind !== 'invited') throw new Error(invitation.problem);
    expect(await personOfLink(store, tokenOf(invitation.link), NOW_MS)).toMatchObject({
      email: 'ann@site.example',
      role: 'operator',
    });
  });

  it('asked again before a password is chosen replaces the link', async () => {
    const first = await invite(store, person);
    const second = await invite(store, person);
    if (first.kind !== 'invited' || second.kind !== 'invited') throw new Error('Both invite.');
    expect(await personOfLink(store, tokenOf(first.link), NOW_MS)).toBeUndefined();
    expect(await personOfLink(store, tokenOf(second.link), NOW_MS)).toBeDefined();
  });

  it('of somebody known in another role is refused and changes nothing', async () => {
    expect(await invite(store, { ...person, role: 'admin' })).toEqual({
      kind: 'refused',
      problem: 'ann@site.example is known already, as operator. Nothing was changed.',
    });
  });
});
