import type { Creep } from '../contract/warning';
import type { TrendWindow } from './trend-span';

/** The Sen line and the lines of its slope's 95 % limits at one end of what is drawn, in amperes. */
export interface SenPoint {
  readonly atMs: number;
  readonly levelAmps: number;
  readonly lowAmps: number;
  readonly highAmps: number;
}

const DAY_MS = 86_400_000;
const MONTH_DAYS = 365.25 / 12;

/**
 * The Sen line of a creep over the days it was taken from, up to now, with its 95 % fan. Line and limits cross
 * in the middle of those days, where the Sen line is anchored to the medians; so the fan is narrow there and
 * open at both ends. Only the part inside the window comes back; nothing where none is.
 */
export function senPoints(creep: Creep, window: TrendWindow): SenPoint[] {
  const spanMs = Math.max(creep.days - 1, 1) * DAY_MS;
  const middleMs = window.toMs - spanMs / 2;
  const level = (atMs: number, slopePerMonth: number, fromMs: number, fromAmps: number) =>
    fromAmps + (slopePerMonth * (atMs - fromMs)) / (MONTH_DAYS * DAY_MS);
  const middleAmps = level(middleMs, creep.slopeAmpsPerMonth, window.toMs, creep.levelNowAmps);
  const startMs = Math.max(window.toMs - spanMs, window.fromMs);
  const instants = startMs < middleMs ? [startMs, middleMs, window.toMs] : [startMs, window.toMs];
  return instants.map((atMs) => {
    const limits = [creep.slopeLowAmpsPerMonth, creep.slopeHighAmpsPerMonth].map((slope) =>
      level(atMs, slope, middleMs, middleAmps),
    );
    return {
      atMs,
      levelAmps: level(atMs, creep.slopeAmpsPerMonth, middleMs, middleAmps),
      lowAmps: Math.min(...limits),
      highAmps: Math.max(...limits),
    };
  });
}
