import type { Complex } from './complex';
import { shrunkCoefficients } from './composition-fit';
import type { SumsShape } from './composition-sums';
import { watchedCreep } from './creep-watch';
import type { WatchedCreep } from './creep-watch';
import { predictedDifferentialAmps } from './operating-point';
import type { CompositionPoint } from './operating-point';
import type { DaySums } from './reference-level';

/** A point of the line with the differential that a composition predicts there, amperes rms. */
export interface PredictedPoint extends CompositionPoint {
  readonly differentialAmps: Complex;
}

/** Utilisation of the scheme at a point, as a ratio (1 operates); `undefined` where it can't be computed. */
export type UtilisationOf = (point: PredictedPoint) => number | undefined;

/** The greatest utilisation over some points (emergency rating at several power factors), by a day's composition. */
export interface DailyUtilisation {
  readonly day: number;
  readonly utilisation: number;
}

export interface UtilisationPlan {
  /** The composition of a longer window, towards which each day's is drawn where the day can't tell. */
  readonly fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] };
  /** Where utilisation is asked for; the greatest counts. */
  readonly points: readonly CompositionPoint[];
  readonly utilisationOf: UtilisationOf;
}

/**
 * A point far above the loads of a day magnifies what the day can't tell apart, so that the window weighs more here
 * than it does at reference load.
 */
const WINDOW_WEIGHT = 0.02;

/**
 * Utilisation day by day at points that the line need not have reached, emergency rating above all: the composition
 * of every day, taken at the points and put to the scheme. Days without snapshots and days for which the scheme can't
 * tell are left out. It holds as far as the composition is straight up to there; saturation is not in it.
 */
export function dailyUtilisation(days: readonly DaySums[], plan: UtilisationPlan): DailyUtilisation[] {
  return days.flatMap(({ day, sums }) => {
    const coefficients = shrunkCoefficients(sums, {
      prior: plan.fit.coefficients,
      weight: WINDOW_WEIGHT,
    });
    if (coefficients === undefined) return [];
    const utilisation = greatestUtilisation({ shape: plan.fit.shape, coefficients }, plan);
    return utilisation === undefined ? [] : [{ day, utilisation }];
  });
}

/** The greatest utilisation over the points by one composition, as a ratio; `undefined` where none can be told. */
export function greatestUtilisation(
  fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] },
  { points, utilisationOf }: Pick<UtilisationPlan, 'points' | 'utilisationOf'>,
): number | undefined {
  let greatest: number | undefined;
  for (const point of points) {
    const utilisation = utilisationOf({ ...point, differentialAmps: predictedDifferentialAmps(fit, point) });
    if (utilisation !== undefined && !(greatest !== undefined && greatest >= utilisation)) {
      greatest = utilisation;
    }
  }
  return greatest;
}

/**
 * Whether utilisation at those points creeps, and when it reaches the near mark and 1. The verdict's figures named
 * in amperes are ratios of the threshold here, and its pickup is a utilisation of 1.
 */
export function watchedUtilisation(
  utilisations: readonly DailyUtilisation[],
  plan: {
    readonly nearRatio: number;
    readonly horizonDays: number;
    readonly markDays: readonly number[];
  },
): WatchedCreep {
  const levels = utilisations.map(({ day, utilisation }) => ({ day, levelAmps: utilisation }));
  return watchedCreep(levels, { ...plan, pickupAmps: 1 });
}
