import { evaluation, isComputable } from './evaluation';
import type { Evaluated, NotComputable } from './evaluation';
import { firstCrossing } from './first-crossing';
import { predictedCurrents } from './line-model';
import type { LineModel, ThroughCurrent } from './line-model';
import type { Conditions, Scheme } from './scheme';

/** What a prediction ranges over. */
export interface LoadRange extends Conditions {
  /** power-factor angles, radians by which the current lags the voltage; power may flow either way at each */
  readonly lagRadLeast: number;
  readonly lagRadMost: number;
}

/** Where a line would stand at a through current, at the worst power-factor angle, direction and mismatch. */
export type PredictedPoint = Evaluated & ThroughCurrent;

/** How much load a scheme lets a line carry. */
export interface Loadability {
  readonly atRating: PredictedPoint;
  readonly atEmergency: PredictedPoint;
  /** least through current at which the utilisation reaches 1; undefined when none up to twice the emergency rating does */
  readonly limitAmps: number | undefined;
  /** predicted points from no load up to the emergency rating, ascending: what a chart draws */
  readonly path: readonly PredictedPoint[];
  readonly basis: LineModel['basis'];
}

const LAG_STEP_RAD = Math.PI / 60;
const LIMIT_STEPS = 100;
const PATH_STEPS = 24;

/**
 * Loadability of one phase from its model: utilisation at rating and at emergency rating, and the least through
 * current at which the scheme would operate. Each figure is the worst over the range of power-factor angles in
 * steps of 3°, both directions of power and all sets of mismatches; ratings in amperes rms primary. Not
 * computable where the scheme is not, with its reason.
 */
export function loadability(
  { scheme, model, range }: { scheme: Scheme; model: LineModel; range: LoadRange },
  { ratingAmps, emergencyRatingAmps }: { ratingAmps: number; emergencyRatingAmps: number },
): Loadability | NotComputable {
  const lags = lagsOf(range);
  const worst = (throughAmps: number) => worstPoint({ scheme, model, range }, throughAmps, lags);
  const path = steps(emergencyRatingAmps, PATH_STEPS).map(worst);
  const [atRating, atEmergency] = [worst(ratingAmps), worst(emergencyRatingAmps)];
  if (!isComputable(atRating)) return atRating;
  if (!isComputable(atEmergency)) return atEmergency;
  const utilisationAt = (throughAmps: number) => {
    const point = worst(throughAmps);
    return isComputable(point) ? point.utilisation : NaN;
  };
  return {
    atRating,
    atEmergency,
    limitAmps: firstCrossing(steps(2 * emergencyRatingAmps, LIMIT_STEPS), utilisationAt),
    path: path.filter((point) => isComputable(point)),
    basis: model.basis,
  };
}

/**
 * The worst point of a line at a through current, amperes rms primary: over the range of power-factor angles in steps
 * of 3°, both directions of power and all sets of mismatches of the model.
 */
export function worstPoint(
  { scheme, model, range }: { scheme: Scheme; model: LineModel; range: LoadRange },
  throughAmps: number,
  lags: readonly number[] = lagsOf(range),
): PredictedPoint | NotComputable {
  let worst: PredictedPoint | undefined;
  for (const mismatches of model.mismatchSets) {
    for (const lagRad of lags) {
      const found = evaluation(scheme, predictedCurrents(model, mismatches, { throughAmps, lagRad }), range);
      if (!isComputable(found)) return found;
      if (worst === undefined || found.utilisation > worst.utilisation) {
        worst = { ...found, throughAmps, lagRad };
      }
    }
  }
  if (worst === undefined) throw new RangeError('A prediction needs a set of mismatches and an angle.');
  return worst;
}

/** The angles of a range in even steps, both ends included, each with power one way and the other. */
function lagsOf({ lagRadLeast, lagRadMost }: LoadRange): number[] {
  const width = lagRadMost - lagRadLeast;
  const count = Math.max(1, Math.ceil(width / LAG_STEP_RAD));
  return Array.from({ length: count + 1 }, (_, index) => lagRadLeast + (width * index) / count).flatMap(
    (lagRad) => [lagRad, lagRad + Math.PI],
  );
}

function steps(most: number, count: number): number[] {
  return Array.from({ length: count + 1 }, (_, index) => (most * index) / count);
}
