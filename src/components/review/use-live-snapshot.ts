import { useMemo } from 'react';
import type { Result } from '../../contract/result';
import type { SettingsVersion } from '../../contract/settings-version';
import { isComputable } from '../../protection/evaluation';
import type { Evaluation, NotComputable } from '../../protection/evaluation';
import type { PerPhase } from '../../protection/phase';
import type { ReviewLine } from '../../view/review-line';
import { reviewPoints, reviewSequences, reviewSnapshot, terminalsOnLineSide } from '../../view/review-now';
import type { ReviewSnapshot } from '../../view/review-now';

/** The newest snapshot with what the recorded scheme makes of it. */
export interface LiveSnapshot {
  readonly snapshot: ReviewSnapshot;
  readonly points: PerPhase<Evaluation>;
  readonly sequences: ReturnType<typeof reviewSequences>;
  /** currents on the line's side, as the scheme judges them */
  readonly terminals: Result['terminals'];
}

/** The newest snapshot as the recorded scheme sees it; moves with the stream. */
export function useLiveSnapshot(
  review: ReviewLine,
  inForce: SettingsVersion | undefined,
  result: Result | undefined,
): LiveSnapshot | NotComputable | undefined {
  return useMemo(() => {
    if (inForce === undefined || result === undefined) return undefined;
    const snapshot = reviewSnapshot(review, inForce, result.terminals);
    if (!isComputable(snapshot)) return snapshot;
    return {
      snapshot,
      points: reviewPoints(review, inForce, snapshot),
      sequences: reviewSequences(review, inForce, snapshot),
      terminals: terminalsOnLineSide(result.terminals, snapshot),
    };
  }, [review, inForce, result]);
}

/** The result with its terminals' currents as the scheme judges them, where that can be told. */
export function resultOnLineSide(
  result: Result | undefined,
  live: LiveSnapshot | NotComputable | undefined,
): Result | undefined {
  if (result === undefined || live === undefined || !isComputable(live)) return result;
  return { ...result, terminals: live.terminals };
}
