import type { Rung } from '../../contract/lines';
import { PHASES, type PhaseName } from '../../protection/phase';
import { levelSummary } from '../../standing/level';
import { DEFAULT_QUALIFICATION_LIMITS, disqualifications } from '../../standing/qualification';
import type { LevelRow } from '../../store/levels';
import type { SnapshotFigures } from '../../store/snapshots';
import { snapshotFacts } from '../../view/snapshot-facts';

export const RUNG_MS: Record<Rung, number> = { minute: 60_000, hour: 3_600_000, day: 86_400_000 };
export const rungStart = (rung: Rung, atMs: number): number =>
  Math.floor(atMs / RUNG_MS[rung]) * RUNG_MS[rung];

const DIFFERENTIAL = { a: 'differentialAAmps', b: 'differentialBAmps', c: 'differentialCAmps' } as const;
const RESTRAINT = { a: 'restraintAAmps', b: 'restraintBAmps', c: 'restraintCAmps' } as const;
const UTILISATION = { a: 'utilisationA', b: 'utilisationB', c: 'utilisationC' } as const;

/**
 * The level rows of one line for a window, one a phase, from its raw rows in ascending order. `before` is the raw
 * row ahead of the window, against which the first one's steadiness is judged. The same rows give the same numbers.
 */
export function rungRows(
  window: { lineId: number; start: Date; ratingAmps: number },
  figures: readonly SnapshotFigures[],
  before: SnapshotFigures | undefined,
): LevelRow[] {
  const { qualified, disqualified } = qualification(figures, before, window.ratingAmps);
  return PHASES.map((phase) => ({
    lineId: window.lineId,
    phase,
    start: window.start,
    ...phaseLevels(phase, qualified, figures),
    meanThroughAmps: mean(qualified.map(({ throughAmps }) => throughAmps)),
    qualifiedCount: qualified.length,
    allCount: figures.length,
    disqualified,
    sums: null,
    channelPath: null,
  }));
}

function phaseLevels(
  phase: PhaseName,
  qualified: readonly SnapshotFigures[],
  all: readonly SnapshotFigures[],
) {
  const summary = levelSummary(qualified.map((row) => row[DIFFERENTIAL[phase]]!));
  return {
    leastAmps: summary?.leastAmps ?? null,
    p05Amps: summary?.p05Amps ?? null,
    medianAmps: summary?.medianAmps ?? null,
    p95Amps: summary?.p95Amps ?? null,
    greatestAmps: summary?.greatestAmps ?? null,
    meanRestraintAmps: mean(qualified.map((row) => row[RESTRAINT[phase]])),
    // the greatest there was, qualified or not: a moment that came near counts
    greatestUtilisation: greatest(all.map((row) => row[UTILISATION[phase]])),
  };
}

/** The rows that count, and how many each rule kept from counting. */
export function qualification<Row extends SnapshotFigures>(
  figures: readonly Row[],
  before: SnapshotFigures | undefined,
  ratingAmps: number,
): { qualified: Row[]; disqualified: NonNullable<LevelRow['disqualified']> } {
  const qualified: Row[] = [];
  const disqualified: NonNullable<LevelRow['disqualified']> = {};
  let previous = before && snapshotFacts(before);
  for (const row of figures) {
    const facts = snapshotFacts(row);
    const reasons = disqualifications(facts, previous, { ratingAmps, limits: DEFAULT_QUALIFICATION_LIMITS });
    previous = facts;
    for (const reason of reasons) disqualified[reason] = (disqualified[reason] ?? 0) + 1;
    if (reasons.length === 0 && row.differentialAAmps !== null) qualified.push(row);
  }
  return { qualified, disqualified };
}

function mean(values: readonly (number | null)[]): number | null {
  const known = values.filter((value) => value !== null);
  return known.length === 0 ? null : known.reduce((total, value) => total + value, 0) / known.length;
}

function greatest(values: readonly (number | null)[]): number | null {
  return values.reduce(
    (most, value) => (value !== null && (most === null || value > most) ? value : most),
    null,
  );
}
