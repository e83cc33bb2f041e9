import type { StaleHour } from '../../store/levels';
import type { ComputedSnapshot } from '../computed-snapshot';
import { rungStart } from './rung';

/** The snapshot after a late one is judged steady against it; it lies in the next hour when it is this close. */
const FOLLOWS_WITHIN_MS = 60_000;

/** Hours that were closed when these snapshots came: their rows have to be built again. */
export function staleHours(
  snapshots: readonly Pick<ComputedSnapshot, 'line' | 'atMs'>[],
  nowMs: number,
): StaleHour[] {
  const current = rungStart('hour', nowMs);
  const hours = new Map<string, StaleHour>();
  for (const { line, atMs } of snapshots)
    for (const startMs of [rungStart('hour', atMs), rungStart('hour', atMs + FOLLOWS_WITHIN_MS)])
      if (startMs < current)
        hours.set(`${line.id} ${startMs}`, { lineId: line.id, start: new Date(startMs) });
  return [...hours.values()];
}
