import type { APIContext, APIRoute } from 'astro';
import { beforeAll, describe, expect, it } from 'vitest';
import { problemSchema } from '../../../src/contract/problem';
import {
  proposalListSchema,
  proposalSchema,
  replayStartedSchema,
  replayStateSchema,
  type ReplayRequest,
  type ReplayResult,
  type ReplayState,
} from '../../../src/contract/replay';
import type { Role } from '../../../src/contract/role';
import { GET as getProposal } from '../../../src/pages/api/proposals/[id]';
import { GET as getProposals } from '../../../src/pages/api/proposals';
import { POST as keepProposal } from '../../../src/pages/api/lines/[key]/proposals';
import { POST as startReplay } from '../../../src/pages/api/lines/[key]/replay';
import { DELETE as cancelReplay, GET as getReplay } from '../../../src/pages/api/replays/[id]';
import { replayJobsOf } from '../../../src/server/replay/jobs-of';
import { runReplay } from '../../../src/server/replay/run';
import type { Site } from '../../../src/server/site';
import { readRegisterLine } from '../../../src/store/register';
import { settingProposal } from '../../../src/store/schema/proposals';
import { testStore } from '../../database';
import { AT_MS, iso, measurement } from '../../ingest/made-up-feed';
import { settingsSent } from '../../register/made-up-line';
import { storedLine } from '../../store/made-up-rows';
import { until } from '../../until';
import { feedRow, storeFeed, through } from './stored-feed';

const store = await testStore();
const params = { key: 'arden-birk' };
const recordedFrom = AT_MS + 4_000;
const site = {
  store,
  settings: { NEAR_RATIO: 0.7, PERIOD_MS: 2_000, NOMINAL_FREQUENCY_HZ: 50 },
  now: () => Date.now(),
} as unknown as Site;

/*
 * Half-sum restraint. Recorded, from the third snapshot on: pickup 120 A, 30 % from zero to a knee at 1500 A.
 * Tried: the same with 20 %.
 *   at   through          D     R      recorded T   u       tried T   u
 *   0 s  1000 A in, 950   50    975    none in force        195       0.2564
 *   2 s  Birk silent      -
 *   4 s  1000 A in, 850   150   925    277.5        0.5405  185       0.8108
 *   6 s  1200 A in, 900   300   1050   315          0.9524  210       1.4286
 *   8 s  under test
 *   10 s 400 A in, 392    8     396    120          0.0667  120       0.0667
 */
beforeAll(async () => {
  const line = await storedLine(store, { settings: [settingsSent({ validFrom: iso(recordedFrom) })] });
  const { arden } = through(400, 8);
  await storeFeed(store, [
    feedRow(line, AT_MS, through(1000, 50)),
    feedRow(line, AT_MS + 2_000, { arden: arden! }),
    feedRow(line, AT_MS + 4_000, through(1000, 150)),
    feedRow(line, AT_MS + 6_000, through(1200, 300)),
    feedRow(line, AT_MS + 8_000, { arden: measurement({ test: true }), birk: measurement() }),
    feedRow(line, AT_MS + 10_000, through(400, 8)),
  ]);
});

interface Asked {
  readonly role?: Role;
  readonly person?: string;
  readonly params?: Record<string, string>;
  readonly body?: unknown;
  readonly query?: string;
}

async function answered(endpoint: APIRoute, asked: Asked): Promise<{ status: number; body: unknown }> {
  const url = new URL(`https://tareline.example/api${asked.query ?? ''}`);
  const request = new Request(url, {
    method: asked.body === undefined ? 'GET' : 'POST',
    headers: { 'content-type': 'application/json' },
    body: asked.body === undefined ? null : JSON.stringify(asked.body),
  });
  const name = asked.person ?? 'Mira Holt';
  const person = { id: name, email: 'mira@tareline.example', name, role: asked.role ?? 'engineer' };
  const context = { request, url, params: asked.params ?? params, locals: { site, person } };
  const answer = (await endpoint(context as unknown as APIContext)) as Response;
  return { status: answer.status, body: await answer.json() };
}

const slope20 = {
  kind: 'two-slope',
  pickupAmps: 120,
  slope1: 0.2,
  kneeAmps: 1500,
  slope2: 0.6,
  slopeStart: 'from-zero',
};
const asked = (change: Record<string, unknown> = {}) => ({
  settings: { characteristic: slope20, restraint: { kind: 'scaled-sum', factor: 0.5 }, ...change },
  from: iso(AT_MS - 60_000),
  to: iso(AT_MS + 60_000),
});
const fieldsOf = (body: unknown) => problemSchema.parse(body).fields.map(({ field }) => field);

async function stateOf(id: string): Promise<ReplayState> {
  return replayStateSchema.parse((await answered(getReplay, { params: { id } })).body);
}

