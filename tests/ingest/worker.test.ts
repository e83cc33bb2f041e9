import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newSettingsVersionSchema } from '../../src/contract/register';
import { resultTopic } from '../../src/contract/result';
import { readTerminalStates } from '../../src/store/feed';
import { readFeedHealth, readKeptRefusals } from '../../src/store/feed-health';
import { unpackMeasurements } from '../../src/store/packing';
import type { RegisteredLine } from '../../src/store/register';
import { insertSettingsVersion } from '../../src/store/register-edit';
import { hasFlag } from '../../src/store/snapshot-flags';
import { readSnapshotsAt, type SnapshotRow } from '../../src/store/snapshots';
import { readWarningsOfLine } from '../../src/store/warnings';
import { testStore } from '../database';
import { settingsSent, terminalSent } from '../register/made-up-line';
import { snapshotRowOf, storedLine } from '../store/made-up-rows';
import { until } from '../until';
import { AT_MS, balanced, iso, measurement } from './made-up-feed';
import { runningWorker, type RunningWorker } from './running-worker';

const PERIOD_MS = 2_000;
const PATIENCE_MS = 8_000;
const store = await testStore();
let line: RegisteredLine;
let site: RunningWorker;
/** the instant that the next test may use: each takes instants of its own, in order */
let atMs = AT_MS;
const nextInstant = (): number => (site.clock.nowMs = atMs += PERIOD_MS);

beforeAll(async () => {
  line = await storedLine(store, {
    settings: [settingsSent({ validFrom: '2026-01-01T00:00:00.000Z' })],
  });
  site = await runningWorker(store);
  // retained, so that the worker hears it when it has subscribed, however long that takes
  await site.presence('arden-birk/arden', 'online');
  await until(
    async () => (await stateOf('arden'))?.presence === 'online',
    PATIENCE_MS,
    'a worker that listens',
  );
});
afterAll(() => site.close());

const rowAt = async (instantMs: number, { id } = line): Promise<SnapshotRow | undefined> =>
  (await readSnapshotsAt(store, [{ lineId: id, at: new Date(instantMs) }]))[0];
const storedRow = (instantMs: number, is: (row: SnapshotRow) => boolean = () => true) =>
  until(
    async () => {
      const row = await rowAt(instantMs);
      return row !== undefined && is(row) && row;
    },
    PATIENCE_MS,
    'a stored snapshot',
  );
const acknowledged = (count: number) =>
  until(
    () => site.acknowledgedCount() >= count,
    PATIENCE_MS,
    () => `${count} acknowledgements, but ${site.acknowledgedCount()}`,
  );
const stateOf = async (terminal: string) =>
  (await readTerminalStates(store, [line.terminalIds.get(terminal)!]))[0];
/** Until the worker has had a terminal's measurement of an instant in its hands. */
const heard = (terminal: string, instantMs: number) =>
  until(
    async () => (await stateOf(terminal))?.lastAt?.getTime() === instantMs,
    PATIENCE_MS,
    `${terminal} at its newest instant`,
  );
const at = (instantMs: number, change = {}) => measurement({ at: iso(instantMs), ...change });

