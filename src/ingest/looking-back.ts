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

/** Housekeeping of the store, done by the first worker alone. */
export async function keepStore(
  store: Store,
  { settings, nowMs }: { settings: IngestSettings; nowMs: number },
): Promise<void> {
  await keepPartitions(store, { table: 'snapshot', now: nowMs, days: settings.RAW_DAYS });
  await keepPartitions(store, { table: 'minute_level', now: nowMs, days: settings.MINUTE_DAYS });
  await dropHourLevelsBefore(store, new Date(nowMs - settings.HOUR_DAYS * DAY_MS));
  await dropRefusalsBefore(store, new Date(nowMs - INGEST_LIMITS.refusalsKeptDays * DAY_MS));
}
