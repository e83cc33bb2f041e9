import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { LineList } from '../../src/contract/lines';
import type { Problem } from '../../src/contract/problem';
import { ROLES } from '../../src/contract/role';
import { madeUpLine } from '../faults/site-under-test';
import { type Mosquitto, startMosquitto } from '../mosquitto';
import { caller, type Caller, type RunningSite, signedIn, startSite } from '../running-site';

let mosquitto: Mosquitto;
let site: RunningSite;
const people = {} as Record<(typeof ROLES)[number], Caller>;

beforeAll(async () => {
  mosquitto = await startMosquitto();
  site = await startSite(mosquitto.url);
  for (const role of ROLES) people[role] = await signedIn(site.address, role);
  await people.engineer.send('POST', '/api/register/lines', madeUpLine('anvil-birch'));
  await people.engineer.send('POST', '/api/register/lines', { ...madeUpLine('bare-line'), settings: [] });
});
afterAll(async () => {
  await site.close();
  await mosquitto.close();
});

const WINDOW = 'from=2026-01-01T00:00:00Z&to=2026-01-02T00:00:00Z';
const READS = [
  '/api/lines',
  '/api/lines/anvil-birch',
  `/api/lines/anvil-birch/snapshots?${WINDOW}`,
  `/api/lines/anvil-birch/levels?${WINDOW}&rung=hour`,
  '/api/warnings',
  '/api/warnings?state=acknowledged',
  '/api/works?line=anvil-birch',
  '/api/feed',
  '/api/feed/refusals',
  '/api/register/lines',
  '/api/register/lines/anvil-birch',
] as const;

describe('without a session', () => {
  it.each(READS)('GET %s answers 401', async (path) => {
    expect((await caller(site.address, '').get(path)).status).toBe(401);
  });

  it('a page sends to the sign-in, and remembers where to', async () => {
    const answer = await caller(site.address, '').get('/lines/anvil-birch');
    expect([answer.status, answer.headers.get('location')]).toEqual([
      303,
      expect.stringContaining('/sign-in?next=%2Flines%2Fanvil-birch'),
    ]);
  });
});

describe('with the wrong role', () => {
  it.each([
    ['operator', 'GET', '/api/feed'],
    ['engineer', 'GET', '/api/feed/refusals'],
    ['planner', 'GET', '/api/register/lines'],
    ['operator', 'POST', '/api/register/lines'],
    ['planner', 'POST', '/api/warnings/1/acknowledge'],
    ['admin', 'POST', '/api/warnings/1/acknowledge'],
    ['operator', 'POST', '/api/works'],
    ['admin', 'POST', '/api/works/1/withdrawn'],
  ] as const)('%s %s %s answers 403', async (role, method, path) => {
    const answer =
      method === 'GET' ? await people[role].get(path) : await people[role].send(method, path, { note: 'x' });
    expect(answer.status).toBe(403);
  });

  it.each(ROLES)('%s reads the lines', async (role) => {
    expect((await people[role].get('/api/lines')).status).toBe(200);
  });
});

describe('with bad parameters', () => {
  it.each([
    ['/api/lines/anvil-birch/snapshots?from=yesterday&to=2026-01-02T00:00:00Z', 'from'],
    ['/api/lines/anvil-birch/snapshots?from=2026-01-02T00:00:00Z&to=2026-01-01T00:00:00Z', 'to'],
    [`/api/lines/anvil-birch/levels?${WINDOW}&rung=fortnight`, 'rung'],
    ['/api/warnings?state=asleep', 'state'],
  ])('GET %s answers 400 and names %s', async (path, field) => {
    const answer = await people.engineer.get(path);
    expect(answer.status).toBe(400);
    expect(((await answer.json()) as Problem).fields.map((one) => one.field)).toContain(field);
  });

  it('an acknowledgement without a note answers 400 and names it', async () => {
    const answer = await people.operator.send('POST', '/api/warnings/1/acknowledge', { note: '  ' });
    expect(answer.status).toBe(400);
    expect(((await answer.json()) as Problem).fields[0]?.field).toBe('note');
  });
});

describe('what is not there', () => {
  it.each([
    '/api/lines/no-such-line',
    `/api/lines/no-such-line/snapshots?${WINDOW}`,
    `/api/lines/no-such-line/levels?${WINDOW}&rung=day`,
    '/api/register/lines/no-such-line',
    '/api/nothing',
  ])('GET %s answers 404', async (path) => {
    expect((await people.engineer.get(path)).status).toBe(404);
  });

  it('acknowledging an unknown warning answers 404', async () => {
    expect(
      (await people.operator.send('POST', '/api/warnings/4711/acknowledge', { note: 'Seen.' })).status,
    ).toBe(404);
  });
});

it('a line without settings is not evaluated, with the reason beside it', async () => {
  const { lines } = (await (await people.planner.get('/api/lines')).json()) as LineList;
  const bare = lines.find(({ key }) => key === 'bare-line');
  expect(bare).toMatchObject({
    condition: 'not evaluated',
    reason: 'The register holds no settings for this line.',
    phases: { a: { differentialAmps: null, restraintAmps: null, thresholdAmps: null, utilisation: null } },
  });
});

it('a signed-out session opens nothing any more', async () => {
  const leaving = await signedIn(site.address, 'planner');
  expect((await leaving.send('POST', '/api/sign-out')).status).toBe(200);
  expect((await leaving.get('/api/lines')).status).toBe(401);
});
