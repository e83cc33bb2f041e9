import type { StandingVerdict } from '../../contract/standing';
import type { Creep, ForecastDatesOnWire } from '../../contract/warning';
import type { PhaseName } from '../../protection/phase';
import type { CreepVerdict } from '../../standing/creep';
import type { ForecastDates } from '../../standing/forecast';
import { dateOfDay } from '../../view/day-sums';

const DAYS_A_MONTH = 365.25 / 12;

/** A significant drift as it is published; undefined for a verdict that finds none. */
export function creepOnWire(verdict: CreepVerdict, phase: PhaseName): Creep | undefined {
  if (verdict.kind === 'too few days' || verdict.kind === 'no trend') return undefined;
  return {
    phase,
    verdict: verdict.kind,
    slopeAmpsPerMonth: verdict.slopeAmpsPerDay * DAYS_A_MONTH,
    slopeLowAmpsPerMonth: verdict.slopeLowAmpsPerDay * DAYS_A_MONTH,
    slopeHighAmpsPerMonth: verdict.slopeHighAmpsPerDay * DAYS_A_MONTH,
    pTwoSided: verdict.pTwoSided,
    days: verdict.days,
    levelNowAmps: verdict.levelNowAmps,
    near: datesOnWire(verdict.near),
    pickup: datesOnWire(verdict.pickup),
  };
}

/** The significant drift of utilisation at emergency rating; its verdict is in ratios where another's is in amperes. */
export function emergencyCreepOnWire(
  verdict: CreepVerdict,
): NonNullable<StandingVerdict['emergencyCreep']> | undefined {
  if (verdict.kind === 'too few days' || verdict.kind === 'no trend') return undefined;
  return {
    verdict: verdict.kind,
    utilisationNow: verdict.levelNowAmps,
    slopePerMonth: verdict.slopeAmpsPerDay * DAYS_A_MONTH,
    slopeLowPerMonth: verdict.slopeLowAmpsPerDay * DAYS_A_MONTH,
    slopeHighPerMonth: verdict.slopeHighAmpsPerDay * DAYS_A_MONTH,
    near: datesOnWire(verdict.near),
    over: datesOnWire(verdict.pickup),
  };
}

const datesOnWire = ({ earliestDay, likelyDay, latestDay }: ForecastDates): ForecastDatesOnWire => ({
  earliest: dateOrNull(earliestDay),
  likely: dateOrNull(likelyDay),
  latest: dateOrNull(latestDay),
});

const dateOrNull = (day: number | undefined): string | null =>
  day === undefined ? null : dateOfDay(Math.round(day));
