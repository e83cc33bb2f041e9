import { fittedCoefficients } from '../../../src/standing/composition-fit';
import { shapeOf, totalOf } from '../../../src/standing/composition-sums';
import type { CompositionSums } from '../../../src/standing/composition-sums';
import type { DailyLevel } from '../../../src/standing/creep';
import { surestRise } from '../../../src/standing/creep-watch';
import { levelsAtLoad, loadResponse } from '../../../src/standing/load-response';
import type { HourlyLevel } from '../../../src/standing/load-response';
import { levelAtPointAmps, typicalPoint } from '../../../src/standing/operating-point';
import { levelsAtReferenceLoad } from '../../../src/standing/reference-level';
import { uniform } from './seeded-line';
import type { LineTruth, Pair } from './seeded-line';

export const NEAR_RATIO = 0.7;
export const LEARNING_DAYS = 60;
const HORIZON_DAYS = 365;
const HISTORY_DAYS = 365;

/** The daily levels that a look on the morning after so many days has; `undefined` where it has none to judge. */
export type Looks = (days: number) => readonly DailyLevel[] | undefined;

/** The first day on which the history up to it is called creep; `undefined` for never. */
export function firstCreepDay(
  looks: Looks,
  plan: {
    readonly pickupAmps: number;
    readonly fromDay: number;
    readonly toDay: number;
    readonly everyDays?: number;
  },
): number | undefined {
  for (let days = plan.fromDay; days <= plan.toDay; days += plan.everyDays ?? 1) {
    const rise = surestRise(looks(days) ?? [], {
      pickupAmps: plan.pickupAmps,
      nearRatio: NEAR_RATIO,
      horizonDays: HORIZON_DAYS,
      markDay: undefined,
    });
    if (rise?.verdict.kind === 'creep') return days - 1;
  }
  return undefined;
}

/** Levels that stay what they were when later days come. */
export const looksAt =
  (levels: readonly DailyLevel[]): Looks =>
  (days) =>
    levels.slice(Math.max(0, days - HISTORY_DAYS), days);

/**
 * Levels at one load by the load response, which is renewed whenever a week is over: between two such days it is
 * computed once. The hours begin with hour 0.
 */
export function looksAtLoad(hours: readonly HourlyLevel[]): Looks {
  let week = -1;
  let from = 0;
  let levels: readonly DailyLevel[] | undefined;
  return (days) => {
    if (week !== Math.floor(days / 7)) {
      week = Math.floor(days / 7);
      from = Math.max(0, 7 * week - HISTORY_DAYS);
      const response = loadResponse(hours.slice(24 * from, 24 * 7 * week));
      levels = response && levelsAtLoad(hours.slice(24 * from, 24 * 7 * (week + 1)), response);
    }
    return levels?.slice(Math.max(0, days - HISTORY_DAYS - from), days - from);
  };
}

/** Daily levels at the typical load of the first two months, by the composition of those, and that level itself. */
export function referenceLevels(days: readonly CompositionSums[]): {
  readonly levels: readonly DailyLevel[];
  readonly levelAmps: number;
} {
  const first = totalOf(days.slice(0, LEARNING_DAYS))!;
  const fit = { shape: shapeOf(first), coefficients: fittedCoefficients(first)! };
  const point = typicalPoint(first)!;
  const dated = days.map((sums, day) => ({ day, sums }));
  return { levels: levelsAtReferenceLoad(dated, fit, point), levelAmps: levelAtPointAmps(fit, point) };
}

/** A 400 A line that creeps by 1 A a month at its mean load from an unknown day on, in any direction of D. */
export interface CreepingLine {
  readonly truth: LineTruth;
  readonly onsetDay: number;
  /** How much the near mark lies above the level of the first two months, amperes: met 4 to 12 months after. */
  readonly nearAboveAmps: number;
}

export function creepingLine(seed: number): CreepingLine {
  const random = uniform(seed * 15485863 + 3);
  const between = (low: number, high: number) => low + (high - low) * random();
  const onsetDay = Math.round(between(LEARNING_DAYS, 300));
  const loadShare = between(0.3, 0.55);
  const settled: LineTruth = {
    seed: seed + 5000,
    ratingAmps: 400,
    voltageKv: 110 / Math.sqrt(3),
    susceptanceMillisiemens: between(0.02, 0.06),
    mismatch: { re: between(-0.015, 0.015), im: between(-0.01, 0.01) },
    loadShare,
    seasonShare: between(0, 0.3),
    growthShareAYear: between(0, 0.1),
    noiseShare: between(0.0003, 0.0012),
  };
  const perAmp = mismatchPerAmp(settled);
  const truth: LineTruth = {
    ...settled,
    mismatchChange: (hour) => {
      const amps = Math.max(0, hour / 24 - onsetDay) / (365.25 / 12);
      return { re: perAmp.re * amps, im: perAmp.im * amps };
    },
  };
  return { truth, onsetDay, nearAboveAmps: between(4, 12) };
}

/** The change of e that raises the differential at mean load by 1 A: along D, whichever way D points. */
function mismatchPerAmp({ loadShare, ratingAmps, mismatch: e, ...truth }: LineTruth): Pair {
  const amps = 0.95 * loadShare * ratingAmps;
  const charging = truth.susceptanceMillisiemens * truth.voltageKv;
  const second = { re: -amps * Math.cos(0.2), im: charging + amps * Math.sin(0.2) };
  const d = { re: e.re * second.re - e.im * second.im, im: charging + e.re * second.im + e.im * second.re };
  const size = Math.hypot(d.re, d.im) * (second.re ** 2 + second.im ** 2);
  return {
    re: (d.re * second.re + d.im * second.im) / size,
    im: (d.im * second.re - d.re * second.im) / size,
  };
}