describe('what terminals publish', () => {
  it('is stored once, with the exact figures, and published retained', async () => {
    const instant = nextInstant();
    await site.publish('arden-birk/arden', at(instant, { seq: 41, current: balanced(1000, 0) }));
    await site.publish('arden-birk/birk', at(instant, { seq: 17, current: balanced(900, 180) }));
    const row = await storedRow(instant);
    expect(row.differentialAAmps).toBeCloseTo(100, 9);
    expect(row.restraintBAmps).toBeCloseTo(950, 9);
    expect(row.thresholdCAmps).toBeCloseTo(285, 9);
    expect(row.utilisationA).toBeCloseTo(100 / 285, 9);
    expect(row).toMatchObject({ flags: 0, settingRecordId: line.settings[0]!.id });
    expect(unpackMeasurements(row.phasors, row.at).map(({ measurement: { seq } }) => seq)).toEqual([41, 17]);

    await until(() => site.result('arden-birk')?.at === iso(instant), PATIENCE_MS, 'a result');
    const late = await site.webClient();
    const retained = new Promise<string>((resolve) => {
      late.on('message', (_topic, payload, { retain }) => retain && resolve(payload.toString()));
    });
    await late.subscribeAsync(resultTopic('arden-birk'), { qos: 0 });
    expect(JSON.parse(await retained)).toMatchObject({
      line: 'arden-birk',
      at: iso(instant),
      condition: 'settled',
      reason: null,
      phases: {
        a: {
          differentialAmps: row.differentialAAmps,
          restraintAmps: row.restraintAAmps,
          thresholdAmps: row.thresholdAAmps,
          utilisation: row.utilisationA,
        },
      },
      throughAmps: row.throughAmps,
      throughRatio: expect.closeTo(0.95, 9) as number,
    });
    await late.endAsync(true);
  });

  it('is acknowledged when its transaction has committed, and not before', async () => {
    const instant = nextInstant();
    const before = site.acknowledgedCount();
    const committed = site.worker().committedCount();
    const blocker = await store.pool.getConnection();
    try {
      await blocker.beginTransaction();
      // a row of the same key that is not committed yet: whoever writes there has to wait
      await blocker.query('INSERT INTO snapshot (line_id, at, flags, phasors) VALUES (?, ?, 0, ?)', [
        line.id,
        new Date(instant),
        snapshotRowOf(line, instant, null).phasors,
      ]);
      await site.balance(instant, 9);
      await until(isWriting, PATIENCE_MS, 'a worker that waits for the row');
      expect(site.acknowledgedCount()).toBe(before);
      expect(site.worker().committedCount()).toBe(committed);
    } finally {
      await blocker.rollback();
      blocker.release();
    }
    await acknowledged(before + 2);
    expect((await rowAt(instant))?.differentialAAmps).toBeCloseTo(9, 9);
  });

  it('twice changes nothing: the first word stands, and every copy is acknowledged', async () => {
    const instant = nextInstant();
    const before = site.acknowledgedCount();
    const first = {
      arden: at(instant, { seq: 50 }),
      birk: at(instant, { seq: 50, current: balanced(392, 180) }),
    };
    await site.publish('arden-birk/arden', first.arden);
    await site.publish('arden-birk/arden', at(instant, { seq: 50, current: balanced(999, 0) }));
    await site.publish('arden-birk/birk', first.birk);
    await acknowledged(before + 3);
    const row = await storedRow(instant);
    expect(row.differentialAAmps).toBeCloseTo(8, 9);
    await site.publish('arden-birk/birk', at(instant, { seq: 50, current: balanced(100, 180) }));
    await site.publish('arden-birk/arden', first.arden);
    await acknowledged(before + 5);
    expect(await rowAt(instant)).toEqual(row);
  });

  it('completes its snapshot also when it comes late, and corrects the figures', async () => {
    const instant = nextInstant();
    await site.publish('arden-birk/arden', at(instant));
    await heard('arden', instant);
    site.clock.nowMs += PERIOD_MS;
    const incomplete = await storedRow(instant, ({ flags }) => hasFlag(flags, 'incomplete'));
    expect(incomplete).toMatchObject({ differentialAAmps: null, throughAmps: null });
    await site.publish('arden-birk/birk', at(instant, { current: balanced(392, 180) }));
    const complete = await storedRow(instant, ({ flags }) => !hasFlag(flags, 'incomplete'));
    expect(complete.differentialAAmps).toBeCloseTo(8, 9);
  });
});

