import { firstOrder, varianceRatioOfAr1 } from './autocorrelation';
import { forecastDates } from './forecast';
import type { Drift, ForecastDates } from './forecast';
import { hamedRao } from './hamed-rao';
import { mannKendall, mannKendallFrom } from './mann-kendall';
import { detrended, senSlope, senSlopeValue } from './sen-slope';
import type { SeriesPoint } from './sen-slope';

/** The standing level of one phase on one day, amperes rms primary. Days may be missing in between. */
export interface DailyLevel {
  /** Days since the epoch, in whole numbers. */
  readonly day: number;
  readonly levelAmps: number;
}

export interface CreepLimits {
  readonly pickupAmps: number;
  /** The near mark as a ratio of the pickup. */
  readonly nearRatio: number;
  /** A drift that reaches the near mark later than this is within margin. */
  readonly horizonDays: number;
  /** A trend is significant below this two-sided probability; 0.01 unless given. */
  readonly pMost?: number;
  /** Fewer daily levels than this yield no verdict; 10 unless given. */
  readonly daysLeast?: number;
}

/** A trend of daily levels, with where it leads. Amperes are rms primary, days count from the epoch. */
export interface CreepTrend extends Drift {
  readonly pTwoSided: number;
  /** How many daily levels it was taken from. */
  readonly days: number;
  /** Level of the Sen line on the last day. */
  readonly levelNowAmps: number;
  readonly near: ForecastDates;
  readonly pickup: ForecastDates;
}

/**
 * `creep`: a significant rise that reaches the near mark within the horizon. `within margin`: a significant
 * rise that does not. `no trend`: no significant rise; nothing is projected then.
 */
export type CreepVerdict =
  | { readonly kind: 'too few days'; readonly days: number; readonly daysNeeded: number }
  | ({ readonly kind: 'no trend' | 'within margin' | 'creep' } & CreepTrend);

const P_MOST = 0.01;

const NO_DRIFT: Drift = { slopeAmpsPerDay: 0, slopeLowAmpsPerDay: 0, slopeHighAmpsPerDay: 0 };

/** With fewer values than this, no slope between two of them is a 95 % limit. */
const LIMITS_DAYS_LEAST = 5;

/**
 * Whether the daily levels of one phase, in ascending order of days, creep towards the pickup: Mann–Kendall
 * with allowance for autocorrelation for the significance, Theil–Sen with Gilbert's 95 % limits for the drift.
 * Throws for a level that is not a number and for days out of order.
 */
export function creepVerdict(levels: readonly DailyLevel[], limits: CreepLimits): CreepVerdict {
  const series = seriesOf(levels);
  const daysNeeded = daysNeededOf(limits);
  const last = levels.at(-1);
  const plainSlope = senSlopeValue(series);
  if (levels.length < daysNeeded || last === undefined || plainSlope === undefined) {
    return { kind: 'too few days', days: levels.length, daysNeeded };
  }
  const { pTwoSided, varianceRatio } = significance(series, plainSlope);
  const found = senSlope(series, { varianceRatio });
  if (found?.limits === undefined) return { kind: 'too few days', days: levels.length, daysNeeded };
  const {
    slope,
    intercept,
    limits: { low, high },
  } = found;
  const drift = { slopeAmpsPerDay: slope, slopeLowAmpsPerDay: low, slopeHighAmpsPerDay: high };
  const isRising = slope > 0 && pTwoSided < (limits.pMost ?? P_MOST);
  const levelNowAmps = intercept + slope * last.day;
  const forecast = (targetAmps: number) =>
    forecastDates(isRising ? drift : NO_DRIFT, { lastDay: last.day, levelNowAmps, targetAmps });
  const near = forecast(limits.nearRatio * limits.pickupAmps);
  const pickup = forecast(limits.pickupAmps);
  const kind = isRising ? kindOfRise(near, last.day + limits.horizonDays) : 'no trend';
  return { kind, ...drift, pTwoSided, days: levels.length, levelNowAmps, near, pickup };
}

/** Fewer levels than this yield no verdict. */
export const daysNeededOf = ({ daysLeast = 10 }: Pick<CreepLimits, 'daysLeast'>): number =>
  Math.max(daysLeast, LIMITS_DAYS_LEAST);

const seriesOf = (levels: readonly DailyLevel[]): SeriesPoint[] =>
  levels.map(({ day, levelAmps }) => ({ time: day, value: levelAmps }));

/**
 * The two-sided probability with which `creepVerdict` finds these levels to rise; `undefined` where they fall or stay.
 * Far cheaper than the verdict.
 */
export function pOfRise(levels: readonly DailyLevel[]): number | undefined {
  const series = seriesOf(levels);
  const slope = senSlopeValue(series);
  return slope !== undefined && slope > 0 ? significance(series, slope).pTwoSided : undefined;
}

function kindOfRise(near: ForecastDates, horizonDay: number): 'creep' | 'within margin' {
  return near.likelyDay !== undefined && near.likelyDay <= horizonDay ? 'creep' : 'within margin';
}

/**
 * How sure a trend of the series is, autocorrelation allowed for: variance of S over that of independent values, the
 * greater of what Hamed and Rao's correction and a first-order autoregressive model of the detrended series say, and
 * the two-sided p with it. A correction may take evidence away and never add any: on uncorrelated noise Hamed and
 * Rao's alone would find a trend about three times as often as p says, since some lags look negatively correlated by
 * chance; and on noise that lasts for days it leaves out lags that a short series can't show to be significant, which
 * the first-order model carries on.
 */
function significance(
  series: readonly SeriesPoint[],
  slope: number,
): { readonly pTwoSided: number; readonly varianceRatio: number } {
  const plain = mannKendall(series.map((point) => point.value));
  if (plain === undefined) return { pTwoSided: 1, varianceRatio: 1 };
  const rho = firstOrder(detrended(series, slope))?.rho ?? 0;
  const varianceRatio = Math.max(
    varianceRatioOfAr1(rho, plain.count),
    hamedRao(series, slope)?.varianceRatio ?? 1,
  );
  const varianceS = plain.varianceS * varianceRatio;
  return { pTwoSided: mannKendallFrom({ ...plain, varianceS }).pTwoSided, varianceRatio };
}
