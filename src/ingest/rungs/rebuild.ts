import { inTransaction, type Store } from '../../store/client';
import {
  dropStaleHour,
  readLevels,
  readNewestHour,
  readStaleHours,
  type StaleHour,
  writeLevels,
} from '../../store/levels';
import {
  readNewestInstants,
  readSnapshotBefore,
  readSnapshotFigures,
  readSnapshots,
} from '../../store/snapshots';
import { channelPathBelow, minuteRows, summedBelow } from './window-rows';
import type { RosterLine } from '../roster';
import { RUNG_MS, rungRows, rungStart } from './rung';

/** Minutes of the current hour that are built again at every look: what comes late comes within them, or waits for the hour to close. */
const MINUTES_AGAIN_MS = 3 * 60_000;

/**
 * Builds the level rows of one line and window again; a window without raw rows is left as it is. Spread and counts
 * come from the raw rows, the composition's sums from the rung below, where they add.
 */
export async function rebuildRung(
  store: Store,
  line: RosterLine,
  { rung, startMs }: { rung: 'hour' | 'day'; startMs: number },
): Promise<void> {
  if (rung === 'hour') await rebuildMinutes(store, line, { fromMs: startMs, toMs: startMs + RUNG_MS.hour });
  await rebuildFromFigures(store, line, { rung, startMs });
}

/** Builds the minute rows of a window from its raw rows, phasors and all. */
export async function rebuildMinutes(
  store: Store,
  line: RosterLine,
  { fromMs, toMs }: { fromMs: number; toMs: number },
): Promise<void> {
  const from = new Date(fromMs);
  const rows = await readSnapshots(store, line.id, {
    from,
    to: new Date(toMs),
    most: Number.MAX_SAFE_INTEGER,
  });
  if (rows.length === 0) return;
  await writeLevels(store, 'minute', minuteRows(line, rows, await readSnapshotBefore(store, line.id, from)));
}

async function rebuildFromFigures(
  store: Store,
  line: RosterLine,
  { rung, startMs }: { rung: 'hour' | 'day'; startMs: number },
): Promise<void> {
  const start = new Date(startMs);
  const window = { from: start, to: new Date(startMs + RUNG_MS[rung]) };
  const figures = await readSnapshotFigures(store, line.id, window);
  if (figures.length === 0) return;
  const before = await readSnapshotBefore(store, line.id, start);
  const below = await readLevels(store, rung === 'hour' ? 'minute' : 'hour', {
    lineIds: [line.id],
    ...window,
  });
  const built = rungRows({ lineId: line.id, start, ratingAmps: line.ratingAmps }, figures, before);
  await writeLevels(
    store,
    rung,
    built.map((row) => ({
      ...row,
      sums: summedBelow(below, row.phase),
      channelPath: channelPathBelow(below, row.phase),
    })),
  );
}

/**
 * Brings a line's level rows up to date: every hour since the newest one built, every closed hour that a late
 * measurement has changed, and the days they lie in. `caughtUpMs` is the hour that was current when this was last
 * done. Says whether a closed hour has been built since.
 */
export async function catchUpRungs(
  store: Store,
  line: RosterLine,
  { nowMs, rawReachMs, caughtUpMs }: { nowMs: number; rawReachMs: number; caughtUpMs: number | undefined },
): Promise<{ hourClosed: boolean; caughtUpMs: number }> {
  const currentMs = rungStart('hour', nowMs);
  const reachMs = rungStart('hour', nowMs - rawReachMs) + RUNG_MS.hour;
  const hours =
    caughtUpMs === currentMs ? [currentMs] : await hoursToBuild(store, line, { currentMs, reachMs });
  for (const startMs of hours) {
    // the older minutes of the current hour have been built before, and are again when it closes
    const isUnderWay = caughtUpMs === currentMs;
    const fromMs = isUnderWay ? Math.max(startMs, rungStart('minute', nowMs) - MINUTES_AGAIN_MS) : startMs;
    await rebuildMinutes(store, line, { fromMs, toMs: startMs + RUNG_MS.hour });
    await rebuildFromFigures(store, line, { rung: 'hour', startMs });
  }
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
  line: RosterLine,
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
async function rebuildStale(store: Store, line: RosterLine, stale: StaleHour): Promise<void> {
  await inTransaction(store, async (_connection, db) => {
    const inside = { ...store, db };
    await dropStaleHour(inside, stale);
    await rebuildRung(inside, line, { rung: 'hour', startMs: stale.start.getTime() });
  });
}
