/** What decides whether a line's snapshot may count towards its standing levels. */
export interface SnapshotFacts {
  /** The snapshot's instant, milliseconds since the epoch, UTC. */
  readonly atMs: number;
  /** Every in-service terminal's measurement is there. */
  readonly complete: boolean;
  /** Every terminal says that its measurement is good. */
  readonly validityGood: boolean;
  /** Some terminal is under test. */
  readonly test: boolean;
  readonly clocksWithinLimit: boolean;
  readonly breakersClosed: boolean;
  /** Through current of the line, amperes rms primary; `undefined` where it can't be computed. */
  readonly throughAmps: number | undefined;
}

/** Limits of an ordinary load, as ratios of the line's rating. */
export interface QualificationLimits {
  readonly throughRatioLeast: number;
  readonly throughRatioMost: number;
  /** The change of through current from the snapshot before must stay under this. */
  readonly stepRatioMost: number;
}

export const DEFAULT_QUALIFICATION_LIMITS: QualificationLimits = {
  throughRatioLeast: 0.02,
  throughRatioMost: 1.2,
  stepRatioMost: 0.2,
};

/** Why a snapshot does not count. */
export type Disqualification =
  'incomplete' | 'validity' | 'test' | 'clock' | 'breaker' | 'through current' | 'unsteady';

/**
 * Every reason why a snapshot does not count towards the standing level; none means that it is qualified.
 *
 * A rule that can't be judged is not met: a snapshot without a through current, and one with nothing before it
 * to be steady against, are disqualified. `previous` is the line's snapshot before this one, the last of the
 * window before where a window begins; it throws when that is not earlier.
 */
export function disqualifications(
  facts: SnapshotFacts,
  previous: SnapshotFacts | undefined,
  { ratingAmps, limits }: { readonly ratingAmps: number; readonly limits: QualificationLimits },
): readonly Disqualification[] {
  assertRating(ratingAmps);
  assertOrder(facts, previous);
  const through = facts.throughAmps;
  const reasons: Disqualification[] = [];
  if (!facts.complete) reasons.push('incomplete');
  if (!facts.validityGood) reasons.push('validity');
  if (facts.test) reasons.push('test');
  if (!facts.clocksWithinLimit) reasons.push('clock');
  if (!facts.breakersClosed) reasons.push('breaker');
  if (!isOrdinaryLoad(through, ratingAmps, limits)) reasons.push('through current');
  if (!isSteady(through, previous?.throughAmps, limits.stepRatioMost * ratingAmps)) reasons.push('unsteady');
  return reasons;
}

function isOrdinaryLoad(
  throughAmps: number | undefined,
  ratingAmps: number,
  limits: QualificationLimits,
): boolean {
  if (throughAmps === undefined) return false;
  const ratio = throughAmps / ratingAmps;
  return ratio >= limits.throughRatioLeast && ratio <= limits.throughRatioMost;
}

function isSteady(nowAmps: number | undefined, beforeAmps: number | undefined, stepAmps: number): boolean {
  if (nowAmps === undefined || beforeAmps === undefined) return false;
  return Math.abs(nowAmps - beforeAmps) < stepAmps;
}

function assertRating(ratingAmps: number): void {
  if (!(ratingAmps > 0 && ratingAmps < Infinity)) {
    throw new RangeError(`A line’s rating is a number of amperes above 0, not ${ratingAmps}.`);
  }
}

function assertOrder(facts: SnapshotFacts, previous: SnapshotFacts | undefined): void {
  if (previous !== undefined && !(previous.atMs < facts.atMs)) {
    throw new RangeError('A snapshot is judged against an earlier one, not against itself or a later one.');
  }
}
