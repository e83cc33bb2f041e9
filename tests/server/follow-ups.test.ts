import { beforeAll, describe, expect, it } from 'vitest';
import { followUpInFullSchema, followUpListSchema } from '../../src/contract/follow-ups';
import { followUpSchema } from '../../src/contract/standing';
import { GET as getFollowUps, POST as postFollowUp } from '../../src/pages/api/follow-ups';
import { POST as postDone } from '../../src/pages/api/follow-ups/[id]/done';
import { readForecastList } from '../../src/server/reading/forecast-list';
import type { Site } from '../../src/server/site';
import { writeLevels } from '../../src/store/levels';
import { auditEntry } from '../../src/store/schema/people';
import { line } from '../../src/store/schema/register';
import { standingVerdict } from '../../src/store/schema/standing';
import { testStore } from '../database';
import { answerOf, NOW_MS, type Sent } from '../register/endpoint-call';
import { levelRow } from '../store/made-up-levels';
import { madeUpLineOf, storedFleet } from '../store/made-up-fleet';

const store = await testStore();
let ids: Map<string, number>;
beforeAll(async () => {
  ids = await storedFleet(store, 90);
});

const KEY = madeUpLineOf(1).key;
const asPlanner = (sent: Sent = {}): Sent => ({ role: 'planner', ...sent });
const open = (body: Record<string, unknown>) => answerOf(store, postFollowUp, asPlanner({ body }));
const list = async (query: string) =>
  followUpListSchema.parse((await answerOf(store, getFollowUps, asPlanner({ query }))).body).followUps;
const done = (id: number | string, sent: Sent = { body: {} }) =>
  answerOf(store, postDone, asPlanner({ params: { id: String(id) }, ...sent }));

describe('a follow-up', () => {
  it('is opened, listed the one due first first, done once, and each step stands in the audit trail', async () => {
    const opened = await open({
      line: KEY,
      phase: 'b',
      cause: 'ratio mismatch',
      due: '2026-05-12',
      note: ' Check. ',
    });
    expect(opened.status).toBe(201);
    const kept = followUpSchema.parse(opened.body);
    expect(kept).toMatchObject({ line: KEY, lineName: madeUpLineOf(1).name, note: 'Check.', state: 'open' });
    expect(kept).toMatchObject({
      openedBy: 'Mira Holt',
      openedAt: '2026-03-02T08:00:00.000Z',
      due: '2026-05-12',
    });
    await open({ line: KEY, note: 'Some day.' });
    await open({ line: madeUpLineOf(2).key, note: 'Soon.', due: '2026-03-10' });
    expect((await list('?state=open')).map(({ note }) => note)).toEqual(['Soon.', 'Check.', 'Some day.']);
    expect((await list(`?line=${KEY}&state=open`)).map(({ note }) => note)).toEqual(['Check.', 'Some day.']);
    expect(await done(kept.id)).toMatchObject({
      status: 200,
      body: { state: 'done', doneAt: '2026-03-02T08:00:00.000Z' },
    });
    expect((await done(kept.id)).status).toBe(409);
    expect((await list('?state=done')).map(({ note }) => note)).toEqual(['Check.']);
    expect((await list('')).map(({ note }) => note)).toEqual(['Soon.', 'Some day.', 'Check.']);
    const trail = await store.db.select().from(auditEntry);
    expect(trail.map(({ action, subject, userName }) => [action, subject, userName])).toEqual([
      ['follow-up opened', KEY, 'Mira Holt'],
      ['follow-up opened', KEY, 'Mira Holt'],
      ['follow-up opened', madeUpLineOf(2).key, 'Mira Holt'],
      ['follow-up done', KEY, 'Mira Holt'],
    ]);
  });

  it('is refused with the field named', async () => {
    const refused = await open({ line: KEY, note: '  ', due: 'soon', cause: 'weather' });
    expect(refused.status).toBe(400);
    const { fields } = refused.body as { fields: { field: string; problem: string }[] };
    expect(fields.map(({ field }) => field).sort()).toEqual(['cause', 'due', 'note']);
    expect(fields.find(({ field }) => field === 'note')?.problem).toBe('Say what is to be done.');
    expect((await open({ line: 'no-such-line', note: 'x' })).status).toBe(404);
    expect((await done(4711)).status).toBe(404);
    expect((await done('x')).status).toBe(404);
    expect((await answerOf(store, getFollowUps, asPlanner({ query: '?state=asleep' }))).status).toBe(400);
  });

  it('that is done is listed with the work that ended it and with its line’s terminals', async () => {
    const { id } = followUpInFullSchema.parse((await open({ line: KEY, note: 'Exchange it.' })).body);
    const work = { terminal: 'corrin', doneOn: '2026-03-01', what: 'Transformer of phase B exchanged.' };
    const ended = followUpInFullSchema.parse((await done(id, { body: { work } })).body);
    expect(ended).toMatchObject({
      state: 'done',
      terminals: [
        { key: 'birk', name: 'Birk' },
        { key: 'corrin', name: 'Corrin' },
      ],
      works: [{ ...work, line: KEY, followUp: id, recordedBy: 'Mira Holt' }],
    });
    expect((await list('?state=done')).find((one) => one.id === id)).toEqual(ended);
  });

  it('is done without work by a body of nothing, and not by one that is no JSON', async () => {
    const { id } = followUpInFullSchema.parse((await open({ line: KEY, note: 'Another.' })).body);
    expect((await done(id, { body: 'done=yes', contentType: 'text/plain' })).status).toBe(415);
    expect((await list('?state=open')).map((one) => one.id)).toContain(id);
    expect((await done(id, { body: '', contentType: '' })).status).toBe(200);
    expect((await list('?state=done')).find((one) => one.id === id)?.works).toEqual([]);
  });

  it('of those done, as many are listed as are asked for', async () => {
    expect(await list('?state=done&limit=1')).toHaveLength(1);
    const few = await answerOf(store, getFollowUps, asPlanner({ query: '?limit=0' }));
    expect(few.status).toBe(400);
  });

  it('is for planner and engineer alone', async () => {
    for (const role of ['operator', 'admin'] as const) {
      expect((await answerOf(store, postFollowUp, { role, body: { line: KEY, note: 'x' } })).status).toBe(
        403,
      );
      expect((await answerOf(store, getFollowUps, { role })).status).toBe(403);
      expect((await answerOf(store, postDone, { role, params: { id: '1' }, body: {} })).status).toBe(403);
    }
    expect((await answerOf(store, getFollowUps, {})).status).toBe(401);
    expect((await answerOf(store, getFollowUps, { role: 'engineer' })).status).toBe(200);
  });
});

