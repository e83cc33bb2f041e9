import { beforeAll, describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import { lineDetailSchema } from '../../src/contract/lines';
import { reviewCloudSchema, type ReviewCloud } from '../../src/contract/review';
import { GET } from '../../src/pages/api/lines/[key]/review';
import { readLineDetail } from '../../src/server/reading/lines';
import { readReviewCloud, readReviewLine } from '../../src/server/reading/review';
import type { Site } from '../../src/server/site';
import type { Store } from '../../src/store/client';
import { writeLevels } from '../../src/store/levels';
import { packMeasurements } from '../../src/store/packing';
import type { RegisteredLine } from '../../src/store/register';
import { writeVerdicts } from '../../src/store/standing';
import { reviewCompositions } from '../../src/view/review-composition';
import { testStore } from '../database';
import { answerOf } from '../register/endpoint-call';
import { settingsSent } from '../register/made-up-line';
import { separatedWith, verdictWith } from '../view/sample-compositions';
import { snapshotRowOf, storedLine, storeRows } from '../store/made-up-rows';

const START_MS = Date.parse('2026-03-02T00:00:00Z');
const END_MS = START_MS + 12 * 3_600_000;
const WINDOW = { from: new Date(START_MS), to: new Date(END_MS) };
const at = (index: number) => START_MS + index * 2_000;

let store: Store;
let site: Site;
beforeAll(async () => {
  store = await testStore();
  site = {
    store,
    now: () => END_MS,
    live: { results: () => new Map() },
    settings: { NOMINAL_FREQUENCY_HZ: 50, NEAR_RATIO: 0.7, PERIOD_MS: 2_000 },
  } as unknown as Site;
});

const total = (cloud: ReviewCloud | undefined, phase: 'a' | 'b' | 'c' = 'a') =>
  cloud?.cells[phase].reduce((sum, [, , count]) => sum + count, 0);

/** An instant of two terminals: what enters at one leaves at the other, turned by so many degrees. */
function throughRow(line: RegisteredLine, index: number, turnedDeg: number) {
  const sent = (amps: number, angle: number): Measurement => ({
    at: new Date(at(index)).toISOString(),
    seq: index,
    current: { a: [amps, angle], b: [amps, angle - 120], c: [amps, angle + 120] },
    frequency: 50,
    breaker: 'closed',
    clock: { source: 'satellite', error_us: 1 },
    validity: 'good',
    test: false,
  });
  const [one, other] = line.terminals.map(({ key }) => line.terminalIds.get(key)!);
  return snapshotRowOf(line, at(index), 12, {
    restraintAAmps: null,
    restraintBAmps: null,
    restraintCAmps: null,
    phasors: packMeasurements([
      { terminalId: one!, measurement: sent(400, 0) },
      { terminalId: other!, measurement: sent(380, 180 + turnedDeg) },
    ]),
  });
}

describe('the cloud of a threshold scheme', () => {
  it('counts the qualified snapshots of each phase in one grid and leaves the others out', async () => {
    const line = await storedLine(store, {
      key: 'cloud-two-slope',
      settings: [settingsSent({ validFrom: '2026-01-01T00:00:00Z' })],
    });
    const version = line.settings[0]!.id;
    await storeRows(store, [
      ...[0, 1, 2, 3, 4].map((index) =>
        snapshotRowOf(line, at(index), 10 + index, { settingRecordId: version }),
      ),
      snapshotRowOf(line, at(5), 300, { settingRecordId: version, flags: 4 }),
      snapshotRowOf(line, at(6), null),
    ]);
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    // the first has nothing before it to be steady against
    expect(cloud).toMatchObject({ plane: 'restraint', snapshotCount: 7, qualifiedCount: 4, everyNth: 1 });
    expect([total(cloud, 'a'), total(cloud, 'b'), total(cloud, 'c')]).toEqual([4, 4, 4]);
    expect(cloud?.x?.least).toBe(400);
    expect(cloud?.y?.least).toBe(11);
    expect(reviewCloudSchema.safeParse(cloud).success).toBe(true);
  });

  it('leaves out what was judged under another restraint, and says how many', async () => {
    const line = await storedLine(store, {
      key: 'cloud-versions',
      settings: [
        settingsSent({ validFrom: '2026-01-01T00:00:00Z', restraint: { kind: 'maximum' } }),
        settingsSent({ validFrom: '2026-03-02T00:00:06Z' }),
      ],
    });
    const [older, newer] = line.settings.map(({ id }) => id);
    await storeRows(
      store,
      [0, 1, 2, 3, 4, 5].map((index) =>
        snapshotRowOf(line, at(index), 10, { settingRecordId: index < 3 ? older! : newer! }),
      ),
    );
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    expect(cloud).toMatchObject({ qualifiedCount: 5, otherConventionCount: 2, countedCount: 3 });
    expect(total(cloud)).toBe(3);
  });

  it('an empty period says why there is nothing', async () => {
    const line = await storedLine(store, {
      key: 'cloud-empty',
      settings: [settingsSent({ validFrom: '2026-01-01T00:00:00Z' })],
    });
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    expect(cloud?.reason).toBe('No snapshot of this period is in the raw store.');
    expect(cloud?.x).toBeNull();
  });
});

describe('the cloud of a scheme with a region', () => {
  it('an alpha plane is computed anew from the packed phasors', async () => {
    const line = await storedLine(store, {
      key: 'cloud-alpha',
      settings: [
        settingsSent({
          validFrom: '2026-01-01T00:00:00Z',
          characteristic: { kind: 'alpha-plane', pickupAmps: 120, radius: 6, angleDeg: 195 },
          restraint: { kind: 'none' },
        }),
      ],
    });
    await storeRows(
      store,
      [0, 1, 2, 3].map((index) => throughRow(line, index, index)),
    );
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    expect(cloud).toMatchObject({ plane: 'alpha-plane', qualifiedCount: 3, countedCount: 3, everyNth: 1 });
    expect(cloud?.x?.least).toBeCloseTo(Math.log(0.95), 9);
    expect(cloud?.y?.least).toBeCloseTo(1, 9);
    expect(cloud?.reason).toBeNull();
  });

  it('a phase comparison is placed by the smaller current and the deviation', async () => {
    const line = await storedLine(store, {
      key: 'cloud-comparison',
      settings: [
        settingsSent({
          validFrom: '2026-01-01T00:00:00Z',
          characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 100 },
          restraint: { kind: 'none' },
        }),
      ],
    });
    await storeRows(
      store,
      [0, 1, 2].map((index) => throughRow(line, index, 3)),
    );
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    expect(cloud?.plane).toBe('phase-comparison');
    expect(cloud?.x?.least).toBeCloseTo(380, 9);
    expect(cloud?.y?.least).toBeCloseTo(3, 9);
    expect(total(cloud, 'c')).toBe(2);
  });

  it('a line by reported magnitudes has no place in a region, and says so', async () => {
    const line = await storedLine(store, {
      key: 'cloud-reported',
      goesBy: 'reported',
      settings: [
        settingsSent({
          validFrom: '2026-01-01T00:00:00Z',
          characteristic: { kind: 'alpha-plane', pickupAmps: 120, radius: 6, angleDeg: 195 },
          restraint: { kind: 'none' },
        }),
      ],
    });
    const cloud = await readReviewCloud(site, line.key, WINDOW);
    expect(cloud?.reason).toContain('can’t be told from this feed');
  });

  it('more snapshots than are computed anew are thinned evenly, and it is said how', async () => {
    const cloud = await readReviewCloud(site, 'cloud-alpha', { ...WINDOW, recomputedMost: 2 });
    expect(cloud).toMatchObject({ qualifiedCount: 3, everyNth: 2, countedCount: 2 });
    expect(total(cloud)).toBe(2);
  });
});