describe('what is refused', () => {
  it('is counted and kept with its payload cut at 2 KB, and stops nothing behind it', async () => {
    const instant = nextInstant();
    const before = site.acknowledgedCount();
    await site.publish('arden-birk/arden', 'no JSON at all');
    await site.publish('arden-birk/arden', JSON.stringify({ ...at(instant), pad: 'x'.repeat(9_000) }));
    await site.publish('arden-birk/arden', at(instant, { current: balanced(-1, 0) }));
    await site.publish('corl-dorn/corl', at(instant));
    await site.publish('arden-birk/arden', at(instant + 6_000));
    await site.publish('arden-birk/arden', Buffer.alloc(3_000, 0xff));
    await site.balance(instant, 9);
    await storedRow(instant);
    await acknowledged(before + 8);
    const { refusals } = await readFeedHealth(store, instant);
    expect(Object.fromEntries(refusals.map(({ reason, count }) => [reason, count]))).toEqual({
      'not JSON': 2,
      'over 8 KB': 1,
      'negative magnitude': 1,
      'unknown line': 1,
      'instant ahead of time': 1,
    });
    const kept = await readKeptRefusals(store, { limit: 10 });
    expect(kept).toHaveLength(6);
    expect(kept.find(({ reason }) => reason === 'over 8 KB')).toMatchObject({
      topic: 'feed/arden-birk/arden/measurement',
      at: iso(instant),
      cut: true,
      payload: JSON.stringify({ ...at(instant), pad: 'x'.repeat(9_000) }).slice(0, 2048),
    });
  });
});

describe('a terminal’s state', () => {
  it('follows its presence', async () => {
    for (const presence of ['online', 'offline', 'online'] as const) {
      await site.presence('arden-birk/birk', presence);
      await until(async () => (await stateOf('birk'))?.presence === presence, PATIENCE_MS, presence);
    }
  });

  it('tells the newest instant, when it was heard, and the gaps in its count', async () => {
    const gapsBefore = (await stateOf('arden'))!;
    const instant = nextInstant();
    await site.publish('arden-birk/arden', at(instant, { seq: 10_000 }));
    await site.publish('arden-birk/arden', at(nextInstant(), { seq: 10_006 }));
    const state = await until(
      async () => {
        const now = await stateOf('arden');
        return now?.lastSeq === 10_006 && now;
      },
      PATIENCE_MS,
      'the newest count',
    );
    expect(state).toMatchObject({
      lastAt: new Date(instant + PERIOD_MS),
      heardAt: new Date(instant + PERIOD_MS),
      gapCount: gapsBefore.gapCount + 2,
    });
    expect(state.missedCount).toBeGreaterThanOrEqual(gapsBefore.missedCount + 5);
  });
});

describe('a change of the register', () => {
  it('is taken up without a restart: a new line is heard, and stored', async () => {
    const added = await storedLine(store, {
      key: 'corl-dorn',
      terminals: [terminalSent('corl'), terminalSent('dorn')],
      settings: [settingsSent({ validFrom: '2026-01-01T00:00:00.000Z' })],
    });
    await until(
      async () => {
        const instant = nextInstant();
        await site.publish('corl-dorn/corl', at(instant));
        await site.publish('corl-dorn/dorn', at(instant, { current: balanced(390, 180) }));
        return await until(async () => rowAt(instant, added), 300).catch(() => undefined);
      },
      PATIENCE_MS,
      'a snapshot of the new line',
    );
    await until(
      () => site.result('corl-dorn')?.throughAmps ?? undefined,
      PATIENCE_MS,
      'a result of the new line',
    );
    expect(site.result('corl-dorn')?.phases.a.differentialAmps).toBeCloseTo(10, 9);
  });

  it('is taken up as a new version of the settings, which judges from its instant on', async () => {
    const before = nextInstant();
    await site.balance(before, 9);
    await storedRow(before);
    const characteristic = { ...(settingsSent().characteristic as object), pickupAmps: 90 };
    await insertSettingsVersion(
      store,
      {
        key: 'arden-birk',
        version: newSettingsVersionSchema.parse(
          settingsSent({ validFrom: iso(before + PERIOD_MS), characteristic, note: 'Lowered.' }),
        ),
      },
      { by: { id: 'p1', name: 'Mira Holt' }, nowMs: before },
    );
    const judged = await until(
      async () => {
        const instant = nextInstant();
        await site.balance(instant, 9);
        const row = await storedRow(instant);
        return row.thresholdAAmps === 90 && row;
      },
      PATIENCE_MS,
      'a snapshot judged by the new settings',
    );
    expect(judged.settingRecordId).not.toBe(line.settings[0]!.id);
    expect((await rowAt(before))?.thresholdAAmps).toBe(120);
  });
});

