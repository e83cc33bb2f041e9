import type { Level, Rung } from '../contract/lines';
import type { PhaseName } from './phase';
import { unbrokenSpacingMs } from './line-readings';
import type { Reading } from './line-readings';
import type { TrendWindow } from './trend-span';

/** One figure of a trend, drawn at the middle of the time it stands for; null levels where nothing could be told. */
export interface TrendPoint {
  readonly startMs: number;
  readonly atMs: number;
  readonly medianAmps: number | null;
  readonly lowAmps: number | null;
  readonly highAmps: number | null;
  readonly qualifiedCount: number | null;
  readonly allCount: number | null;
}

export const RUNG_MS: Record<Rung, number> = { minute: 60_000, hour: 3_600_000, day: 86_400_000 };

/** The hour or day rows of one phase inside the window, oldest first. */
export function trendOfLevels(
  levels: readonly Level[],
  phase: PhaseName,
  { rung, window }: { rung: Rung; window: TrendWindow },
): TrendPoint[] {
  const halfMs = RUNG_MS[rung] / 2;
  return levels
    .filter((level) => level.phase === phase)
    .map((level) => pointOfLevel(level, { halfMs, toMs: window.toMs }))
    .filter(({ startMs }) => startMs + 2 * halfMs > window.fromMs && startMs < window.toMs)
    .sort((one, other) => one.startMs - other.startMs);
}

function pointOfLevel(level: Level, { halfMs, toMs }: { halfMs: number; toMs: number }): TrendPoint {
  const startMs = Date.parse(level.start);
  // The row still being filled stands for its time so far.
  const atMs = Math.min(startMs + halfMs, (startMs + toMs) / 2);
  return {
    startMs,
    atMs,
    medianAmps: level.medianAmps,
    lowAmps: level.p05Amps,
    highAmps: level.p95Amps,
    qualifiedCount: level.qualifiedCount,
    allCount: level.allCount,
  };
}

/** The raw readings of one phase inside the window, oldest first; they have no spread. */
export function trendOfReadings(
  readings: readonly Reading[],
  phase: PhaseName,
  window: TrendWindow,
): TrendPoint[] {
  return readings
    .filter(({ atMs }) => atMs >= window.fromMs && atMs <= window.toMs)
    .map(({ atMs, phases }) => ({
      startMs: atMs,
      atMs,
      medianAmps: phases[phase].differentialAmps,
      lowAmps: null,
      highAmps: null,
      qualifiedCount: null,
      allCount: null,
    }));
}

/** How far apart two neighbours of a series may start and still belong together. */
export function unbrokenMs(points: readonly TrendPoint[], rung: Rung | undefined): number {
  return rung === undefined ? unbrokenSpacingMs(points.map(({ startMs }) => startMs)) : 1.5 * RUNG_MS[rung];
}

/**
 * The stretches of a trend that hang together: a point that could not be told and a time without a row end
 * one. A gap in the data is a gap in the line.
 */
export function stretches(points: readonly TrendPoint[], unbrokenSpacing: number): TrendPoint[][] {
  const found: TrendPoint[][] = [];
  let open: TrendPoint[] | undefined;
  let lastStartMs = -Infinity;
  for (const point of points) {
    if (point.medianAmps === null) {
      open = undefined;
      continue;
    }
    if (open === undefined || point.startMs - lastStartMs > unbrokenSpacing) found.push((open = []));
    open.push(point);
    lastStartMs = point.startMs;
  }
  return found;
}
