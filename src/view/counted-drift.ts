import type { StandingVerdict } from '../contract/standing';
import type { Creep } from '../contract/warning';

/**
 * The drift of a standing level that counts: at one load wherever the load can be taken out; with the load in it only
 * where nothing takes it out and it has stood still.
 */
export function countedDrift({
  creep,
  creepAtReference,
  loadTakenOutBy,
  measuredCounts,
}: Pick<StandingVerdict, 'creep' | 'creepAtReference' | 'loadTakenOutBy' | 'measuredCounts'>):
  Creep | undefined {
  if (loadTakenOutBy !== null) return creepAtReference?.creep;
  return measuredCounts ? (creep ?? undefined) : undefined;
}
