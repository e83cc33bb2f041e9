import type { AtMark, Distribution, ReplayPhase, ReplayPoint, ReplaySide } from '../../contract/replay';
import { perPhase, PHASES, type PerPhase, type PhaseName } from '../../protection/phase';

/** One phase of one snapshot as a scheme judges it. */
export type JudgedPoint = Omit<ReplayPoint, 'at' | 'settingsVersion'>;

/** One snapshot as one side judges it, or why it can't. */
export type Judged =
  | {
      readonly points: PerPhase<JudgedPoint>;
      readonly settingsVersion: number | null;
      readonly compensationFellBack: boolean;
    }
  | { readonly notComputable: string };

export interface JudgedSnapshot {
  readonly atMs: number;
  readonly recorded: Judged;
  readonly replayed: Judged;
}

export interface TallyLimits {
  readonly nearRatio: number;
  readonly periodMs: number;
  readonly spacingPeriodsMost: number;
  readonly binRatio: number;
  readonly binsEndRatio: number;
}

export interface TallyOutcome {
  readonly recorded: ReplaySide;
  readonly replayed: ReplaySide;
  readonly distribution: Distribution;
}

export interface ReplayTally {
  /** in ascending order of their instants */
  add(snapshot: JudgedSnapshot): void;
  /** a snapshot that is not judged: it only ends the one before it */
  pass(atMs: number): void;
  outcome(): TallyOutcome;
}

/**
 * Adds up what two schemes make of the same snapshots. How long one lasts is known when the next comes: the time
 * between them, bounded, so that a gap in the feed is not taken for time at a mark. The last one lasts a period.
 */
export function createReplayTally(limits: TallyLimits): ReplayTally {
  const recorded = createSide(limits);
  const replayed = createSide(limits);
  let waiting: JudgedSnapshot | undefined;
  const longestMs = limits.spacingPeriodsMost * limits.periodMs;
  const settle = (durationMs: number) => {
    if (waiting === undefined) return;
    recorded.add(waiting.recorded, waiting.atMs, durationMs);
    replayed.add(waiting.replayed, waiting.atMs, durationMs);
    waiting = undefined;
  };
  const endedAt = (atMs: number) =>
    settle(waiting === undefined ? 0 : Math.min(atMs - waiting.atMs, longestMs));
  return {
    add(snapshot) {
      endedAt(snapshot.atMs);
      waiting = snapshot;
    },
    pass: endedAt,
    outcome() {
      settle(limits.periodMs);
      return {
        recorded: recorded.side(),
        replayed: replayed.side(),
        distribution: {
          binRatio: limits.binRatio,
          recorded: recorded.bins(),
          replayed: replayed.bins(),
        },
      };
    },
  };
}

function createSide(limits: TallyLimits) {
  const phases = perPhase(() => createPhase(limits));
  const reasons = new Map<string, number>();
  let evaluated = 0;
  let fellBack = 0;
  return {
    add(judged: Judged, atMs: number, durationMs: number): void {
      if ('notComputable' in judged) {
        reasons.set(judged.notComputable, (reasons.get(judged.notComputable) ?? 0) + 1);
        return;
      }
      evaluated += 1;
      if (judged.compensationFellBack) fellBack += 1;
      for (const phase of PHASES) phases[phase].add(judged, phase, { atMs, durationMs });
    },
    side: (): ReplaySide => ({
      evaluated,
      compensationFellBack: fellBack,
      notComputable: [...reasons]
        .map(([reason, snapshots]) => ({ reason, snapshots }))
        .sort((one, other) => other.snapshots - one.snapshots),
      phases: perPhase((phase) => phases[phase].figures()),
    }),
    bins: () => perPhase((phase) => phases[phase].bins()),
  };
}

type JudgedByPoints = Exclude<Judged, { notComputable: string }>;

function createPhase(limits: TallyLimits) {
  const { nearRatio } = limits;
  const edges = binEdges(limits);
  const bins = new Array<number>(edges.length).fill(0);
  const near = { snapshots: 0, durationMs: 0 };
  const over = { snapshots: 0, durationMs: 0 };
  let evaluated = 0;
  let greatest: { point: JudgedPoint; atMs: number; settingsVersion: number | null } | undefined;
  return {
    add(
      { points, settingsVersion }: JudgedByPoints,
      phase: PhaseName,
      { atMs, durationMs }: { atMs: number; durationMs: number },
    ): void {
      const point = points[phase];
      evaluated += 1;
      bins[binOf(point.utilisation, edges)]! += 1;
      if (greatest === undefined || point.utilisation > greatest.point.utilisation)
        greatest = { point, atMs, settingsVersion };
      if (point.utilisation >= nearRatio) extend(near, durationMs);
      if (point.utilisation >= 1) extend(over, durationMs);
    },
    figures: (): ReplayPhase => ({
      evaluated,
      greatest: greatest === undefined ? null : greatestPoint(greatest),
      near: { ...near },
      over: { ...over },
    }),
    bins: () => [...bins],
  };
}

/** Lower edges of the bins as they are written: multiples of a width alone are not exact. */
export const binEdges = ({
  binRatio,
  binsEndRatio,
}: Pick<TallyLimits, 'binRatio' | 'binsEndRatio'>): number[] =>
  Array.from({ length: Math.round(binsEndRatio / binRatio) + 1 }, (_, bin) =>
    Number((bin * binRatio).toPrecision(12)),
  );

/** The bin whose lower edge a utilisation has reached; the last one has no upper edge. */
export function binOf(utilisation: number, edges: readonly number[]): number {
  const last = edges.length - 1;
  const near = Math.min(Math.floor(utilisation / edges[1]!), last);
  // a division can end on the wrong side of an edge
  if (near < last && utilisation >= edges[near + 1]!) return near + 1;
  return near > 0 && utilisation < edges[near]! ? near - 1 : near;
}

function extend(mark: AtMark, durationMs: number): void {
  mark.snapshots += 1;
  mark.durationMs += durationMs;
}

function greatestPoint({
  point,
  atMs,
  settingsVersion,
}: {
  point: JudgedPoint;
  atMs: number;
  settingsVersion: number | null;
}): ReplayPoint {
  return { ...point, at: new Date(atMs).toISOString(), settingsVersion };
}
