import { polylinePath, polylineRestraintAmps, polylineThresholdAmps } from './polyline';
import type { ThresholdPoint, ThresholdPolyline } from './polyline';
import type { SettingProblem } from './setting-problem';
import { twoSlopePolyline, twoSlopeProblems } from './two-slope';
import type { TwoSlope } from './two-slope';

/**
 * The recorded characteristic of a scheme. A kind is added as a member here, with its arithmetic in a file of
 * its own; the compiler then names every switch below that has to know it.
 */
export type Characteristic = TwoSlope;

/** Threshold in amperes at a restraint current in amperes. Throws unless that is finite and zero or more. */
export function thresholdAmps(characteristic: Characteristic, restraintAmps: number): number {
  return polylineThresholdAmps(polylineOf(characteristic), restraintAmps);
}

/**
 * The restraint current in amperes at which the threshold is `thresholdAmps`. `undefined` where no single
 * restraint answers: below the pickup, and at the height of a flat piece.
 */
export function restraintAmpsAtThreshold(
  characteristic: Characteristic,
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
  characteristic: Characteristic,
  restraintAmpsMax: number,
): ThresholdPoint[] {
  return polylinePath(polylineOf(characteristic), restraintAmpsMax);
}

/** Pickup in amperes: the least differential current at which the scheme can operate at all. */
export function pickupAmps(characteristic: Characteristic): number {
  switch (characteristic.kind) {
    case 'two-slope':
      return characteristic.pickupAmps;
  }
}

/** Everything that is wrong with a characteristic, at once; empty when it can be evaluated. */
export function characteristicProblems(characteristic: Characteristic): readonly SettingProblem[] {
  switch (characteristic.kind) {
    case 'two-slope':
      return twoSlopeProblems(characteristic);
  }
}

function polylineOf(characteristic: Characteristic): ThresholdPolyline {
  switch (characteristic.kind) {
    case 'two-slope':
      return twoSlopePolyline(characteristic);
  }
}
