import { adaptivePolyline, adaptiveProblems } from './adaptive';
import type { Adaptive } from './adaptive';
import { alphaPlaneProblems } from './alpha-plane';
import type { AlphaPlane } from './alpha-plane';
import { phaseComparisonProblems } from './phase-comparison';
import type { PhaseComparison } from './phase-comparison';
import { polylinePath, polylineRestraintAmps, polylineThresholdAmps } from './polyline';
import type { ThresholdPoint, ThresholdPolyline } from './polyline';
import type { SettingProblem } from './setting-problem';
import { twoSlopePolyline, twoSlopeProblems } from './two-slope';
import type { TwoSlope } from './two-slope';

/**
 * The recorded characteristic of a scheme. A kind is added as a member here, with its arithmetic in a file of
 * its own; the compiler then names every switch below that has to know it.
 */
export type Characteristic = TwoSlope | Adaptive | AlphaPlane | PhaseComparison;

/** The kinds that weigh the differential current against a threshold over restraint, and so have a curve. */
export type ThresholdCharacteristic = TwoSlope | Adaptive;

/** Whether a characteristic has a threshold over restraint; the others have a region of their own. */
export function isThresholdCharacteristic(
  characteristic: Characteristic,
): characteristic is ThresholdCharacteristic {
  return characteristic.kind === 'two-slope' || characteristic.kind === 'adaptive';
}

/** Threshold in amperes at a restraint current in amperes. Throws unless that is finite and zero or more. */
export function thresholdAmps(characteristic: ThresholdCharacteristic, restraintAmps: number): number {
  return polylineThresholdAmps(polylineOf(characteristic), restraintAmps);
}

/**
 * The restraint current in amperes at which the threshold is `thresholdAmps`. `undefined` where no single
 * restraint answers: below the pickup, and at the height of a flat piece.
 */
export function restraintAmpsAtThreshold(
  characteristic: ThresholdCharacteristic,
  thresholdAmps: number,
): number | undefined {
  return polylineRestraintAmps(polylineOf(characteristic), thresholdAmps);
}

/**
 * Utilisation: differential current over the threshold at the present restraint, as a ratio. The scheme
 * operates exactly when it is 1 or more. Throws for a differential current below zero and for a threshold
 * that is not above zero, which no valid characteristic yields.
 */
export function utilisation(differentialAmps: number, thresholdAmps: number): number {
  if (!(differentialAmps >= 0 && differentialAmps < Infinity && thresholdAmps > 0)) {
    throw new RangeError(`There is no utilisation of ${differentialAmps} A against ${thresholdAmps} A.`);
  }
  return differentialAmps / thresholdAmps;
}

/** The threshold curve from zero restraint to `restraintAmpsMax`, as the points that straight lines join. */
export function characteristicPath(
  characteristic: ThresholdCharacteristic,
  restraintAmpsMax: number,
): ThresholdPoint[] {
  return polylinePath(polylineOf(characteristic), restraintAmpsMax);
}

/**
 * Pickup in amperes: the least differential current at which the scheme can operate at all. `undefined` for a
 * phase comparison, which has a release current at each end and no threshold for the differential current.
 */
export function pickupAmps(characteristic: ThresholdCharacteristic | AlphaPlane): number;
export function pickupAmps(characteristic: Characteristic): number | undefined;
export function pickupAmps(characteristic: Characteristic): number | undefined {
  switch (characteristic.kind) {
    case 'two-slope':
    case 'adaptive':
    case 'alpha-plane':
      return characteristic.pickupAmps;
    case 'phase-comparison':
      return undefined;
  }
}

/** The characteristic in a few words, to stand beside a figure. */
export function characteristicConvention(characteristic: Characteristic): string {
  switch (characteristic.kind) {
    case 'two-slope':
      return `two-slope restraint, first slope ${characteristic.slopeStart === 'from-zero' ? 'from zero' : 'from the pickup'}`;
    case 'adaptive':
      return 'adaptive restraint by the sum of errors';
    case 'alpha-plane':
      return 'alpha plane';
    case 'phase-comparison':
      return 'phase comparison';
  }
}

/** Everything that is wrong with a characteristic, at once; empty when it can be evaluated. */
export function characteristicProblems(characteristic: Characteristic): readonly SettingProblem[] {
  switch (characteristic.kind) {
    case 'two-slope':
      return twoSlopeProblems(characteristic);
    case 'adaptive':
      return adaptiveProblems(characteristic);
    case 'alpha-plane':
      return alphaPlaneProblems(characteristic);
    case 'phase-comparison':
      return phaseComparisonProblems(characteristic);
  }
}

function polylineOf(characteristic: ThresholdCharacteristic): ThresholdPolyline {
  switch (characteristic.kind) {
    case 'two-slope':
      return twoSlopePolyline(characteristic);
    case 'adaptive':
      return adaptivePolyline(characteristic);
  }
}