describe('the forecast', () => {
  const site = {
    store,
    now: () => NOW_MS,
    settings: { NEAR_RATIO: 0.7, PHASE_LETTERS: 'A,B,C', SITE_TIME_ZONE: 'Europe/Berlin' },
  } as unknown as Site;
  const dayRow = (lineId: number, phase: 'a' | 'b' | 'c', day: string, medianAmps: number | null) =>
    levelRow({ lineId, phase, start: new Date(`${day}T00:00:00Z`) }, medianAmps);

  it('lists every line that rises or stands beyond the near mark, and counts the others', async () => {
    const rows = await store.db.select().from(standingVerdict);
    const listed = rows.filter((row) => row.creepVerdict !== null || (row.shareOfPickup ?? 0) >= 0.7);
    await store.db.insert(line).values({
      key: 'new-line',
      name: 'New line',
      voltageKv: 110,
      ratingAmps: 600,
      emergencyRatingAmps: 700,
      lengthKm: 10,
      kind: 'overhead',
      goesBy: 'phasors',
      inService: true,
      seriesCompensated: false,
    });
    const list = await readForecastList(site);
    expect(list.lines.reduce((sum, { phases }) => sum + phases.length, 0)).toBe(listed.length);
    expect(list.lines.length).toBe(new Set(listed.map(({ lineId }) => lineId)).size);
    const beyond = new Set(rows.filter((row) => (row.shareOfPickup ?? 0) >= 0.7).map(({ lineId }) => lineId));
    const creeping = new Set(rows.filter((row) => row.creepVerdict === 'creep').map(({ lineId }) => lineId));
    expect(list.beyondCount).toBe(beyond.size);
    expect(list.comingCount).toBe([...creeping].filter((id) => !beyond.has(id)).length);
    expect(list.steadyCount).toBe(90 - list.lines.length);
    expect([list.unknownCount, list.leftOutCount]).toEqual([1, 0]);
    expect(list.followUps.map(({ note }) => note)).toEqual(['Soon.', 'Some day.']);
    expect(list.doneFollowUps).toHaveLength(3);
  });

  it('brings the daily levels of the last sixty days of each phase, days without a level as such', async () => {
    const rising = madeUpLineOf(1);
    const lineId = ids.get(rising.key)!;
    await writeLevels(store, 'day', [
      dayRow(lineId, 'a', '2025-12-01', 9),
      dayRow(lineId, 'a', '2026-02-25', 11),
      dayRow(lineId, 'a', '2026-02-27', 12.26),
      dayRow(lineId, 'b', '2026-02-28', 30),
    ]);
    const found = (await readForecastList(site)).lines.find(({ key }) => key === rising.key)!;
    expect(Object.fromEntries(found.phases.map(({ verdict, history }) => [verdict.phase, history]))).toEqual({
      c: undefined,
      a: { from: '2026-02-25', levelsAmps: [11, null, 12.3] },
    });
    expect(found.substations.map(({ name }) => name)).toEqual(rising.ends);
  });
});
