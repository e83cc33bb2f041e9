import { beforeAll, describe, expect, it } from 'vitest';
import { feedHealthSchema, refusalListSchema } from '../../src/contract/feed-health';
import { GET as getFeed } from '../../src/pages/api/feed';
import { GET as getRefusals } from '../../src/pages/api/feed/refusals';
import { insertLine } from '../../src/store/register-edit';
import { refusalCount, refusedMessage, terminalState } from '../../src/store/schema/feed';
import { testStore } from '../database';
import { answerOf, NOW_MS, type Sent } from './endpoint-call';
import { newLine } from './made-up-line';

const heardAt = new Date(NOW_MS - 1_500);
const message = (reason: 'not JSON' | 'over 8 KB', payload: Buffer) => ({
  at: heardAt,
  topic: 'feed/arden-birk/arden/measurement',
  reason,
  detail: 'Said why.',
  payload,
});

const store = await testStore();
beforeAll(async () => {
  const added = await insertLine(store, newLine(), { by: { id: 'p1', name: 'Mira Holt' }, nowMs: NOW_MS });
  const terminalId = added.ok ? added.line.terminalIds.get('arden')! : 0;
  await store.db.insert(terminalState).values({
    terminalId,
    presence: 'online',
    lastAt: heardAt,
    heardAt,
    lastSeq: 42,
    gapCount: 1,
    missedCount: 7,
  });
  await store.db.insert(refusalCount).values([
    { reason: 'not JSON', count: 3, lastAt: heardAt },
    { reason: 'over 8 KB', count: 9, lastAt: heardAt },
  ]);
  await store.db
    .insert(refusedMessage)
    .values([
      message('not JSON', Buffer.from('{"at": ')),
      message('over 8 KB', Buffer.alloc(2048, 'x')),
      message('not JSON', Buffer.from('<b>bold</b>')),
    ]);
});

const asAdmin = (sent: Sent = {}): Sent => ({ role: 'admin', ...sent });

describe('the health of the feed', () => {
  it('tells of every terminal of the register, heard or not', async () => {
    const { status, body } = await answerOf(store, getFeed, asAdmin());
    expect(status).toBe(200);
    expect(feedHealthSchema.parse(body)).toEqual({
      at: '2026-03-02T08:00:00.000Z',
      terminals: [
        expect.objectContaining({
          terminal: 'arden',
          substationName: 'Arden',
          expected: true,
          presence: 'online',
          heardAt: '2026-03-02T07:59:58.500Z',
          lastSeq: 42,
          gapCount: 1,
          missedCount: 7,
        }),
        expect.objectContaining({
          terminal: 'birk',
          presence: null,
          heardAt: null,
          lastSeq: null,
          missedCount: 0,
        }),
      ],
      refusals: [
        { reason: 'over 8 KB', count: 9, lastAt: '2026-03-02T07:59:58.500Z' },
        { reason: 'not JSON', count: 3, lastAt: '2026-03-02T07:59:58.500Z' },
      ],
    });
  });

  it('is for the admin alone', async () => {
    expect(await answerOf(store, getFeed, {})).toMatchObject({ status: 401 });
    expect(await answerOf(store, getFeed, { role: 'engineer' })).toMatchObject({ status: 403 });
    expect(await answerOf(store, getRefusals, { role: 'operator' })).toMatchObject({ status: 403 });
  });
});

describe('kept messages', () => {
  const list = async (query: string) =>
    refusalListSchema.parse((await answerOf(store, getRefusals, asAdmin({ query }))).body).refusals;

  it('come newest first, payload as it was, and say when it was cut', async () => {
    const kept = await list('');
    expect(kept.map(({ payload, cut }) => [payload.slice(0, 11), cut])).toEqual([
      ['<b>bold</b>', false],
      ['xxxxxxxxxxx', true],
      ['{"at": ', false],
    ]);
  });

  it('can be asked for by reason and page by page', async () => {
    const notJson = await list('?reason=not+JSON');
    expect(notJson.map(({ payload }) => payload)).toEqual(['<b>bold</b>', '{"at": ']);
    const next = await list(`?limit=1&before=${notJson[0]!.id}`);
    expect(next.map(({ reason }) => reason)).toEqual(['over 8 KB']);
  });

  it('are refused with the field named when the question is wrong', async () => {
    const { status, body } = await answerOf(
      store,
      getRefusals,
      asAdmin({ query: '?reason=boredom&before=x&limit=1000' }),
    );
    expect(status).toBe(400);
    expect((body as { fields: { field: string }[] }).fields.map(({ field }) => field)).toEqual([
      'reason',
      'before',
      'limit',
    ]);
  });
});
