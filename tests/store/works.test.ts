import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { newWorkSchema, type NewWork } from '../../src/contract/works';
import { endFollowUp, insertFollowUp, readFollowUp } from '../../src/store/follow-ups';
import { auditEntry } from '../../src/store/schema/people';
import { followUp, recordedWork } from '../../src/store/schema/standing';
import { insertWork, readWorks, readWorksOfLine, withdrawWork } from '../../src/store/works';
import { testStore } from '../database';
import { madeUpLineOf, storedFleet } from './made-up-fleet';

const store = await testStore();
let ids: Map<string, number>;
beforeAll(async () => {
  ids = await storedFleet(store, 2);
});
beforeEach(async () => {
  await store.db.delete(recordedWork);
  await store.db.delete(followUp);
  await store.db.delete(auditEntry);
});

const [LINE, OTHER] = [madeUpLineOf(0), madeUpLineOf(1)];
const keeping = { by: { id: 'p1', name: 'Mira Holt' }, nowMs: Date.parse('2026-03-02T08:00:00Z') };
const work = { terminal: 'arden', doneOn: '2026-03-01', what: 'Transformer exchanged.' };
const record = async (change: Partial<NewWork> = {}) => {
  const recorded = await insertWork(
    store,
    { ...newWorkSchema.parse({ line: LINE.key, ...work }), ...change },
    keeping,
  );
  if (!recorded.ok) throw new Error(recorded.problem);
  return recorded.work;
};
const open = async (line = LINE.key) =>
  (await insertFollowUp(
    store,
    { line, phase: 'b', cause: 'ratio mismatch', due: null, note: 'Check.' },
    keeping,
  ))!;
const trail = async () => (await store.db.select().from(auditEntry)).map(({ action }) => action);

describe('the works of a line', () => {
  it('are read for its history oldest first, those of a day in their order, withdrawn ones left out', async () => {
    await record({ doneOn: '2026-01-10', what: 'first' });
    await record({ doneOn: '2026-02-10', what: 'second' });
    await record({ doneOn: '2026-02-10', what: 'third, of the same day' });
    const { id } = await record({ doneOn: '2026-01-20', what: 'in error' });
    await record({ line: OTHER.key, terminal: null, what: 'elsewhere' });
    await withdrawWork(store, id, keeping);
    const read = await readWorksOfLine(store, ids.get(LINE.key)!);
    expect(read.map(({ what }) => what)).toEqual(['first', 'second', 'third, of the same day']);
    expect(await readWorksOfLine(store, 4711)).toEqual([]);
  });
});

describe('work for a follow-up of another line', () => {
  it('is refused, and nothing is written', async () => {
    const foreign = await open(OTHER.key);
    await expect(record({ followUp: foreign.id })).rejects.toThrow(
      `The line ${LINE.key} has no follow-up with the number ${foreign.id}.`,
    );
    expect(await readWorks(store)).toEqual([]);
    expect(await trail()).toEqual(['follow-up opened']);
  });
});

describe('a follow-up that ends with work', () => {
  it('stays open when the database cannot keep its work: both are one transaction', async () => {
    const { id } = await open();
    const tooLong = { ...work, what: 'x'.repeat(501) };
    await expect(endFollowUp(store, id, { work: tooLong, ...keeping })).rejects.toThrow();
    expect(await readFollowUp(store, id)).toMatchObject({ state: 'open', doneAt: null, works: [] });
    expect(await trail()).toEqual(['follow-up opened']);
  });

  it('of two that end it at the same time one does, and one work is kept', async () => {
    const { id } = await open();
    const outcomes = await Promise.all([
      endFollowUp(store, id, { work, ...keeping }),
      endFollowUp(store, id, { work, ...keeping }),
    ]);
    expect(outcomes.sort()).toEqual(['already done', 'done']);
    expect(await readWorks(store)).toHaveLength(1);
  });

  it('keeps its work in its list when that is withdrawn, marked, and stays done', async () => {
    const { id } = await open();
    await endFollowUp(store, id, { work, ...keeping });
    const [recorded] = await readWorks(store);
    await withdrawWork(store, recorded!.id, keeping);
    expect(await readFollowUp(store, id)).toMatchObject({
      state: 'done',
      works: [{ what: work.what, withdrawn: { by: 'Mira Holt' } }],
    });
  });
});
