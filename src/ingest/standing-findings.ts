import type { Creep, ForecastDatesOnWire } from '../contract/warning';
import { pickupAmps } from '../protection/characteristic';
import { perPhase, PHASES, type PhaseName } from '../protection/phase';
import { creepVerdict } from '../standing/creep';
import type { ForecastDates } from '../standing/forecast';
import { standingLevel24h } from '../standing/level';
import type { Store } from '../store/client';
import { type LevelRow, readLevels } from '../store/levels';
import type { StandingFindings } from './line-watch';
import { type RosterLine, versionInForce } from './roster';
import { RUNG_MS, rungStart } from './rung';

const DAY_MS = RUNG_MS.day;
/** how far back the daily levels are searched for a drift */
const HISTORY_DAYS = 365;
const HORIZON_DAYS = 365;
const DAYS_A_MONTH = 365.25 / 12;

/** What a line's levels say: its 24-hour standing levels, and the significant drifts of its daily ones. */
export async function readStandingFindings(
  store: Store,
  line: RosterLine,
  { nowMs, nearRatio }: { nowMs: number; nearRatio: number },
): Promise<StandingFindings> {
  const to = new Date(nowMs);
  const hours = await readLevels(store, 'hour', { lineIds: [line.id], from: new Date(nowMs - DAY_MS), to });
  const days = await readLevels(store, 'day', {
    lineIds: [line.id],
    from: new Date(rungStart('day', nowMs) - HISTORY_DAYS * DAY_MS),
    // today is not over: its level would be that of a part of the load cycle
    to: new Date(rungStart('day', nowMs)),
  });
  const inForce = versionInForce(line, nowMs);
  const pickup = inForce && pickupAmps(inForce.scheme.characteristic);
  return {
    levelAmps: perPhase((phase) => standingLevel24h(mediansOf(hours, phase))),
    creep:
      pickup === undefined || line.obstacle !== undefined
        ? []
        : PHASES.flatMap((phase) => creepOf(days, phase, { pickupAmps: pickup, nearRatio }) ?? []),
  };
}

function mediansOf(rows: readonly LevelRow[], phase: PhaseName): number[] {
  return rows.flatMap((row) => (row.phase === phase && row.medianAmps !== null ? [row.medianAmps] : []));
}

function creepOf(
  days: readonly LevelRow[],
  phase: PhaseName,
  { pickupAmps, nearRatio }: { pickupAmps: number; nearRatio: number },
): Creep | undefined {
  const levels = days.flatMap((row) =>
    row.phase === phase && row.medianAmps !== null
      ? [{ day: row.start.getTime() / DAY_MS, levelAmps: row.medianAmps }]
      : [],
  );
  const verdict = creepVerdict(levels, { pickupAmps, nearRatio, horizonDays: HORIZON_DAYS });
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

const datesOnWire = ({ earliestDay, likelyDay, latestDay }: ForecastDates): ForecastDatesOnWire => ({
  earliest: dateOfDay(earliestDay),
  likely: dateOfDay(likelyDay),
  latest: dateOfDay(latestDay),
});

const dateOfDay = (day: number | undefined): string | null =>
  day === undefined ? null : new Date(Math.round(day) * DAY_MS).toISOString().slice(0, 10);
