import { characteristicPath } from '../protection/characteristic';
import type { ThresholdCharacteristic } from '../protection/characteristic';

/** How far the plane is drawn from zero, in the unit shown. */
export interface PlaneWindow {
  readonly restraintMax: number;
  readonly differentialMax: number;
}

export interface PlanePoint {
  readonly restraintAmps: number;
  readonly differentialAmps: number;
}

/** What of the plane is wanted: the points with the first slope, or everything up to past the knee. */
export type PlaneExtent = 'near the points' | 'whole characteristic';

const NICE = [1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10];

/**
 * The window of the plane. It shows every given point with room around it, and of the characteristic either
 * its first slope or all of it. Ends are round figures of the unit shown (`unitAmps`: 1 for amperes, the rating
 * for per unit), so that the window holds still while points wander.
 */
export function planeWindow(
  characteristic: ThresholdCharacteristic | undefined,
  points: readonly PlanePoint[],
  { extent, emergencyAmps, unitAmps }: { extent: PlaneExtent; emergencyAmps: number; unitAmps: number },
): PlaneWindow {
  const pointRestraint = Math.max(0, ...points.map((point) => point.restraintAmps));
  const pointDifferential = Math.max(0, ...points.map((point) => point.differentialAmps));
  const least = characteristic === undefined ? emergencyAmps : shownRestraint(characteristic, extent);
  // The restraint of a sum of errors is no load current, and far below one.
  const loadAmps = characteristic?.kind === 'adaptive' ? 0 : 1.1 * emergencyAmps;
  const wanted = extent === 'near the points' ? least : Math.max(least, loadAmps);
  const restraintMax = roundedUp(Math.max(1.15 * pointRestraint, wanted) / unitAmps);
  const threshold = characteristic === undefined ? 0 : thresholdAt(characteristic, restraintMax * unitAmps);
  const differentialAmps = Math.max(1.2 * pointDifferential, 1.05 * threshold);
  return {
    restraintMax,
    differentialMax: roundedUp(Math.max(differentialAmps / unitAmps, restraintMax / 20)),
  };
}

/** The restraint up to which the first slope, or the whole characteristic, can be seen. */
function shownRestraint(characteristic: ThresholdCharacteristic, extent: PlaneExtent): number {
  // A threshold of 45° has no corner: all that is to be seen of it is that the points lie under it.
  if (characteristic.kind === 'adaptive')
    return (extent === 'near the points' ? 3 : 4) * characteristic.pickupAmps;
  const { pickupAmps, slope1, kneeAmps, slopeStart } = characteristic;
  if (extent === 'whole characteristic') return Math.max(1.5 * kneeAmps, 4 * pickupAmps);
  const slopeFromAmps = slopeStart === 'from-zero' && slope1 > 0 ? pickupAmps / slope1 : 0;
  const stretch = Math.max(1.5 * slopeFromAmps, 3 * pickupAmps);
  return kneeAmps > slopeFromAmps ? Math.min(stretch, 1.1 * kneeAmps) : stretch;
}

function thresholdAt(characteristic: ThresholdCharacteristic, restraintAmps: number): number {
  const path = characteristicPath(characteristic, restraintAmps);
  return path[path.length - 1]?.thresholdAmps ?? 0;
}

function roundedUp(value: number): number {
  if (!(value > 0)) return 1;
  const decade = 10 ** Math.floor(Math.log10(value));
  const nice = NICE.find((step) => step * decade >= value * (1 - 1e-9)) ?? 10;
  return nice * decade;
}
