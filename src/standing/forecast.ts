/** How fast a level drifts, amperes per day, with the confidence limits of that. */
export interface Drift {
  readonly slopeAmpsPerDay: number;
  readonly slopeLowAmpsPerDay: number;
  readonly slopeHighAmpsPerDay: number;
}

/**
 * The first day on which a level is at its target, as days since the epoch: by the upper limit of its drift,
 * by the drift itself, and by the lower limit. `undefined` means not within five years of the last day.
 */
export interface ForecastDates {
  readonly earliestDay: number | undefined;
  readonly likelyDay: number | undefined;
  readonly latestDay: number | undefined;
}

/** A straight line carried further than this says more about the method than about the line. */
const FORECAST_DAYS_MOST = 5 * 365.25;

/**
 * When a level that drifts on from `levelNowAmps` on `lastDay` reaches `targetAmps`. A level already there has
 * reached it on the last day, whichever way it drifts. The dates span what the slope leaves open; that the
 * level of today is itself an estimate is not in them.
 */
export function forecastDates(
  drift: Drift,
  from: { readonly lastDay: number; readonly levelNowAmps: number; readonly targetAmps: number },
): ForecastDates {
  const missingAmps = from.targetAmps - from.levelNowAmps;
  const dayAt = (slopeAmpsPerDay: number): number | undefined => {
    if (missingAmps <= 0) return from.lastDay;
    if (slopeAmpsPerDay <= 0) return undefined;
    const days = Math.ceil(missingAmps / slopeAmpsPerDay);
    return days <= FORECAST_DAYS_MOST ? from.lastDay + days : undefined;
  };
  return {
    earliestDay: dayAt(drift.slopeHighAmpsPerDay),
    likelyDay: dayAt(drift.slopeAmpsPerDay),
    latestDay: dayAt(drift.slopeLowAmpsPerDay),
  };
}