async function replayed(body: unknown, person = 'Mira Holt'): Promise<{ id: string; state: ReplayState }> {
  const started = await answered(startReplay, { body, person });
  expect(started.status).toBe(202);
  const { id } = replayStartedSchema.parse(started.body);
  await until(async () => (await stateOf(id)).state !== 'running', 10_000);
  return { id, state: await stateOf(id) };
}

async function resultOf(body: unknown): Promise<ReplayResult> {
  const { state } = await replayed(body);
  expect(state).toMatchObject({ state: 'done', progress: 1, problem: null });
  return state.result!;
}

describe('a replay', () => {
  it('gives the figures worked by hand for both sides', async () => {
    const result = await resultOf(asked());
    expect(result).toMatchObject({ snapshots: 6, underTest: 1, firstAt: iso(AT_MS), nearRatio: 0.7 });
    const { recorded, replayed: tried } = result;
    expect(recorded.evaluated).toBe(3);
    expect(tried.evaluated).toBe(4);
    expect(recorded.phases.b).toMatchObject({
      near: { snapshots: 1, durationMs: 2_000 },
      over: { snapshots: 0, durationMs: 0 },
      greatest: { at: iso(AT_MS + 6_000), settingsVersion: expect.any(Number) as number },
    });
    expect(recorded.phases.b.greatest!.utilisation).toBeCloseTo(300 / 315, 9);
    expect(tried.phases.b).toMatchObject({
      near: { snapshots: 2, durationMs: 4_000 },
      over: { snapshots: 1, durationMs: 2_000 },
      greatest: { at: iso(AT_MS + 6_000), settingsVersion: null },
    });
    const greatest = tried.phases.b.greatest!;
    expect(greatest.differentialAmps).toBeCloseTo(300, 6);
    expect(greatest.restraintAmps).toBeCloseTo(1050, 6);
    expect(greatest.thresholdAmps).toBeCloseTo(210, 6);
  });

  it('says of each side what could not be computed and why', async () => {
    const { recorded, replayed: tried } = await resultOf(asked());
    const silent = { reason: 'Nothing was heard of Birk.', snapshots: 1 };
    expect(recorded.notComputable).toEqual(
      expect.arrayContaining([
        silent,
        { reason: 'No settings were in force at this instant.', snapshots: 1 },
      ]),
    );
    expect(tried.notComputable).toEqual([silent]);
  });

  it('takes rows from the first instant on and leaves the last one out', async () => {
    const body = { ...asked(), from: iso(AT_MS + 4_000), to: iso(AT_MS + 6_000) };
    expect(await resultOf(body)).toMatchObject({
      snapshots: 1,
      firstAt: iso(AT_MS + 4_000),
      lastAt: iso(AT_MS + 4_000),
    });
  });

  it('of a period without rows says so and has no greatest', async () => {
    const result = await resultOf({ ...asked(), from: iso(AT_MS - 9_000), to: iso(AT_MS - 1_000) });
    expect(result).toMatchObject({ snapshots: 0, firstAt: null });
    expect(result.replayed.phases.a.greatest).toBeNull();
  });

  it('tries another kind of characteristic on the same rows', async () => {
    const characteristic = { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 200 };
    const result = await resultOf(asked({ characteristic, restraint: { kind: 'none' } }));
    // the ends stand exactly opposed: no deviation, whatever they differ by
    expect(result.replayed.phases.a.greatest?.utilisation).toBeCloseTo(0, 9);
    expect(result.replayed.phases.a.greatest?.restraintAmps).toBeNull();
    expect(result.recorded.phases.a.greatest?.utilisation).toBeCloseTo(300 / 315, 9);
  });
});

describe('a replay that is refused', () => {
  it('names each field that no scheme could have', async () => {
    const characteristic = { ...slope20, pickupAmps: -1, slope1: 2.5, kneeAmps: -5 };
    const { status, body } = await answered(startReplay, {
      body: asked({ characteristic, restraint: { kind: 'scaled-sum', factor: 1.5 } }),
    });
    expect(status).toBe(400);
    expect(fieldsOf(body)).toEqual(
      expect.arrayContaining([
        'settings.characteristic.pickupAmps',
        'settings.characteristic.slope1',
        'settings.characteristic.kneeAmps',
        'settings.restraint.factor',
      ]),
    );
  });

  it('is one whose restraint does not go with its characteristic', async () => {
    const { status, body } = await answered(startReplay, { body: asked({ restraint: { kind: 'none' } }) });
    expect(status).toBe(400);
    expect(fieldsOf(body)).toEqual(['settings.restraint.kind']);
  });

  it('is one of a period that ends before it begins, or is too long', async () => {
    const backwards = { ...asked(), to: iso(AT_MS - 90_000) };
    expect(fieldsOf((await answered(startReplay, { body: backwards })).body)).toEqual(['to']);
    const long = { ...asked(), from: iso(AT_MS - 40 * 86_400_000) };
    expect(fieldsOf((await answered(startReplay, { body: long })).body)).toEqual(['from']);
  });

  it('is one of a line that the register does not hold', async () => {
    const sent = { body: asked(), params: { key: 'no-such' } };
    expect((await answered(startReplay, sent)).status).toBe(404);
  });

  it.each(['operator', 'planner', 'admin'] as const)('is one of the %s, who may read it', async (role) => {
    expect((await answered(startReplay, { body: asked(), role })).status).toBe(403);
    const { id } = await replayed(asked());
    expect((await answered(getReplay, { params: { id }, role })).status).toBe(200);
    expect((await answered(cancelReplay, { params: { id }, role })).status).toBe(403);
  });
});

