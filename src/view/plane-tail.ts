import { perPhase } from '../protection/phase';
import type { PerPhase } from '../protection/phase';
import { unbrokenSpacingMs } from './line-readings';
import type { Reading } from './line-readings';

export const TAIL_MS = 10 * 60_000;

/** One operating point of the past; `ageRatio` is 0 for the newest and 1 at the end of the tail. */
export interface TailPoint {
  readonly restraintAmps: number;
  readonly differentialAmps: number;
  readonly ageRatio: number;
}

/** A stretch of operating points without a gap. */
export type TailStretch = readonly TailPoint[];

/**
 * The way each phase has gone over the plane in the last ten minutes. Instants that could not be computed and
 * instants that never came break the tail; nothing is drawn across them.
 */
export function tails(readings: readonly Reading[], nowMs: number): PerPhase<readonly TailStretch[]> {
  const recent = readings.filter(({ atMs }) => atMs >= nowMs - TAIL_MS && atMs <= nowMs);
  const unbrokenMs = unbrokenSpacingMs(recent.map(({ atMs }) => atMs));
  return perPhase((phase) => {
    const stretches: TailPoint[][] = [];
    let open: TailPoint[] | undefined;
    let lastMs = -Infinity;
    for (const { atMs, phases } of recent) {
      const { restraintAmps, differentialAmps } = phases[phase];
      if (restraintAmps === null || differentialAmps === null) {
        open = undefined;
        continue;
      }
      if (open === undefined || atMs - lastMs > unbrokenMs) stretches.push((open = []));
      open.push({ restraintAmps, differentialAmps, ageRatio: (nowMs - atMs) / TAIL_MS });
      lastMs = atMs;
    }
    return stretches;
  });
}
