import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { lineCompositionSchema } from '../../src/contract/composition';
import { followUpListSchema } from '../../src/contract/follow-ups';
import { marginScatterSchema } from '../../src/contract/margins';
import type { Problem } from '../../src/contract/problem';
import { ROLES, type Role } from '../../src/contract/role';
import { comparisonSchema, followUpSchema, marginListSchema } from '../../src/contract/standing';
import { workListSchema, workSchema } from '../../src/contract/works';
import { madeUpLine } from '../faults/site-under-test';
import { type Mosquitto, startMosquitto } from '../mosquitto';
import { caller, type Caller, type RunningSite, signedIn, startSite } from '../running-site';

let mosquitto: Mosquitto;
let site: RunningSite;
const people = {} as Record<Role, Caller>;

beforeAll(async () => {
  mosquitto = await startMosquitto();
  site = await startSite(mosquitto.url);
  for (const role of ROLES) people[role] = await signedIn(site.address, role);
  await people.engineer.send('POST', '/api/register/lines', madeUpLine('anvil-birch'));
});
afterAll(async () => {
  await site.close();
  await mosquitto.close();
});

const ALL: readonly Role[] = ROLES;
const MARGINS: readonly Role[] = ['engineer', 'planner', 'admin'];
const PLANNING: readonly Role[] = ['engineer', 'planner'];
const COMPOSITION = '/api/lines/anvil-birch/composition?from=2026-01-01T00:00:00Z&to=2026-03-01T00:00:00Z';

const READS: readonly (readonly [path: string, roles: readonly Role[], answer: z.ZodType | 'text/csv'])[] = [
  ['/api/margins', MARGINS, marginListSchema],
  ['/api/margins?sort=nearLikely&owner=Nobody&after=2026-05-01~anvil-birch~b', MARGINS, marginListSchema],
  ['/api/margins/scatter', MARGINS, marginScatterSchema],
  ['/api/margins/export.csv?columns=level,forecast', MARGINS, 'text/csv'],
  ['/api/follow-ups?state=open', PLANNING, followUpListSchema],
  ['/api/works?line=anvil-birch', ALL, workListSchema],
  [COMPOSITION, ALL, lineCompositionSchema],
  ['/api/lines/anvil-birch/comparison?at=2026-02-01', ALL, comparisonSchema],
];

describe.each(READS)('GET %s', (path, roles, answer) => {
  it('answers whoever may see it in the agreed form, and 403 whoever may not', async () => {
    for (const role of ROLES) {
      const found = await people[role].get(path);
      expect(found.status, role).toBe(roles.includes(role) ? 200 : 403);
      if (!roles.includes(role)) continue;
      if (answer === 'text/csv') expect(found.headers.get('content-type')).toContain('text/csv');
      else expect(answer.safeParse(await found.json()).error, role).toBeUndefined();
    }
  });

  it('answers 401 without a session', async () => {
    expect((await caller(site.address, '').get(path)).status).toBe(401);
  });
});

describe('with bad parameters', () => {
  it.each([
    ['/api/margins?sort=colour', 'sort'],
    ['/api/margins?voltage=high', 'voltage'],
    ['/api/margins?after=-1', 'after'],
    ['/api/margins?sort=nearLikely&after=0.4~anvil-birch~b', 'after'],
    ['/api/margins/scatter?creep=perhaps', 'creep'],
    ['/api/follow-ups?state=asleep', 'state'],
    ['/api/works?line=No%20Key', 'line'],
    ['/api/lines/anvil-birch/composition?from=yesterday&to=2026-03-01T00:00:00Z', 'from'],
    ['/api/lines/anvil-birch/comparison?at=2026-02-30', 'at'],
    ['/api/lines/anvil-birch/comparison', 'at'],
  ])('GET %s answers 400 with a sentence for %s', async (path, field) => {
    const answer = await people.engineer.get(path);
    expect(answer.status).toBe(400);
    const { fields } = (await answer.json()) as Problem;
    expect(fields.find((one) => one.field === field)?.problem).toMatch(/^[A-Z].*[.]$/);
  });

  it.each([
    '/api/lines/no-such-line/comparison?at=2026-02-01',
    COMPOSITION.replace('anvil-birch', 'no-such-line'),
  ])('GET %s answers 404', async (path) => {
    expect((await people.engineer.get(path)).status).toBe(404);
  });
});

it('a line without any history is answered in words, and by no number', async () => {
  const composition = lineCompositionSchema.parse(await (await people.planner.get(COMPOSITION)).json());
  for (const phase of Object.values(composition.phases))
    expect(phase).toMatchObject({ kind: 'not separable', reason: expect.stringMatching(/[.]$/) as string });
  const { phases } = comparisonSchema.parse(
    await (await people.planner.get('/api/lines/anvil-birch/comparison?at=2026-02-01')).json(),
  );
  for (const { before, after, test, atReference } of phases)
    expect([before.medianAmps, after.medianAmps, test, atReference]).toEqual([null, null, null, null]);
});

describe('what people write', () => {
  it('is opened, ended and recorded by planner and engineer alone', async () => {
    const sent = { line: 'anvil-birch', note: 'Look at the wiring.' };
    const work = { line: 'anvil-birch', doneOn: '2026-01-15', what: 'Wiring tightened.' };
    for (const role of ['operator', 'admin'] as const) {
      expect((await people[role].send('POST', '/api/follow-ups', sent)).status).toBe(403);
      expect((await people[role].send('POST', '/api/works', work)).status).toBe(403);
      expect((await people[role].send('POST', '/api/works/1/withdrawn', {})).status).toBe(403);
    }
    for (const role of PLANNING) {
      const opened = await people[role].send('POST', '/api/follow-ups', sent);
      expect(opened.status).toBe(201);
      const { id } = followUpSchema.parse(await opened.json());
      expect((await people[role].send('POST', `/api/follow-ups/${id}/done`, {})).status).toBe(200);
      const recorded = await people[role].send('POST', '/api/works', work);
      expect(recorded.status).toBe(201);
      const { id: recordedId } = workSchema.parse(await recorded.json());
      expect((await people[role].send('POST', `/api/works/${recordedId}/withdrawn`, {})).status).toBe(200);
    }
  });

  it('is refused with the field named where it can’t be taken', async () => {
    const answer = await people.planner.send('POST', '/api/works', { line: 'anvil-birch', doneOn: 'soon' });
    expect(answer.status).toBe(400);
    const { fields } = (await answer.json()) as Problem;
    expect(fields.map(({ field }) => field).sort()).toEqual(['doneOn', 'what']);
  });
});