describe('a running replay', () => {
  /** One that reads nothing and lasts until it is stopped. */
  const lasting = (owner: string) =>
    replayJobsOf(site).start({
      owner,
      line: 'arden-birk',
      run: ({ signal }) =>
        new Promise((_resolve, reject) => {
          signal.addEventListener('abort', () => reject(new Error('Stopped.')));
        }),
    }) as { id: string };

  it('is one a person, stops when cancelled, and can be cancelled by that person alone', async () => {
    const { id } = lasting('Mira Holt');
    expect((await answered(startReplay, { body: asked() })).status).toBe(409);
    expect((await answered(cancelReplay, { params: { id }, person: 'Jon Vale' })).status).toBe(403);
    expect(await stateOf(id)).toMatchObject({ state: 'running' });
    expect((await answered(cancelReplay, { params: { id } })).body).toMatchObject({ state: 'cancelled' });
    await replayed(asked());
    expect(await stateOf(id)).toMatchObject({ state: 'cancelled', result: null });
  });

  it('is one of a bounded number', async () => {
    const people = ['p1', 'p2', 'p3'];
    const running = people.map((owner) => ({ owner, ...lasting(owner) }));
    expect((await answered(startReplay, { body: asked() })).status).toBe(503);
    for (const { id, owner } of running) await answered(cancelReplay, { params: { id }, person: owner });
    await replayed(asked());
  });

  it('reads no further once it is stopped', async () => {
    const line = await readRegisterLine(store, 'arden-birk');
    const stop = new AbortController();
    stop.abort(new Error('Stopped.'));
    const work = {
      line: line!,
      asked: asked() as ReplayRequest,
      nearRatio: 0.7,
      periodMs: 2_000,
      frequencyHz: 50,
    };
    const seen: number[] = [];
    const watch = {
      signal: stop.signal,
      onProgress: ({ snapshots }: { snapshots: number }) => seen.push(snapshots),
    };
    await expect(runReplay(store, work, watch)).rejects.toThrow('Stopped.');
    expect(seen).toEqual([]);
  });

  it('that this process does not know is said to be unknown here', async () => {
    const { status, body } = await answered(getReplay, { params: { id: 'elsewhere' } });
    expect(status).toBe(404);
    expect(problemSchema.parse(body).problem).toMatch(/unknown here/);
  });
});

describe('a proposal', () => {
  it('keeps the settings, the period and the figures of the replay, with note and name', async () => {
    await store.db.delete(settingProposal);
    const { id, state } = await replayed(asked());
    const kept = await answered(keepProposal, { body: { replay: id, note: ' For the winter load. ' } });
    expect(kept.status).toBe(201);
    const proposal = proposalSchema.parse(kept.body);
    expect(proposal).toMatchObject({ line: 'arden-birk', note: 'For the winter load.', keptBy: 'Mira Holt' });
    expect(proposal.summary.settings.characteristic).toEqual(slope20);
    expect(proposal.summary.replayed).toEqual(state.result!.replayed);
    expect(proposal.recorded?.characteristic).toMatchObject({ slope1: 0.3 });
    const one = await answered(getProposal, { params: { id: String(proposal.id) }, role: 'planner' });
    expect(one.body).toEqual(kept.body);
    const list = await answered(getProposals, { query: '?line=arden-birk', role: 'operator' });
    expect(proposalListSchema.parse(list.body).proposals.map((each) => each.id)).toEqual([proposal.id]);
  });

  it('needs a note, a replay that is done, and an engineer', async () => {
    const { id } = await replayed(asked());
    const empty = await answered(keepProposal, { body: { replay: id, note: ' ' } });
    expect([empty.status, fieldsOf(empty.body)]).toEqual([400, ['note']]);
    const unknown = await answered(keepProposal, { body: { replay: 'elsewhere', note: 'Why.' } });
    expect(unknown.status).toBe(404);
    const planner = await answered(keepProposal, { body: { replay: id, note: 'Why.' }, role: 'planner' });
    expect(planner.status).toBe(403);
    expect((await answered(getProposal, { params: { id: '99999' } })).status).toBe(404);
    expect((await answered(getProposals, { query: '?line=no-such' })).status).toBe(404);
  });
});
