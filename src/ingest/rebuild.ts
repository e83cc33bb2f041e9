import type { Rung } from '../contract/lines';
import { inTransaction, type Store } from '../store/client';
import { dropStaleHour, readNewestHour, readStaleHours, type StaleHour, writeLevels } from '../store/levels';
import { readNewestInstants, readSnapshotBefore, readSnapshotFigures } from '../store/snapshots';
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
 * measurement has changed, and the days they lie in. `caughtUpMs` is the hour that was current when this was last
 * done. Says whether a closed hour has been built since.
 */
export async function catchUpRungs(
  store: Store,
  line: RatedLine,
  { nowMs, rawReachMs, caughtUpMs }: { nowMs: number; rawReachMs: number; caughtUpMs: number | undefined },
): Promise<{ hourClosed: boolean; caughtUpMs: number }> {
  const currentMs = rungStart('hour', nowMs);
  const reachMs = rungStart('hour', nowMs - rawReachMs) + RUNG_MS.hour;
  const hours =
    caughtUpMs === currentMs ? [currentMs] : await hoursToBuild(store, line, { currentMs, reachMs });
  for (const startMs of hours) await rebuildRung(store, line, { rung: 'hour', startMs });
  const closed = hours.filter((startMs) => startMs < currentMs);
  for (const stale of await readStaleHours(store, [line.id])) {
    const isWhole = stale.start.getTime() >= reachMs;
    if (isWhole) closed.push(stale.start.getTime());
    // an hour whose raw rows have gone in part keeps the row that was built from more
    await (isWhole ? rebuildStale(store, line, stale) : dropStaleHour(store, stale));
  }
  // a day that raw rows cover only in part is not rebuilt: its row was built from more
  const days = new Set(closed.map((startMs) => rungStart('day', startMs)));
  for (const startMs of days)
    if (startMs >= nowMs - rawReachMs) await rebuildRung(store, line, { rung: 'day', startMs });
  return { hourClosed: closed.length > 0, caughtUpMs: currentMs };
}

/** From the newest hour row, which may have been built before its hour was over, to the newest raw row. */
async function hoursToBuild(
  store: Store,
  line: RatedLine,
  { currentMs, reachMs }: { currentMs: number; reachMs: number },
): Promise<number[]> {
  const newestRaw = (await readNewestInstants(store, [line.id])).get(line.id);
  if (newestRaw === undefined) return [];
  const newestRow = await readNewestHour(store, line.id);
  const fromMs = Math.max(newestRow?.getTime() ?? reachMs, reachMs);
  const toMs = Math.min(rungStart('hour', newestRaw.getTime()), currentMs);
  const hours: number[] = [];
  for (let startMs = fromMs; startMs <= toMs; startMs += RUNG_MS.hour) hours.push(startMs);
  return hours;
}

/**
 * In one transaction: a worker that dies in between leaves the mark, and what changes the hour meanwhile waits to
 * mark it again until this is done.
 */
async function rebuildStale(store: Store, line: RatedLine, stale: StaleHour): Promise<void> {
  await inTransaction(store, async (_connection, db) => {
    const inside = { ...store, db };
    await dropStaleHour(inside, stale);
    await rebuildRung(inside, line, { rung: 'hour', startMs: stale.start.getTime() });
  });
}
