import type { Rung } from '../contract/lines';
import type { Store } from '../store/client';
import { dropStaleHour, readNewestHour, readStaleHours, writeLevels } from '../store/levels';
import { readSnapshotBefore, readSnapshotFigures } from '../store/snapshots';
import { RUNG_MS, rungRows, rungStart } from './rung';

export interface RatedLine {
  readonly id: number;
  readonly ratingAmps: number;
}

/** Builds the level rows of one line and window from its raw rows; a window without any is left as it is. */
export async function rebuildRung(
  store: Store,
  line: RatedLine,
  { rung, startMs }: { rung: Rung; startMs: number },
): Promise<void> {
  const start = new Date(startMs);
  const figures = await readSnapshotFigures(store, line.id, {
    from: start,
    to: new Date(startMs + RUNG_MS[rung]),
  });
  if (figures.length === 0) return;
  const before = await readSnapshotBefore(store, line.id, start);
  await writeLevels(
    store,
    rung,
    rungRows({ lineId: line.id, start, ratingAmps: line.ratingAmps }, figures, before),
  );
}

/**
 * Brings a line's level rows up to date: every hour since the newest one built, every closed hour that a late
 * measurement has changed, and the days they lie in. Says whether an hour has closed since the last time.
 */
export async function catchUpRungs(
  store: Store,
  line: RatedLine,
  { nowMs, rawReachMs }: { nowMs: number; rawReachMs: number },
): Promise<{ hourClosed: boolean }> {
  const currentMs = rungStart('hour', nowMs);
  const reachMs = rungStart('hour', nowMs - rawReachMs) + RUNG_MS.hour;
  const newest = await readNewestHour(store, line.id);
  const fromMs = Math.max(newest?.getTime() ?? reachMs, reachMs);
  const days = new Set<number>();
  for (let startMs = fromMs; startMs <= currentMs; startMs += RUNG_MS.hour) {
    await rebuildRung(store, line, { rung: 'hour', startMs });
    if (startMs < currentMs) days.add(rungStart('day', startMs));
  }
  for (const stale of await readStaleHours(store, [line.id])) {
    // dropped first: what changes while the hour is being rebuilt marks it again
    await dropStaleHour(store, stale);
    if (stale.start.getTime() < reachMs) continue;
    await rebuildRung(store, line, { rung: 'hour', startMs: stale.start.getTime() });
    days.add(rungStart('day', stale.start.getTime()));
  }
  // a day that raw rows cover only in part is not rebuilt: its row was built from more
  for (const startMs of days)
    if (startMs >= nowMs - rawReachMs) await rebuildRung(store, line, { rung: 'day', startMs });
  return { hourClosed: days.size > 0 };
}
