import { beforeAll, describe, expect, it } from 'vitest';
import { lineDetailSchema } from '../../src/contract/lines';
import { followUpSchema } from '../../src/contract/standing';
import { workListSchema, workSchema, type Work } from '../../src/contract/works';
import { readLineHistory } from '../../src/ingest/verdict/line-history';
import { standingMarks } from '../../src/ingest/verdict/standing-marks';
import { POST as postFollowUp } from '../../src/pages/api/follow-ups';
import { POST as postDone } from '../../src/pages/api/follow-ups/[id]/done';
import { GET as getWorks, POST as postWork } from '../../src/pages/api/works';
import { POST as postWithdrawn } from '../../src/pages/api/works/[id]/withdrawn';
import { readComparison } from '../../src/server/reading/comparison';
import { readLineDetail } from '../../src/server/reading/lines';
import type { Site } from '../../src/server/site';
import { readFollowUp } from '../../src/store/follow-ups';
import { writeLevels } from '../../src/store/levels';
import { auditEntry } from '../../src/store/schema/people';
import { writeVerdicts } from '../../src/store/standing';
import { testStore } from '../database';
import { demoHistoryOf, demoRosterLine } from '../ingest/demo-history';
import { answerOf, NOW_MS, type Sent } from '../register/endpoint-call';
import { levelRow } from '../store/made-up-levels';
import { madeUpLineOf, madeUpVerdict, storedFleet, verdictRow } from '../store/made-up-fleet';

const store = await testStore();
let ids: Map<string, number>;
beforeAll(async () => {
  ids = await storedFleet(store, 4);
});

const { key: KEY, name: NAME, ends } = madeUpLineOf(1);
const END = ends[0].toLowerCase();
const asPlanner = (sent: Sent = {}): Sent => ({ role: 'planner', ...sent });
const record = (body: Record<string, unknown>) => answerOf(store, postWork, asPlanner({ body }));
const withdraw = (id: number | string) =>
  answerOf(store, postWithdrawn, asPlanner({ params: { id: String(id) }, body: {} }));
const works = async (query = ''): Promise<Work[]> =>
  workListSchema.parse((await answerOf(store, getWorks, { role: 'operator', query })).body).works;
const problemOf = ({ status, body }: { status: number; body: unknown }) => ({
  status,
  ...(body as { fields: { field: string; problem: string }[] }).fields[0],
});

describe('work done on a line', () => {
  it('is recorded, listed the newest day first, withdrawn once and kept, each in the audit trail', async () => {
    const sent = { line: KEY, terminal: END, doneOn: '2026-02-20', what: ' Transformer exchanged. ' };
    const recorded = await record(sent);
    expect(recorded.status).toBe(201);
    const kept = workSchema.parse(recorded.body);
    expect(kept).toMatchObject({
      line: KEY,
      lineName: NAME,
      terminal: END,
      doneOn: '2026-02-20',
      what: 'Transformer exchanged.',
      recordedBy: 'Mira Holt',
      recordedAt: new Date(NOW_MS).toISOString(),
      withdrawn: null,
    });
    await record({ line: KEY, doneOn: '2026-02-25', what: 'Joint remade.' });
    await record({ line: madeUpLineOf(2).key, doneOn: '2026-02-10', what: 'Channel re-routed.' });
    expect((await works(`?line=${KEY}`)).map(({ what }) => what)).toEqual([
      'Joint remade.',
      'Transformer exchanged.',
    ]);
    expect(await works()).toHaveLength(3);
    expect((await withdraw(kept.id)).status).toBe(200);
    expect((await withdraw(kept.id)).status).toBe(409);
    expect((await works(`?line=${KEY}`)).at(-1)).toMatchObject({
      id: kept.id,
      withdrawn: { by: 'Mira Holt', at: new Date(NOW_MS).toISOString() },
    });
    const trail = await store.db.select().from(auditEntry);
    expect(trail.map(({ action, subject }) => [action, subject])).toEqual([
      ['work recorded', KEY],
      ['work recorded', KEY],
      ['work recorded', madeUpLineOf(2).key],
      ['work withdrawn', KEY],
    ]);
  });

  it('parts the history that a verdict goes by, as long as it is not withdrawn', async () => {
    const line = demoRosterLine('dunmarsh-oxhollow');
    const demo = demoHistoryOf(line, { nowMs: NOW_MS, epochMs: NOW_MS, days: 20, sampleMs: 7_200_000 });
    const { works: read } = await readLineHistory(store, ids.get(KEY)!, {
      nowMs: NOW_MS,
      withLoad: true,
    });
    expect(read.map(({ doneOn }) => doneOn)).toEqual(['2026-02-25']);
    const marks = standingMarks(line, { ...demo, works: read }, { phase: 'a', step: null });
    expect(marks).toEqual([{ day: Date.parse('2026-02-25') / 86_400_000, kind: 'work recorded' }]);
  });
});