describe('the endpoint', () => {
  const query = `?from=${WINDOW.from.toISOString()}&to=${WINDOW.to.toISOString()}`;

  it('answers every role and nobody else', async () => {
    const params = { key: 'cloud-two-slope' };
    expect((await answerOf(store, GET, { role: 'planner', params, query })).status).toBe(200);
    expect((await answerOf(store, GET, { params, query })).status).toBe(401);
  });

  it('refuses a period that is too long, turned round or missing, with the field', async () => {
    const params = { key: 'cloud-two-slope' };
    for (const wrong of [
      '',
      '?from=2026-03-02T00:00:00Z&to=2026-03-01T00:00:00Z',
      '?from=2025-01-01T00:00:00Z&to=2026-03-01T00:00:00Z',
    ]) {
      const answer = await answerOf(store, GET, { role: 'engineer', params, query: wrong });
      expect(answer.status).toBe(400);
    }
  });

  it('an unknown line is not found', async () => {
    const answer = await answerOf(store, GET, { role: 'engineer', params: { key: 'nowhere' }, query });
    expect(answer.status).toBe(404);
  });
});

describe('what a review knows of a line', () => {
  it('carries its constants and the load of the last day, weighted by qualified snapshots', async () => {
    const line = await storedLine(store, { key: 'review-line', leastInternalFaultAmps: 900 });
    const hour = (index: number, meanThroughAmps: number | null, qualifiedCount: number) => ({
      lineId: line.id,
      phase: 'a' as const,
      start: new Date(START_MS + index * 3_600_000),
      leastAmps: null,
      p05Amps: null,
      medianAmps: null,
      p95Amps: null,
      greatestAmps: null,
      meanRestraintAmps: null,
      meanThroughAmps,
      greatestUtilisation: null,
      qualifiedCount,
      allCount: 1_800,
      disqualified: null,
      sums: null,
      channelPath: null,
    });
    await writeLevels(store, 'hour', [hour(0, 200, 300), hour(1, 400, 100), hour(2, null, 0)]);
    const known = await readReviewLine(site, line.key);
    expect(known).toMatchObject({ nominalFrequencyHz: 50, leastInternalFaultAmps: 900, dayThroughAmps: 250 });
    expect(known).not.toHaveProperty('id');
  });

  it('has the newest composition of a phase with what a prediction needs, or as it was kept before', async () => {
    const line = await storedLine(store, { key: 'review-composition' });
    const kept = { lineId: line.id, computedAt: new Date(END_MS), likelyCause: 'not told' } as const;
    const before = separatedWith({ admittance: undefined });
    await writeVerdicts(store, [
      { ...kept, phase: 'b', verdict: verdictWith({ phase: 'b' }) },
      { ...kept, phase: 'c', verdict: verdictWith({ phase: 'c', composition: before }) },
    ]);
    const detail = lineDetailSchema.parse(
      JSON.parse(JSON.stringify(await readLineDetail(site, line.key))) as unknown,
    );
    const { a, b, c } = reviewCompositions(detail.standing);
    expect([a, b, c]).toEqual([undefined, separatedWith(), before]);
  });

  it('an unknown line has none', async () => {
    expect(await readReviewLine(site, 'nowhere')).toBeUndefined();
  });
});
