import type { StandingVerdict } from '../../contract/standing';
import type { PhaseName } from '../../protection/phase';
import { throughLoad } from '../../standing/composition-sums';
import type { DailyLevel } from '../../standing/creep';
import { levelsSinceMark, watchedCreep } from '../../standing/creep-watch';
import { levelsAtLoad, loadResponse } from '../../standing/load-response';
import { typicalPoint } from '../../standing/operating-point';
import { median } from '../../standing/quantile';
import { levelsAtReferenceLoad } from '../../standing/reference-level';
import { dailyUtilisation, watchedUtilisation } from '../../standing/utilisation-forecast';
import type { LevelRow } from '../../store/levels';
import { creepOnWire, emergencyCreepOnWire } from './creep-on-wire';
import type { ComposedWindow, Composing } from './composed-window';
import { isTold } from './likely-cause';
import { dailyLevels, type LineHistory, rowsOf } from './line-history';
import { emergencyUtilisationOf } from './line-model-of';
import type { SchemeVersion } from '../roster';
import { type MarkDay, markOnWire } from './standing-marks';

const HORIZON_DAYS = 365;
const HOUR_MS = 3_600_000;

/** What a phase's levels are watched for, and by which composition they are brought to one load. */
export interface DriftLook {
  readonly phase: PhaseName;
  readonly nearRatio: number;
  readonly pickupAmps: number | undefined;
  readonly version: SchemeVersion | undefined;
  readonly now: ComposedWindow;
  readonly marks: readonly MarkDay[];
}

type Drifts = Pick<
  StandingVerdict,
  | 'creep'
  | 'creepAtReference'
  | 'loadTakenOutBy'
  | 'measuredCounts'
  | 'emergencyCreep'
  | 'emergencyUtilisation'
  | 'driftSince'
>;

const NO_DRIFTS: Drifts = {
  creep: null,
  creepAtReference: null,
  loadTakenOutBy: null,
  measuredCounts: false,
  emergencyCreep: null,
  emergencyUtilisation: null,
  driftSince: null,
};

/** The drift of a phase's levels as measured, at one and the same load, and of utilisation at emergency rating. */
export function phaseDrifts(composing: Composing, history: LineHistory, look: DriftLook): Drifts {
  const { line } = composing;
  const { phase, nearRatio, pickupAmps, marks } = look;
  if (pickupAmps === undefined || line.obstacle !== undefined) return NO_DRIFTS;
  const markDays = marks.map(({ day }) => day);
  const plan = { pickupAmps, nearRatio, horizonDays: HORIZON_DAYS, markDays };
  const rows = rowsOf(history.days, phase);
  const levels = dailyLevels(rows);
  const creep = creepOnWire(watchedCreep(levels, plan).verdict, phase) ?? null;
  const { markDay } = levelsSinceMark(levels, markDays);
  const since = marks.find(({ day }) => day === markDay);
  const loadless = levelsWithoutLoad(composing, history, look);
  return {
    creep,
    creepAtReference: loadless === undefined ? null : driftAtReference(loadless, look, plan),
    loadTakenOutBy: loadless?.by ?? null,
    measuredCounts: loadless === undefined && creep !== null && isLoadSteady(rows, creep.days),
    ...atEmergency(composing, look, plan),
    driftSince: since === undefined ? null : markOnWire(since),
  };
}

/** Daily levels at one and the same load, and how the load was taken out of them. */
interface LoadlessLevels {
  readonly by: NonNullable<StandingVerdict['loadTakenOutBy']>;
  readonly levels: readonly DailyLevel[];
  readonly referenceThroughAmps: number;
}

/** By the composition where there is one, else by what the magnitudes do with load; undefined where that is not told. */
function levelsWithoutLoad(
  { days }: Composing,
  { hoursOfLoad }: LineHistory,
  { phase, now: { composition, total } }: DriftLook,
): LoadlessLevels | undefined {
  const point = total && typicalPoint(total);
  const load = total && throughLoad(total);
  if (isTold(composition) && point !== undefined && load !== undefined)
    return {
      by: 'composition',
      levels: levelsAtReferenceLoad(days, composition, point),
      referenceThroughAmps: load.meanAmps,
    };
  const hours = hoursOfLoad.flatMap(({ phase: of, start, medianAmps, meanThroughAmps }) =>
    of === phase
      ? [{ hour: start.getTime() / HOUR_MS, levelAmps: medianAmps, throughAmps: meanThroughAmps }]
      : [],
  );
  const response = loadResponse(hours);
  if (response === undefined) return undefined;
  const { referenceAmps } = response;
  return { by: 'magnitudes', levels: levelsAtLoad(hours, response), referenceThroughAmps: referenceAmps };
}

function driftAtReference(
  { levels, referenceThroughAmps }: LoadlessLevels,
  { phase }: DriftLook,
  plan: Plan,
): StandingVerdict['creepAtReference'] {
  const creep = creepOnWire(watchedCreep(levels, plan).verdict, phase);
  return creep === undefined ? null : { creep, referenceThroughAmps };
}

/** Load that changes by less than this from the first third of a span to its last can't be what made a level rise. */
const STEADY_SHARE = 0.03;

function isLoadSteady(rows: readonly LevelRow[], days: number): boolean {
  const loads = rows
    .flatMap(({ medianAmps, meanThroughAmps }) => (medianAmps === null ? [] : (meanThroughAmps ?? [])))
    .slice(-days);
  const third = Math.floor(loads.length / 3);
  const [first, last] = [median(loads.slice(0, third)), median(loads.slice(loads.length - third))];
  if (first === undefined || last === undefined || first === 0) return false;
  return Math.abs(last / first - 1) <= STEADY_SHARE;
}

type Plan = Parameters<typeof watchedCreep>[1];

function atEmergency(
  { line, days }: Composing,
  { version, now: { composition } }: DriftLook,
  plan: Plan,
): Pick<Drifts, 'emergencyCreep' | 'emergencyUtilisation'> {
  const utilisationOf =
    version && isTold(composition)
      ? emergencyUtilisationOf(line.register, version, composition.shape)
      : undefined;
  if (utilisationOf === undefined || !isTold(composition))
    return { emergencyCreep: null, emergencyUtilisation: null };
  const daily = dailyUtilisation(days, { fit: composition, utilisationOf });
  return {
    emergencyUtilisation: utilisationOf(composition.coefficients) ?? null,
    emergencyCreep: emergencyCreepOnWire(watchedUtilisation(daily, plan).verdict) ?? null,
  };
}
