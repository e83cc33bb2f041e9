import { beforeEach, describe, expect, it } from 'vitest';
import { REFUSAL_REASONS, type RefusalReason } from '../../src/contract/feed';
import { feedHealthSchema } from '../../src/contract/feed-health';
import {
  dropRefusalsBefore,
  readTerminalStates,
  type RefusedMessage,
  type TerminalStateRow,
  writeRefusals,
  writeTerminalStates,
} from '../../src/store/feed';
import { readFeedHealth, readKeptRefusals } from '../../src/store/feed-health';
import { refusalCount, refusedMessage, terminalState } from '../../src/store/schema/feed';
import { testStore } from '../database';
import { storedLine } from './made-up-rows';

const AT = new Date('2026-03-02T10:00:00.250Z');
const store = await testStore();
const line = await storedLine(store);
const terminalId = line.terminalIds.get('arden')!;
beforeEach(async () => {
  for (const table of [refusedMessage, refusalCount, terminalState]) await store.db.delete(table);
});

const message = (reason: RefusalReason, change: Partial<RefusedMessage> = {}): RefusedMessage => ({
  at: AT,
  topic: 'feed/arden-birk/arden/measurement',
  reason,
  detail: 'Unexpected token.',
  payload: Buffer.from('{'),
  ...change,
});
const write = (kept: RefusedMessage[], counts: Partial<Record<RefusalReason, number>>, lastAt = AT) =>
  writeRefusals(store.db, {
    kept,
    lastAt,
    counts: new Map(Object.entries(counts)) as Map<RefusalReason, number>,
  });
const counted = async () => (await readFeedHealth(store, AT.getTime())).refusals;

describe('refusals', () => {
  it('are counted on from what was counted before, by reason', async () => {
    const later = new Date(AT.getTime() + 60_000);
    await write([], { 'not JSON': 3, 'unknown line': 7 });
    await write([], { 'not JSON': 2 }, later);
    expect(await counted()).toEqual([
      { reason: 'unknown line', count: 7, lastAt: AT.toISOString() },
      { reason: 'not JSON', count: 5, lastAt: later.toISOString() },
    ]);
  });

  it('of every reason of the contract can be kept and counted', async () => {
    await write(
      REFUSAL_REASONS.map((reason) => message(reason)),
      Object.fromEntries(REFUSAL_REASONS.map((reason) => [reason, 1])),
    );
    expect(await counted()).toHaveLength(REFUSAL_REASONS.length);
    expect(await readKeptRefusals(store, { limit: 100 })).toHaveLength(REFUSAL_REASONS.length);
  });

  it('are kept with topic, reason, detail, payload and instant', async () => {
    await write([message('not JSON', { payload: Buffer.from('{"ä": ') })], {});
    expect(await readKeptRefusals(store, { limit: 1 })).toMatchObject([
      {
        at: AT.toISOString(),
        topic: 'feed/arden-birk/arden/measurement',
        reason: 'not JSON',
        detail: 'Unexpected token.',
        payload: '{"ä": ',
        cut: false,
      },
    ]);
  });

  it('are told to be cut where the payload fills what is kept of it, and bytes that are no text are shown as such', async () => {
    await write([message('over 8 KB', { payload: Buffer.alloc(2048, 0xff) })], {});
    const [kept] = await readKeptRefusals(store, { limit: 1 });
    expect(kept?.cut).toBe(true);
    expect(kept?.payload).toBe('\ufffd'.repeat(2048));
  });

  it('are read newest first, by reason, and page by page', async () => {
    await write(
      ['1', '2', '3', '4'].map((detail) => message(detail === '2' ? 'unknown line' : 'not JSON', { detail })),
      {},
    );
    const details = async (window: Partial<Parameters<typeof readKeptRefusals>[1]>) =>
      (await readKeptRefusals(store, { limit: 10, ...window })).map(({ detail }) => detail);
    expect(await details({})).toEqual(['4', '3', '2', '1']);
    expect(await details({ reason: 'not JSON', limit: 2 })).toEqual(['4', '3']);
    const [newest] = await readKeptRefusals(store, { limit: 1 });
    expect(await details({ before: newest!.id })).toEqual(['3', '2', '1']);
  });

  it('kept for long enough are dropped, and their count outlives them', async () => {
    await write([message('not JSON'), message('not JSON', { at: new Date(AT.getTime() + 1) })], {
      'not JSON': 2,
    });
    await dropRefusalsBefore(store, new Date(AT.getTime() + 1));
    expect(await readKeptRefusals(store, { limit: 10 })).toHaveLength(1);
    expect(await counted()).toMatchObject([{ count: 2 }]);
  });
});

describe('the state of a terminal', () => {
  const state: TerminalStateRow = {
    terminalId,
    presence: 'online',
    lastAt: AT,
    heardAt: new Date(AT.getTime() + 80),
    lastSeq: 2 ** 40,
    gapCount: 2,
    missedCount: 31,
  };

  it('comes back as it was written, and is replaced by the next', async () => {
    await writeTerminalStates(store.db, [state]);
    expect(await readTerminalStates(store, [terminalId])).toEqual([state]);
    const next = { ...state, presence: 'offline', lastSeq: 3, gapCount: 3 } as const;
    await writeTerminalStates(store.db, [next]);
    expect(await readTerminalStates(store, [terminalId])).toEqual([next]);
  });

  it('of a terminal never heard is unknown, which is not the same as offline', async () => {
    await writeTerminalStates(store.db, [state]);
    const health = await readFeedHealth(store, AT.getTime());
    expect(feedHealthSchema.parse(health)).toEqual(health);
    expect(health.terminals).toMatchObject([
      { terminal: 'arden', presence: 'online', lastSeq: 2 ** 40, gapCount: 2, missedCount: 31 },
      { terminal: 'birk', presence: null, lastAt: null, heardAt: null, gapCount: 0 },
    ]);
  });

  it('of none needs no statement', async () => {
    await writeTerminalStates(store.db, []);
    expect(await readTerminalStates(store, [])).toEqual([]);
  });
});
