import type { Level } from '../contract/lines';
import { perPhase } from '../protection/phase';
import type { PerPhase } from '../protection/phase';
import type { Reading } from './line-readings';
import { stretches, trendOfLevels, trendOfReadings, unbrokenMs } from './trend-points';
import type { TrendPoint } from './trend-points';
import type { PickupStep } from './trend-pickup';
import type { SenPoint } from './trend-sen';
import type { TrendSource, TrendWindow } from './trend-span';

/** What a trend is made of: the rows of a rung, or readings. */
export interface TrendData {
  readonly source: TrendSource;
  readonly levels: readonly Level[];
  readonly readings: readonly Reading[];
}

/** The points of each phase inside the window, oldest first, in amperes. */
export function trendSeries(
  { source, levels, readings }: TrendData,
  window: TrendWindow,
): PerPhase<readonly TrendPoint[]> {
  return perPhase((phase) =>
    source === 'snapshots'
      ? trendOfReadings(readings, phase, window)
      : trendOfLevels(levels, phase, { rung: source, window }),
  );
}

/** The points of a phase in the unit shown, as stretches without a gap. */
export function shownStretches(
  points: readonly TrendPoint[],
  source: TrendSource,
  unitAmps: number,
): TrendPoint[][] {
  const scaled = (amps: number | null) => (amps === null ? null : amps / unitAmps);
  const shown = points.map((point) => ({
    ...point,
    medianAmps: scaled(point.medianAmps),
    lowAmps: scaled(point.lowAmps),
    highAmps: scaled(point.highAmps),
  }));
  return stretches(shown, unbrokenMs(points, source === 'snapshots' ? undefined : source));
}

/** How high the trend is drawn: above the pickup, and above everything that is drawn. Amperes or per unit, as given. */
export function trendLevelMax(
  lines: readonly (readonly TrendPoint[])[],
  pickup: readonly PickupStep[],
  sen: readonly SenPoint[],
): number {
  const marks = pickup.map((step) => 1.14 * step.pickup);
  const levels = lines.flat().flatMap(({ medianAmps, highAmps }) => [medianAmps ?? 0, highAmps ?? 0]);
  const most = levels.reduce((greatest, level) => Math.max(greatest, level), 0);
  const fan = sen.map((point) => point.high);
  return Math.max(...marks, ...fan, 1.1 * most) || 1;
}
