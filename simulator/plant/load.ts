import { eachPhase, type Three } from './complex';
import { smoothNoise } from './noise';

/** How a line is loaded over a week; shares are of the line's rating, the rest are ratios of the mean share. */
export type LoadProfile = {
  readonly meanShare: number;
  /** half the swing between night and day */
  readonly dailySwing: number;
  /** how much less it carries at the weekend */
  readonly weekendDip: number;
  /** greatest wander of the load around its curve */
  readonly wander: number;
  /** reactive over active power; positive when the far end draws reactive power */
  readonly tanPhi: number;
  /** terminal from which the power flows: 'first' or 'last' */
  readonly from: 'first' | 'last';
  /** half the swing between summer and winter */
  readonly yearlySwing?: number;
  /** growth a year, compounded; `meanShare` is the mean at the site's epoch */
  readonly growthPerYear?: number;
};

const HOUR_MS = 3_600_000;
const DAY_HOURS = 24;
const YEAR_HOURS = 365.25 * DAY_HOURS;
/** the coldest weeks are in the middle of January */
const PEAK_HOURS = 15 * DAY_HOURS;
/** the network's people live an hour ahead of UTC */
const LOCAL_HOURS = 1;

/**
 * The share of its rating that a line carries at an instant: yearly and weekly shape, growth over the years, and
 * noise that remembers hours.
 */
export function loadShare(
  profile: LoadProfile,
  seed: number,
  { atMs, epochMs }: { readonly atMs: number; readonly epochMs: number },
): number {
  const hours = atMs / HOUR_MS + LOCAL_HOURS;
  const wander =
    0.5 * smoothNoise(seed, hours / 11) +
    0.3 * smoothNoise(seed ^ 1, hours / 2.3) +
    0.15 * smoothNoise(seed ^ 2, hours * 5) +
    0.05 * smoothNoise(seed ^ 3, hours * 200);
  const shape =
    1 + profile.dailySwing * dayCurve(hours) - profile.weekendDip * weekend(hours) + profile.wander * wander;
  return Math.max(
    0.04,
    profile.meanShare * shape * overYears(profile, { hours, sinceEpochMs: atMs - epochMs }),
  );
}

function overYears(
  { yearlySwing = 0, growthPerYear = 0 }: LoadProfile,
  { hours, sinceEpochMs }: { readonly hours: number; readonly sinceEpochMs: number },
): number {
  const season = 1 + yearlySwing * Math.cos((2 * Math.PI * (hours - PEAK_HOURS)) / YEAR_HOURS);
  return season * (1 + growthPerYear) ** (sinceEpochMs / HOUR_MS / YEAR_HOURS);
}

/** Low before dawn, a shoulder in the morning, the peak in the evening; within about −1 to 1. */
function dayCurve(hours: number): number {
  const angleRad = (2 * Math.PI * (hours % DAY_HOURS)) / DAY_HOURS;
  return -0.72 * Math.cos(angleRad - 1.05) + 0.28 * Math.cos(2 * angleRad - 4.2);
}

/** 0 on working days, 1 from Saturday to Sunday, with edges six hours wide. */
function weekend(hours: number): number {
  // The epoch was a Thursday: three days later is the midnight in the middle of a weekend.
  const days = (((hours / DAY_HOURS - 3) % 7) + 7) % 7;
  const fromMiddle = Math.min(days, 7 - days);
  const edge = Math.min(1, Math.max(0, (1.125 - fromMiddle) / 0.25));
  return edge * edge * (3 - 2 * edge);
}

/** what an untransposed line does to its phases, for good */
const UNBALANCE: Three<number> = [1.004, 0.995, 1.001];

/**
 * The load of each phase over the mean of the three, the same at every terminal: single-phase loads come and go, and
 * wander by days and by seasons.
 */
export function loadUnbalance(seed: number, atMs: number): Three<number> {
  const hours = atMs / HOUR_MS;
  return eachPhase((phase) => {
    const own = seed ^ (0x5bd1e995 + phase);
    const wander =
      0.0025 * smoothNoise(own, hours / 7) +
      0.0015 * smoothNoise(own ^ 1, hours / 60) +
      0.0015 * smoothNoise(own ^ 2, hours / 1500);
    return UNBALANCE[phase] + wander;
  });
}
