import type { Store } from '../../store/client';
import { readOldestInstant } from '../../store/snapshots';
import { rebuildRung } from './rebuild';
import type { RosterLine } from '../roster';
import { RUNG_MS, rungStart } from './rung';

export interface RebuiltWindow {
  readonly hours: number;
  readonly days: number;
  /** days that raw rows cover only in part keep the rows that were built from more */
  readonly daysLeft: number;
}

/** Builds every minute, hour and day row of a line again whose raw rows lie whole in [from, to). */
export async function rebuildWindow(
  store: Store,
  line: RosterLine,
  { fromMs, toMs }: { fromMs: number; toMs: number },
): Promise<RebuiltWindow> {
  const oldest = await readOldestInstant(store, line.id);
  if (oldest === undefined) return { hours: 0, days: 0, daysLeft: 0 };
  const wholeFromMs = Math.max(fromMs, oldest.getTime());
  let hours = 0;
  for (let startMs = ceilTo(wholeFromMs, RUNG_MS.hour); startMs < toMs; startMs += RUNG_MS.hour) {
    await rebuildRung(store, line, { rung: 'hour', startMs });
    hours += 1;
  }
  let [days, daysLeft] = [0, 0];
  for (let startMs = rungStart('day', fromMs); startMs < toMs; startMs += RUNG_MS.day) {
    if (startMs < oldest.getTime()) daysLeft += 1;
    else {
      await rebuildRung(store, line, { rung: 'day', startMs });
      days += 1;
    }
  }
  return { hours, days, daysLeft };
}

const ceilTo = (ms: number, stepMs: number): number => Math.ceil(ms / stepMs) * stepMs;
