import type { Creep, ForecastDatesOnWire } from '../contract/warning';
import { dateText, instantText } from './figures';
import { inUnit, unitSign } from './line-unit';
import type { CurrentUnit } from './line-unit';
import { currentText, DASH } from './line-figures';
import type { TrendPoint } from './trend-points';
import type { TrendSource, TrendSpan } from './trend-span';

/** What the lines of a span are, in words. */
export function spanWords(span: TrendSpan, { several }: { several: boolean }): string {
  const band = several ? '' : ' with 5th to 95th percentile';
  switch (span) {
    case 'hour':
      return 'Every snapshot of the last hour';
    case 'day':
    case 'week':
      return `Hourly median${band}, qualified snapshots`;
    case 'two months':
    case 'two years':
      return `Daily median${band}, qualified snapshots`;
  }
}

/**
 * A significant drift in words: "rises 3.4 A a month (95 %: 2.9 to 3.9), p = 0.0004, near mark between
 * 12 Jan 2026 and 3 Feb 2026".
 */
export function creepWords(
  creep: Creep,
  { unit, ratingAmps, timeZone }: { unit: CurrentUnit; ratingAmps: number; timeZone: string },
): string {
  const digits = unit === 'amperes' ? 1 : 4;
  const falls = creep.slopeAmpsPerMonth < 0;
  const sizes = [creep.slopeLowAmpsPerMonth, creep.slopeHighAmpsPerMonth].map((slope) =>
    falls ? -slope : slope,
  );
  const figure = (amps: number) => (inUnit(amps, unit, ratingAmps) ?? 0).toFixed(digits);
  const slope = figure(Math.abs(creep.slopeAmpsPerMonth));
  const [low, high] = [Math.min(...sizes), Math.max(...sizes)].map(figure);
  const p = creep.pTwoSided < 0.0001 ? 'p < 0.0001' : `p = ${creep.pTwoSided.toFixed(4)}`;
  const moves = `${falls ? 'falls' : 'rises'} ${slope} ${unitSign(unit)} a month (95 %: ${low} to ${high}), ${p}`;
  return falls ? moves : `${moves}, ${nearWords(creep.near, timeZone)}`;
}

function nearWords({ earliest, latest }: ForecastDatesOnWire, timeZone: string): string {
  const day = (date: string) => dateText(`${date}T12:00:00Z`, timeZone);
  if (earliest === null) return 'near mark not within five years';
  if (latest === null) return `near mark ${day(earliest)} at the earliest`;
  return earliest === latest
    ? `near mark ${day(earliest)}`
    : `near mark between ${day(earliest)} and ${day(latest)}`;
}

/** One line of the trend, as the tooltip needs it. */
export interface ToldSeries {
  readonly letter: string;
  readonly points: readonly TrendPoint[];
}

/** What the trend says at an instant: when, and each phase's figures there. */
export function trendTooltip(
  series: readonly ToldSeries[],
  atMs: number,
  context: {
    source: TrendSource;
    unit: CurrentUnit;
    ratingAmps: number;
    nowMs: number;
    timeZone: string;
  },
): string[] {
  const { unit, ratingAmps } = context;
  const shown = (amps: number | null) => currentText(amps, unit, ratingAmps);
  const nearest = series.flatMap(({ letter, points }) => {
    const point = nearestPoint(points, atMs);
    return point === undefined ? [] : [{ letter, point }];
  });
  const first = nearest[0];
  if (first === undefined) return [];
  const lines = nearest.map(({ letter, point }) => {
    const spread =
      point.lowAmps === null || point.highAmps === null
        ? ''
        : ` (${shown(point.lowAmps)} to ${shown(point.highAmps)})`;
    return `${letter}  ${point.medianAmps === null ? DASH : shown(point.medianAmps)}${spread}`;
  });
  return [whenWords(first.point, context), ...lines, ...countLine(first.point)];
}

function countLine({ qualifiedCount, allCount }: TrendPoint): string[] {
  return qualifiedCount === null || allCount === null
    ? []
    : [`${qualifiedCount} of ${allCount} snapshots qualified`];
}

function whenWords(
  { startMs }: TrendPoint,
  { source, nowMs, timeZone }: { source: TrendSource; nowMs: number; timeZone: string },
): string {
  if (source === 'snapshots') return instantText(startMs, nowMs, timeZone);
  // A day row begins at midnight somewhere; its middle lies in the day that is meant.
  if (source === 'day') return dateText(startMs + 12 * 3_600_000, timeZone);
  return `${instantText(startMs, nowMs, timeZone).replace(/(\d\d:\d\d):00$/, '$1')}, one hour`;
}

function nearestPoint(points: readonly TrendPoint[], atMs: number): TrendPoint | undefined {
  let nearest: TrendPoint | undefined;
  for (const point of points) {
    if (nearest === undefined || Math.abs(point.atMs - atMs) < Math.abs(nearest.atMs - atMs)) nearest = point;
  }
  return nearest;
}
