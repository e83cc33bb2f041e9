import type { Result } from '../contract/result';
import type { PhaseName } from './phase';
import { isStale } from './staleness';

/** A phase's utilisation now, as a ratio; null when nothing fresh has been heard or it cannot be computed. */
export function liveUtilisation(result: Result | undefined, phase: PhaseName, nowMs: number): number | null {
  if (result === undefined || result.at === null) return null;
  if (isStale(Date.parse(result.at), nowMs)) return null;
  return result.phases[phase].utilisation;
}
