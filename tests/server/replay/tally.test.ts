import { describe, expect, it } from 'vitest';
import { perPhase } from '../../../src/protection/phase';
import { binEdges, binOf, createReplayTally, type Judged } from '../../../src/server/replay/tally';

const LIMITS = { nearRatio: 0.7, periodMs: 2_000, spacingPeriodsMost: 3, binRatio: 0.005, binsEndRatio: 2 };
const T0 = Date.parse('2026-03-02T10:00:00.000Z');

/** A snapshot whose phase a stands at a utilisation of a threshold of 100 A, the others at a tenth of it. */
const at = (utilisation: number, version: number | null = 1): Judged => ({
  points: perPhase((phase) => {
    const own = phase === 'a' ? utilisation : utilisation / 10;
    return {
      utilisation: own,
      differentialAmps: 100 * own,
      restraintAmps: 300,
      thresholdAmps: 100,
      region: null,
    };
  }),
  settingsVersion: version,
  compensationFellBack: false,
});

/** Snapshots as seconds after T0 and what the recorded settings make of them; the others make half of it. */
function tallied(snapshots: readonly (readonly [seconds: number, utilisation: number | string])[]) {
  const tally = createReplayTally(LIMITS);
  for (const [seconds, seen] of snapshots) {
    const judged = (share: number): Judged =>
      typeof seen === 'string' ? { notComputable: seen } : at(seen * share, share === 1 ? 7 : null);
    tally.add({ atMs: T0 + seconds * 1000, recorded: judged(1), replayed: judged(0.5) });
  }
  return tally.outcome();
}

describe('the time at a mark', () => {
  it('is what lies between a snapshot and the next', () => {
    const { recorded } = tallied([
      [0, 0.7],
      [2, 0.2],
      [4, 1],
      [5, 1.2],
      [6, 0.1],
    ]);
    // 0.7 for 2 s, 1 for 1 s, 1.2 for 1 s
    expect(recorded.phases.a.near).toEqual({ snapshots: 3, durationMs: 4_000 });
    expect(recorded.phases.a.over).toEqual({ snapshots: 2, durationMs: 2_000 });
  });

  it('is at most three periods, whatever gap follows', () => {
    const { recorded } = tallied([
      [0, 1.5],
      [3_600, 0.1],
    ]);
    expect(recorded.phases.a.over).toEqual({ snapshots: 1, durationMs: 6_000 });
  });

  it('is one period for the last snapshot', () => {
    expect(tallied([[0, 0.9]]).recorded.phases.a.near).toEqual({ snapshots: 1, durationMs: 2_000 });
  });

  it('ends where a snapshot comes that cannot be computed or is under test', () => {
    const tally = createReplayTally(LIMITS);
    tally.add({ atMs: T0, recorded: at(0.9), replayed: { notComputable: 'Why.' } });
    tally.add({ atMs: T0 + 1_000, recorded: { notComputable: 'Why.' }, replayed: at(0.9) });
    tally.pass(T0 + 4_000);
    const { recorded, replayed } = tally.outcome();
    expect(recorded.phases.a.near.durationMs).toBe(1_000);
    expect(replayed.phases.a.near.durationMs).toBe(3_000);
  });

  it('counts a utilisation exactly at the mark and none below it', () => {
    const { recorded } = tallied([
      [0, 0.7],
      [2, 0.6999999],
      [4, 1],
      [6, 0.9999999],
    ]);
    expect(recorded.phases.a.near.snapshots).toBe(3);
    expect(recorded.phases.a.over.snapshots).toBe(1);
  });
});

describe('the greatest', () => {
  it('comes with its first instant, its operating point and the version that judged it', () => {
    const { recorded, replayed } = tallied([
      [0, 0.2],
      [2, 0.8],
      [4, 0.8],
      [6, 0.3],
    ]);
    expect(recorded.phases.a.greatest).toEqual({
      at: '2026-03-02T10:00:02.000Z',
      utilisation: 0.8,
      differentialAmps: 80,
      restraintAmps: 300,
      thresholdAmps: 100,
      region: null,
      settingsVersion: 7,
    });
    expect(replayed.phases.a.greatest).toMatchObject({ utilisation: 0.4, settingsVersion: null });
    expect(recorded.phases.b.greatest?.utilisation).toBeCloseTo(0.08, 12);
  });

  it('is null, and not 0, where nothing could be evaluated', () => {
    const { recorded } = tallied([
      [0, 'No settings were in force at this instant.'],
      [2, 'Nothing was heard of Arden.'],
      [4, 'Nothing was heard of Arden.'],
    ]);
    expect(recorded.phases.a.greatest).toBeNull();
    expect(recorded).toMatchObject({
      evaluated: 0,
      notComputable: [
        { reason: 'Nothing was heard of Arden.', snapshots: 2 },
        { reason: 'No settings were in force at this instant.', snapshots: 1 },
      ],
    });
  });
});

describe('the distribution', () => {
  it('puts each utilisation into the bin whose lower edge it has reached', () => {
    expect(
      [0, 0.004999, 0.005, 0.57, 0.285, 1, 1.9999, 2, 40].map((u) => binOf(u, binEdges(LIMITS))),
    ).toEqual([0, 0, 1, 114, 57, 200, 399, 400, 400]);
  });

  it('holds every evaluated snapshot once, on each side', () => {
    const { distribution, recorded } = tallied([
      [0, 0.1],
      [2, 0.1],
      [4, 'Nothing was heard of Arden.'],
      [6, 3],
    ]);
    expect(recorded.evaluated).toBe(3);
    expect(distribution.recorded.a[20]).toBe(2);
    expect(distribution.recorded.a.at(-1)).toBe(1);
    expect(distribution.replayed.a[10]).toBe(2);
    expect(distribution.replayed.a.reduce((total, count) => total + count, 0)).toBe(3);
  });
});
