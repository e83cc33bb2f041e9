import { beforeEach, describe, expect, it } from 'vitest';
import { warningSchema, type WarningCause, type WarningKind } from '../../src/contract/warning';
import { commitBatch, type LineChange } from '../../src/ingest/commit';
import type { RegisteredLine } from '../../src/store/register';
import { line as lineTable } from '../../src/store/schema/register';
import { warning } from '../../src/store/schema/warnings';
import {
  acknowledgeWarning,
  openWarning,
  readOpenWarnings,
  readStandingWarnings,
  readWarning,
  readWarningsChangedSince,
  readWarningsInState,
  readWarningsOfLine,
  returnWarning,
} from '../../src/store/warnings';
import { testStore } from '../database';
import { storedLine } from './made-up-rows';

const AT_MS = Date.parse('2026-03-02T10:00:00.500Z');
const at = (offsetMs: number): Date => new Date(AT_MS + offsetMs);
const CAUSE: WarningCause = {
  basis: 'utilisation',
  phase: 'b',
  utilisation: 0.731,
  limit: 0.7,
  differentialAmps: 87.72,
  thresholdAmps: 120,
};

const store = await testStore();
let line: RegisteredLine;
beforeEach(async () => {
  await store.db.delete(warning);
  await store.db.delete(lineTable);
  line = await storedLine(store);
});

const opened = (kind: WarningKind = 'near', offsetMs = 0): Promise<number> =>
  openWarning(store.db, { lineId: line.id, kind, cause: CAUSE, openedAt: at(offsetMs) }, at(offsetMs + 40));
const returned = (id: number, offsetMs: number) =>
  returnWarning(store.db, id, { returnedAt: at(offsetMs), changedAt: at(offsetMs + 40) });
const acknowledged = (id: number, offsetMs: number, note = 'Seen; the line crew is told.') =>
  acknowledgeWarning(store, id, { by: 'Mira Holt', note, at: at(offsetMs) });
const idsOf = (warnings: readonly { id: number }[]) => warnings.map(({ id }) => id);

describe('a warning’s life', () => {
  it('begins unacknowledged, with the figures that raised it', async () => {
    const id = await opened();
    const read = await readWarning(store, id);
    expect(read).toEqual({
      id,
      line: 'arden-birk',
      lineName: 'Arden – Birk',
      kind: 'near',
      state: 'unacknowledged',
      cause: CAUSE,
      openedAt: '2026-03-02T10:00:00.500Z',
      returnedAt: null,
      acknowledgedAt: null,
      acknowledgedBy: null,
      note: null,
      changedAt: '2026-03-02T10:00:00.540Z',
    });
    expect(warningSchema.parse(read)).toEqual(read);
  });

  it('goes by acknowledgement and return to normal', async () => {
    const id = await opened();
    await acknowledged(id, 60_000);
    expect(await readWarning(store, id)).toMatchObject({
      state: 'acknowledged',
      acknowledgedBy: 'Mira Holt',
      acknowledgedAt: at(60_000).toISOString(),
      note: 'Seen; the line crew is told.',
      changedAt: at(60_000).toISOString(),
    });
    await returned(id, 120_000);
    expect(await readWarning(store, id)).toMatchObject({
      state: 'normal',
      returnedAt: at(120_000).toISOString(),
      changedAt: at(120_040).toISOString(),
    });
  });

  it('goes by return and a later acknowledgement to the same end', async () => {
    const id = await opened();
    await returned(id, 60_000);
    expect(await readWarning(store, id)).toMatchObject({ state: 'returned to normal, unacknowledged' });
    await acknowledged(id, 120_000);
    expect(await readWarning(store, id)).toMatchObject({ state: 'normal' });
  });

  it('never returns before it opened, whatever clocks say', async () => {
    const id = await opened();
    await returned(id, -5_000);
    expect((await readWarning(store, id))?.returnedAt).toBe('2026-03-02T10:00:00.500Z');
  });

  it('returns once: the first instant stands', async () => {
    const id = await opened();
    await returned(id, 60_000);
    await returned(id, 90_000);
    expect((await readWarning(store, id))?.returnedAt).toBe(at(60_000).toISOString());
  });
});

