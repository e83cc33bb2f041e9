import type { StandingVerdict } from '../../contract/standing';
import type { Creep } from '../../contract/warning';
import type { PhaseName } from '../../protection/phase';
import { throughLoad } from '../../standing/composition-sums';
import { levelsSinceMark, watchedCreep } from '../../standing/creep-watch';
import { typicalPoint } from '../../standing/operating-point';
import { levelsAtReferenceLoad } from '../../standing/reference-level';
import { dailyUtilisation, watchedUtilisation } from '../../standing/utilisation-forecast';
import { creepOnWire, emergencyCreepOnWire } from './creep-on-wire';
import type { ComposedWindow, Composing } from './composed-window';
import { isTold } from './likely-cause';
import { dailyLevels, type LineHistory, rowsOf } from './line-history';
import { emergencyUtilisationOf } from './line-model-of';
import type { SchemeVersion } from '../roster';
import { type MarkDay, markOnWire } from './standing-marks';

const HORIZON_DAYS = 365;

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
  'creep' | 'creepAtReference' | 'emergencyCreep' | 'emergencyUtilisation' | 'driftSince'
>;

const NO_DRIFTS: Drifts = {
  creep: null,
  creepAtReference: null,
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
  const levels = dailyLevels(rowsOf(history.days, phase));
  const creep = creepOnWire(watchedCreep(levels, plan).verdict, phase) ?? null;
  const { markDay } = levelsSinceMark(levels, markDays);
  const since = marks.find(({ day }) => day === markDay);
  return {
    creep,
    creepAtReference: driftAtReference(composing, look, plan),
    ...atEmergency(composing, look, plan),
    driftSince: since === undefined ? null : markOnWire(since),
  };
}

type Plan = Parameters<typeof watchedCreep>[1];

function driftAtReference(
  { days }: Composing,
  { phase, now: { composition, total } }: DriftLook,
  plan: Plan,
): StandingVerdict['creepAtReference'] {
  const point = total && typicalPoint(total);
  const load = total && throughLoad(total);
  if (!isTold(composition) || point === undefined || load === undefined) return null;
  const levels = levelsAtReferenceLoad(days, composition, point);
  const creep = creepOnWire(watchedCreep(levels, plan).verdict, phase);
  return creep === undefined ? null : { creep, referenceThroughAmps: load.meanAmps };
}

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

/** A drift with the growth of load counts only where the load can't be taken out of it. */
export function driftThatCounts({
  creep,
  creepAtReference,
  composition: told,
}: Pick<StandingVerdict, 'creep' | 'creepAtReference' | 'composition'>): Creep | undefined {
  return told.kind === 'separated' ? creepAtReference?.creep : (creep ?? undefined);
}
