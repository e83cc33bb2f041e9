import type { IngestSettings } from '../settings';
import type { Store } from '../store/client';
import { dropHourLevelsBefore } from '../store/levels';
import { dropRefusalsBefore } from '../store/feed';
import { keepPartitions } from '../store/partitions';
import type { WarningLimits } from '../warnings/limits';
import { INGEST_LIMITS } from './limits';
import { type LineWatch, type WarningChange, watchFindings } from './line-watch';
import { catchUpRungs } from './rungs/rebuild';
import { renewFindings } from './verdict/standing-findings';

const DAY_MS = 86_400_000;

/** Brings a line's level rows up to date and, when an hour has closed, looks at what they say. */
export async function lookBack(
  store: Store,
  watch: LineWatch,
  { settings, limits, nowMs }: { settings: IngestSettings; limits: WarningLimits; nowMs: number },
): Promise<WarningChange[]> {
  const { line } = watch;
  const { hourClosed, caughtUpMs } = await catchUpRungs(store, line, {
    nowMs,
    rawReachMs: settings.RAW_DAYS * DAY_MS,
    caughtUpMs: watch.caughtUpMs,
  });
  watch.caughtUpMs = caughtUpMs;
  if (!hourClosed && watch.findings !== undefined) return [];
  const findings = await renewFindings(store, line, {
    nowMs,
    nearRatio: settings.NEAR_RATIO,
    frequencyHz: settings.NOMINAL_FREQUENCY_HZ,
  });
  return watchFindings(watch, findings, { atMs: nowMs, limits });
}

interface Keeping {
  readonly settings: IngestSettings;
  readonly nowMs: number;
}

/** Room for the days to come: what the feed brings wants the partitions of its days. Done by the first worker alone. */
export async function makeRoom(store: Store, { settings, nowMs }: Keeping): Promise<void> {
  await keepPartitions(store, { table: 'snapshot', now: nowMs, days: settings.RAW_DAYS });
  await keepPartitions(store, { table: 'minute_level', now: nowMs, days: settings.MINUTE_DAYS });
}

/** Drops what has outlived its reach, row by row. Done by the first worker alone, and nobody waits for it. */
export async function dropOutlived(store: Store, { settings, nowMs }: Keeping): Promise<void> {
  await dropHourLevelsBefore(store, new Date(nowMs - settings.HOUR_DAYS * DAY_MS));
  await dropRefusalsBefore(store, new Date(nowMs - INGEST_LIMITS.refusalsKeptDays * DAY_MS));
}