describe('work that can’t be recorded', () => {
  it.each([
    [{ line: 'no-such-line' }, 404, 'line', 'The register has no line no-such-line.'],
    [
      { terminal: 'nowhere' },
      400,
      'terminal',
      `The line ${KEY} has no terminal nowhere. It has ${ends.map((end) => end.toLowerCase()).join(', ')}.`,
    ],
    [{ doneOn: '2026-03-04' }, 400, 'doneOn', 'This day has not come yet. Record work once it is done.'],
    [{ doneOn: 'soon' }, 400, 'doneOn', 'Give the day on which the work was done.'],
    [{ what: '  ' }, 400, 'what', 'Say what was done.'],
    [{ followUp: 4711 }, 400, 'followUp', `The line ${KEY} has no follow-up with the number 4711.`],
  ])('%o is refused with a sentence', async (change, status, field, problem) => {
    const before = (await works()).length;
    const answer = await record({ line: KEY, doneOn: '2026-02-20', what: 'x', ...change });
    expect(problemOf(answer)).toEqual({ status, field, problem });
    expect(await works()).toHaveLength(before);
  });

  it('by whoever may not; everybody may read', async () => {
    const body = { line: KEY, doneOn: '2026-02-20', what: 'x' };
    for (const role of ['operator', 'admin'] as const) {
      expect((await answerOf(store, postWork, { role, body })).status).toBe(403);
      expect((await answerOf(store, postWithdrawn, { role, params: { id: '1' }, body })).status).toBe(403);
      expect((await answerOf(store, getWorks, { role })).status).toBe(200);
    }
    expect((await answerOf(store, getWorks, {})).status).toBe(401);
    expect((await withdraw(4711)).status).toBe(404);
    expect((await withdraw('x')).status).toBe(404);
  });
});

describe('a follow-up that ends with work', () => {
  const opened = async () =>
    followUpSchema.parse(
      (await answerOf(store, postFollowUp, asPlanner({ body: { line: KEY, note: 'Look.' } }))).body,
    ).id;
  const end = (id: number, body: unknown) =>
    answerOf(store, postDone, asPlanner({ params: { id: String(id) }, body }));

  it('records it with its number', async () => {
    const id = await opened();
    const work = { doneOn: '2026-03-01', what: 'Secondary wiring tightened.', terminal: null };
    expect((await end(id, { work })).status).toBe(200);
    expect((await works(`?line=${KEY}`))[0]).toMatchObject({ ...work, followUp: id });
  });

  it('stays open where the work is refused', async () => {
    const id = await opened();
    const before = (await works()).length;
    const answer = await end(id, { work: { doneOn: '2027-01-01', what: 'x' } });
    expect(problemOf(answer)).toMatchObject({ status: 400, field: 'doneOn' });
    expect((await readFollowUp(store, id))?.state).toBe('open');
    expect(await works()).toHaveLength(before);
    expect((await end(id, {})).status).toBe(200);
  });
});

describe('what goes by recorded works', () => {
  const GONE_BY = madeUpLineOf(3).key;
  const kept = async (change: Record<string, unknown> = {}): Promise<Work> =>
    workSchema.parse(
      (await record({ line: GONE_BY, doneOn: '2026-03-02', what: 'Relay replaced.', ...change })).body,
    );
  const DAY_MS = 86_400_000;
  const site = {
    store,
    now: () => NOW_MS,
    live: { results: () => new Map() },
    settings: { NEAR_RATIO: 0.7, NOMINAL_FREQUENCY_HZ: 50, PERIOD_MS: 2_000 },
  } as unknown as Site;

  it('a line’s detail has those that were not withdrawn', async () => {
    const { id } = await kept({ what: 'In error.' });
    await kept();
    await withdraw(id);
    const detail = lineDetailSchema.parse(await readLineDetail(site, GONE_BY));
    expect(detail.works.map(({ what }) => what)).toEqual(['Relay replaced.']);
  });

  it('a comparison reaches to the next work as it is recorded now, whatever the last look at the line knew', async () => {
    const lineId = ids.get(GONE_BY)!;
    const startOf = (day: number) => new Date(Date.UTC(2026, 0, 1) + day * DAY_MS);
    await writeLevels(
      store,
      'day',
      Array.from({ length: 60 }, (_, day) => levelRow({ lineId, phase: 'a', start: startOf(day) }, 10)),
    );
    const stale = { on: '2026-01-25', kind: 'work recorded' as const };
    await writeVerdicts(store, [verdictRow(lineId, { ...madeUpVerdict(0, 'a'), marks: [stale] })]);
    const daysAround = async () => {
      const [a] = (await readComparison(site, GONE_BY, '2026-02-10'))!.phases;
      return [a!.before.days, a!.after.days];
    };
    expect(await daysAround()).toEqual([40, 19]);
    // 1 January and nine days after it are cut off, and the day of the work is on neither side
    const { id } = await kept({ doneOn: '2026-01-10' });
    expect(await daysAround()).toEqual([30, 19]);
    await withdraw(id);
    expect(await daysAround()).toEqual([40, 19]);
  });
});
