import type { Complex } from './complex';
import { shrunkCoefficients } from './composition-fit';
import type { SumsShape } from './composition-sums';
import { watchedCreep } from './creep-watch';
import type { WatchedCreep } from './creep-watch';
import type { DaySums } from './reference-level';

/** Utilisation by a day's composition: at emergency rating, say, where it counts most. */
export interface DailyUtilisation {
  readonly day: number;
  readonly utilisation: number;
}

export interface UtilisationPlan {
  /** The composition of a longer window, towards which each day's is drawn where the day can't tell. */
  readonly fit: { readonly shape: SumsShape; readonly coefficients: readonly Complex[] };
  /** Utilisation of the scheme as a ratio (1 operates) by coefficients in the order of the fit's; `undefined` where it can't be computed. */
  readonly utilisationOf: (coefficients: readonly Complex[]) => number | undefined;
}

/**
 * A point far above the loads of a day magnifies what the day can't tell apart, so that the window weighs more here
 * than it does at reference load.
 */
const WINDOW_WEIGHT = 0.02;

/**
 * Utilisation day by day at a load that the line need not have reached, emergency rating above all: the composition
 * of every day, put to the scheme. Days without snapshots and days for which the scheme can't tell are left out. It
 * holds as far as the composition is straight up to there; saturation is not in it.
 */
export function dailyUtilisation(
  days: readonly DaySums[],
  { fit, utilisationOf }: UtilisationPlan,
): DailyUtilisation[] {
  return days.flatMap(({ day, sums }) => {
    const coefficients = shrunkCoefficients(sums, { prior: fit.coefficients, weight: WINDOW_WEIGHT });
    const utilisation = coefficients && utilisationOf(coefficients);
    return utilisation === undefined ? [] : [{ day, utilisation }];
  });
}

/**
 * Whether such a utilisation creeps, and when it reaches the near mark and 1. The verdict's figures named
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