describe('an acknowledgement', () => {
  it('is given once: the first note stands, and the second caller is told', async () => {
    const id = await opened();
    expect(await acknowledged(id, 1_000, 'First.')).toBe('acknowledged');
    expect(await acknowledged(id, 2_000, 'Second.')).toBe('already acknowledged');
    expect(await readWarning(store, id)).toMatchObject({
      note: 'First.',
      acknowledgedAt: at(1_000).toISOString(),
    });
  });

  it('is given once also when two come at the same moment', async () => {
    const id = await opened();
    const outcomes = await Promise.all([1, 2, 3, 4].map((caller) => acknowledged(id, caller)));
    expect(outcomes.filter((outcome) => outcome === 'acknowledged')).toHaveLength(1);
  });

  it('of a warning that is not there says so', async () => {
    expect(await acknowledged(987_654, 0)).toBe('unknown');
  });
});

describe('lists of warnings', () => {
  it('by state hold those in that state, newest first', async () => {
    const normal = await opened('near', 0);
    const gone = await opened('over', 1_000);
    const seen = await opened('rising', 2_000);
    const fresh = await opened('blind', 3_000);
    const fresher = await opened('near', 4_000);
    await acknowledged(normal, 5_000);
    await returned(normal, 5_000);
    await returned(gone, 5_000);
    await acknowledged(seen, 5_000);
    const inState = async (state: Parameters<typeof readWarningsInState>[1]) =>
      idsOf(await readWarningsInState(store, state));
    expect(await inState('unacknowledged')).toEqual([fresher, fresh]);
    expect(await inState('acknowledged')).toEqual([seen]);
    expect(await inState('returned to normal, unacknowledged')).toEqual([gone]);
    expect(await inState('normal')).toEqual([normal]);
    expect(idsOf(await readOpenWarnings(store))).toEqual([fresher, fresh, seen, gone]);
    expect(idsOf(await readWarningsOfLine(store, line.id, 3))).toEqual([fresher, fresh, seen]);
    expect((await readStandingWarnings(store, [line.id])).map(({ kind }) => kind).sort()).toEqual([
      'blind',
      'near',
      'rising',
    ]);
  });

  it('of what has changed hold what was changed at that instant or later', async () => {
    const id = await opened();
    expect(idsOf(await readWarningsChangedSince(store, at(40)))).toEqual([id]);
    expect(await readWarningsChangedSince(store, at(41))).toEqual([]);
    await acknowledged(id, 60_000);
    expect(idsOf(await readWarningsChangedSince(store, at(50_000)))).toEqual([id]);
  });

  it('of no line, or of another, are empty', async () => {
    await opened();
    expect(await readStandingWarnings(store, [])).toEqual([]);
    expect(await readWarningsOfLine(store, line.id + 1, 10)).toEqual([]);
  });

  it('lose what belongs to a line that is deleted', async () => {
    await opened();
    await store.db.delete(lineTable);
    expect(await readOpenWarnings(store)).toEqual([]);
  });
});

describe('warnings written with a batch', () => {
  const committed = (...changes: LineChange['change'][]) =>
    commitBatch(
      store,
      {
        rows: [],
        refusals: { kept: [], counts: new Map() },
        terminals: [],
        staleHours: [],
        warnings: changes.map((change) => ({ lineId: line.id, change })),
      },
      at(100),
    );
  const opens = { turn: 'opens', kind: 'near', cause: CAUSE, atMs: AT_MS } as const;
  const returns = { turn: 'returns', kind: 'near', atMs: AT_MS + 60_000 } as const;

  it('open nothing twice when the batch is written again after a doubtful commit', async () => {
    await committed(opens);
    await committed(opens);
    expect(await readOpenWarnings(store)).toHaveLength(1);
  });

  it('open, return and open again within one batch', async () => {
    await committed(opens, returns, { ...opens, atMs: AT_MS + 120_000 });
    const warnings = await readWarningsOfLine(store, line.id, 10);
    expect(warnings.map(({ openedAt, returnedAt }) => [openedAt, returnedAt])).toEqual([
      [at(120_000).toISOString(), null],
      [at(0).toISOString(), at(60_000).toISOString()],
    ]);
  });

  it('return nothing that does not stand', async () => {
    await committed(returns);
    expect(await readWarningsOfLine(store, line.id, 10)).toEqual([]);
  });
});
