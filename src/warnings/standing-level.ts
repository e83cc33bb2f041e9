import type { WarningCause } from '../contract/warning';
import { PHASES, type PerPhase } from '../protection/phase';

/**
 * The cause by which a 24-hour standing level raises near, or undefined. `standing` says that it stands already:
 * then it returns only below the mark less the band.
 */
export function standingLevelCause(
  levelAmps: PerPhase<number | undefined>,
  pickupAmps: number,
  marks: { nearRatio: number; returnBand: number; standing: boolean },
): WarningCause | undefined {
  const limit = marks.standing ? marks.nearRatio - marks.returnBand : marks.nearRatio;
  const worst = PHASES.reduce((most, phase) =>
    (levelAmps[phase] ?? 0) > (levelAmps[most] ?? 0) ? phase : most,
  );
  const level = levelAmps[worst];
  if (level === undefined || level < limit * pickupAmps) return undefined;
  return { basis: 'standing level', phase: worst, levelAmps: level, pickupAmps, limit: marks.nearRatio };
}