describe('a worker that was away', () => {
  it('stores what was published meanwhile, and completes what its last run had stored in part', async () => {
    const partial = nextInstant();
    await site.publish('arden-birk/arden', at(partial));
    await heard('arden', partial);
    site.clock.nowMs += PERIOD_MS;
    await storedRow(partial, ({ flags }) => hasFlag(flags, 'incomplete'));
    await site.stopWorker();
    await site.publish('arden-birk/birk', at(partial, { current: balanced(392, 180) }));
    const meanwhile = [nextInstant(), nextInstant(), nextInstant()];
    for (const instant of meanwhile) await site.balance(instant, 9);
    await site.startWorker();
    for (const instant of meanwhile) expect((await storedRow(instant)).differentialAAmps).toBeCloseTo(9, 9);
    // the new run waits for the other terminal as for any, and then looks into the store
    atMs = site.clock.nowMs += PERIOD_MS;
    const completed = await storedRow(partial, ({ flags }) => !hasFlag(flags, 'incomplete'));
    expect(completed.differentialAAmps).toBeCloseTo(8, 9);
  });
});

describe('a warning', () => {
  const newest = async () => (await readWarningsOfLine(store, line.id, 1))[0];
  const turned = (kind: string, is: 'standing' | 'returned') =>
    until(
      async () => {
        const found = await newest();
        return found?.kind === kind && (found.returnedAt === null) === (is === 'standing') && found;
      },
      PATIENCE_MS,
      `${kind} ${is}`,
    );
  /** The next instant, stored before the clock moves on. */
  const balanceStored = async (differentialAmps: number): Promise<void> => {
    const committed = site.worker().committedCount();
    await site.balance(nextInstant(), differentialAmps);
    await until(() => site.worker().committedCount() > committed, PATIENCE_MS, 'a commit');
  };
  /** A minute and two seconds at a differential current. */
  const minuteAt = async (differentialAmps: number): Promise<number> => {
    const first = atMs + PERIOD_MS;
    for (let period = 0; period <= 31; period += 1) await balanceStored(differentialAmps);
    return first;
  };

  it('opens in the database and in the result when its mark has been passed for a minute, and returns', async () => {
    // 72 A of a pickup of 90 A
    const first = await minuteAt(72);
    const opened = await turned('near', 'standing');
    expect(opened).toMatchObject({
      line: 'arden-birk',
      state: 'unacknowledged',
      openedAt: iso(first + 60_000),
      cause: { basis: 'utilisation', phase: 'a', limit: 0.7 },
    });
    await until(() => site.result('arden-birk')?.condition === 'near', PATIENCE_MS, 'a result that is near');
    const calm = await minuteAt(9);
    expect((await turned('near', 'returned')).returnedAt).toBe(iso(calm + 60_000));
    await until(() => site.result('arden-birk')?.condition === 'settled', PATIENCE_MS, 'a settled result');
  });

  it('says that a line is blind when nothing comes, and returns when it is seen again', async () => {
    site.clock.nowMs += 15_000;
    atMs = site.clock.nowMs;
    expect(await turned('blind', 'standing')).toMatchObject({
      cause: { basis: 'terminal silent', terminals: ['arden', 'birk'] },
    });
    await until(() => site.result('arden-birk')?.condition === 'blind', PATIENCE_MS, 'a blind result');
    for (let period = 0; period < 4; period += 1) await balanceStored(9);
    await turned('blind', 'returned');
    await until(() => site.result('arden-birk')?.condition === 'settled', PATIENCE_MS, 'a settled result');
  });
});

/** Whether the worker's write is under way, which it stays for as long as another holds the row. */
async function isWriting(): Promise<boolean> {
  const [rows] = (await store.db.execute(
    sql`select id from information_schema.processlist
        where db = database() and command = 'Query' and info like 'INSERT INTO snapshot (%'`,
  )) as unknown as [unknown[]];
  return rows.length > 0;
}
