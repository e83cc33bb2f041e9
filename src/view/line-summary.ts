import type { Condition } from '../contract/condition';
import type { LineSummary } from '../contract/lines';
import type { RegisterLine } from '../contract/register';
import type { Result } from '../contract/result';
import type { Creep, Warning } from '../contract/warning';
import { chargingAmps, susceptanceMicrosiemensPerKm } from '../protection/charging';
import { pickupAmps } from '../protection/characteristic';
import { perPhase, PHASES, type PhaseName } from '../protection/phase';
import { standingLevel24h } from '../standing/level';
import type { LevelFigures } from '../store/levels';
import { settingsInForce } from '../store/register';
import { obstacle } from '../warnings/obstacle';

/** What is known of a line beside its register entry. */
export interface LineKnowledge {
  readonly result: Result | undefined;
  /** hour rows of the last 24 hours */
  readonly hours: readonly LevelFigures[];
  /** day rows of the last two months */
  readonly days: readonly LevelFigures[];
  readonly creep: readonly Creep[];
  readonly warnings: readonly Warning[];
  readonly nowMs: number;
  /** a result published longer ago than this says nothing of the present */
  readonly silentAfterMs: number;
  readonly nominalFrequencyHz: number;
}

/** Everything that a list says of one line. */
export function lineSummary(line: RegisterLine, known: LineKnowledge): LineSummary {
  const { result, nowMs } = known;
  const inForce = settingsInForce(line.settings, nowMs);
  return {
    key: line.key,
    name: line.name,
    substations: line.terminals.map(({ substation, substationName }) => ({
      key: substation,
      name: substationName,
    })),
    voltageKv: line.voltageKv,
    kind: line.kind,
    lengthKm: line.lengthKm,
    goesBy: line.goesBy,
    ratingAmps: line.ratingAmps,
    emergencyRatingAmps: line.emergencyRatingAmps,
    owner: line.owner,
    seriesCompensated: line.seriesCompensated,
    inZoneTransformer: line.inZoneTransformer,
    ...standing(line, known),
    at: result?.at ?? null,
    phases: result?.phases ?? perPhase(() => UNKNOWN),
    throughAmps: result?.throughAmps ?? null,
    throughRatio: result?.throughRatio ?? null,
    settingsVersion: inForce?.id ?? null,
    pickupAmps: (inForce && pickupAmps(inForce.characteristic)) ?? null,
    compensation: result?.compensation ?? 'none',
    chargingAmps: expectedChargingAmps(line, known.nominalFrequencyHz),
    lastDay: perPhase((phase) => lastDay(known.hours, phase)),
    dailyLevels: dailyLevels(known.days),
    creep: [...known.creep],
    warnings: [...known.warnings],
  };
}

const UNKNOWN = { differentialAmps: null, restraintAmps: null, thresholdAmps: null, utilisation: null };

/** The condition that the worker published, unless the register says otherwise or the result is too old to speak for now. */
function standing(
  line: RegisterLine,
  { result, nowMs, silentAfterMs }: LineKnowledge,
): { condition: Condition; reason: string | null } {
  const reason = obstacle(line);
  if (reason !== undefined) return { condition: 'not evaluated', reason };
  if (!line.inService)
    return { condition: 'out of service', reason: 'The register says that this line is out of service.' };
  if (result === undefined) return { condition: 'blind', reason: 'Nothing has been heard of this line yet.' };
  const ageMs = nowMs - Date.parse(result.publishedAt);
  if (ageMs > silentAfterMs && result.condition !== 'blind')
    return {
      condition: 'blind',
      reason:
        'No new result has come for this line: the feed, the broker or the worker that computes it is away.',
    };
  return { condition: result.condition, reason: result.reason };
}

function expectedChargingAmps(line: RegisterLine, frequencyHz: number): number | null {
  if (line.capacitanceNfPerKm === null) return null;
  const { capacitanceNfPerKm, lengthKm, voltageKv } = line;
  return chargingAmps({
    susceptanceMicrosiemensPerKm: susceptanceMicrosiemensPerKm(capacitanceNfPerKm, frequencyHz),
    lengthKm,
    voltageKv,
  });
}

/** The band from the lowest hourly 5th to the highest hourly 95th percentile, so that the whole load cycle lies in it. */
function lastDay(hours: readonly LevelFigures[], phase: PhaseName): LineSummary['lastDay'][PhaseName] {
  const own = hours.filter((row) => row.phase === phase);
  const known = (values: readonly (number | null)[]) => values.filter((value) => value !== null);
  const lows = known(own.map(({ p05Amps }) => p05Amps));
  const highs = known(own.map(({ p95Amps }) => p95Amps));
  if (lows.length === 0 || highs.length === 0) return null;
  const standingAmps = standingLevel24h(known(own.map(({ medianAmps }) => medianAmps))) ?? null;
  return { standingAmps, p05Amps: Math.min(...lows), p95Amps: Math.max(...highs) };
}

/** The history in small: of the phase that stands highest on the newest day, so that the curve does not change phase midway. */
function dailyLevels(days: readonly LevelFigures[]): LineSummary['dailyLevels'] {
  const newest = days.findLast(({ medianAmps }) => medianAmps !== null)?.start.getTime();
  const level = (phase: PhaseName) =>
    days.find((row) => row.phase === phase && row.start.getTime() === newest)?.medianAmps ?? 0;
  const highest = PHASES.reduce((most, phase) => (level(phase) > level(most) ? phase : most));
  return days
    .filter((row) => row.phase === highest)
    .map(({ start, medianAmps }) => ({ day: start.toISOString().slice(0, 10), levelAmps: medianAmps }));
}
