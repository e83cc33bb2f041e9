import type { Creep } from '../contract/warning';
import type { TrendWindow } from './trend-span';

/** The Sen line and the lines of its slope's 95 % limits at one end of what is drawn, in the unit asked for. */
export interface SenPoint {
  readonly atMs: number;
  readonly level: number;
  readonly low: number;
  readonly high: number;
}

const DAY_MS = 86_400_000;
const MONTH_DAYS = 365.25 / 12;

/**
 * The Sen line of a creep over the days it was taken from, up to now, with its 95 % fan. Line and limits cross
 * in the middle of those days, where the Sen line is anchored to the medians; so the fan is narrow there and
 * open at both ends. Only the part inside the window comes back; nothing where none is.
 */
export function senPoints(creep: Creep, window: TrendWindow, unitAmps = 1): SenPoint[] {
  const spanMs = Math.max(creep.days - 1, 1) * DAY_MS;
  const middleMs = window.toMs - spanMs / 2;
  const middleAmps = creep.levelNowAmps - risenAmps(creep.slopeAmpsPerMonth, spanMs / 2);
  const startMs = Math.max(window.toMs - spanMs, window.fromMs);
  const instants = startMs < middleMs ? [startMs, middleMs, window.toMs] : [startMs, window.toMs];
  return instants.map((atMs) => {
    const at = (slope: number) => middleAmps + risenAmps(slope, atMs - middleMs);
    const limits = [at(creep.slopeLowAmpsPerMonth), at(creep.slopeHighAmpsPerMonth)];
    return {
      atMs,
      level: at(creep.slopeAmpsPerMonth) / unitAmps,
      low: Math.min(...limits) / unitAmps,
      high: Math.max(...limits) / unitAmps,
    };
  });
}

const risenAmps = (slopeAmpsPerMonth: number, lastingMs: number): number =>
  (slopeAmpsPerMonth * lastingMs) / (MONTH_DAYS * DAY_MS);
