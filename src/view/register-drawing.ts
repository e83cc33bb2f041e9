import type { AlphaPlane } from '../protection/alpha-plane';
import {
  characteristicPath,
  characteristicProblems,
  isThresholdCharacteristic,
  pickupAmps,
  type Characteristic,
  type ThresholdCharacteristic,
} from '../protection/characteristic';
import type { PhaseComparison } from '../protection/phase-comparison';
import { ampsText } from './figures';

export type Point = readonly [number, number];

/** A threshold over restraint as pixels, and where its labels stand. */
export interface ThresholdCurve {
  readonly points: readonly Point[];
  readonly pickupY: number;
  readonly pickupLabel: string;
  /** undefined where there is one slope only */
  readonly kneeX: number | undefined;
  readonly kneeLabel: string;
}

/** A region around 180° as the corners of a polygon in pixels, with what it is in words. */
export interface PlaneRegion {
  readonly points: readonly Point[];
  readonly label: string;
  /** the outermost point on the negative real axis, and what to write there */
  readonly mark: { readonly at: Point; readonly text: string };
}

/** One or two characteristics of like kind in one frame, in the order given. */
export type SchemeDrawing =
  | {
      readonly kind: 'threshold';
      readonly curves: readonly ThresholdCurve[];
      readonly restraintLabel: string;
    }
  | {
      readonly kind: 'alpha-plane' | 'phase-comparison';
      readonly centre: Point;
      /** pixels of a ratio of 1, or of the circle that the angles are drawn in */
      readonly unit: number;
      readonly regions: readonly PlaneRegion[];
    };

export interface DrawingBox {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly bottom: number;
}

/**
 * Undefined while one of the characteristics is not one that a scheme can have, and where they are of kinds that
 * have no plane in common.
 */
export function schemeDrawing(
  characteristics: readonly Characteristic[],
  box: DrawingBox,
): SchemeDrawing | undefined {
  if (characteristics.some((one) => characteristicProblems(one).length > 0)) return undefined;
  const thresholds = characteristics.filter(isThresholdCharacteristic);
  const alphas = characteristics.filter((one) => one.kind === 'alpha-plane');
  const comparisons = characteristics.filter((one) => one.kind === 'phase-comparison');
  const whole = characteristics.length;
  if (whole === 0) return undefined;
  // Two-slope and adaptive restraint currents are different quantities: no axis is common to them
  const isOneKind = new Set(characteristics.map(({ kind }) => kind)).size === 1;
  if (thresholds.length === whole && isOneKind) return thresholdDrawing(thresholds, box);
  if (alphas.length === whole) return alphaDrawing(alphas, box);
  return comparisons.length === whole ? sectorDrawing(comparisons, box) : undefined;
}

function thresholdDrawing(thresholds: readonly ThresholdCharacteristic[], box: DrawingBox): SchemeDrawing {
  const restraintAmpsMax = Math.max(...thresholds.map(restraintAmpsShown));
  const paths = thresholds.map((one) => characteristicPath(one, restraintAmpsMax));
  const thresholdAmpsMax = 1.12 * Math.max(...paths.map((path) => path[path.length - 1]!.thresholdAmps));
  const x = (amps: number) => box.left + (amps / restraintAmpsMax) * (box.width - box.left);
  const y = (amps: number) => (1 - amps / thresholdAmpsMax) * (box.height - box.bottom);
  const curves = thresholds.map((one, index) => ({
    points: paths[index]!.map((point) => [x(point.restraintAmps), y(point.thresholdAmps)] as const),
    pickupY: y(pickupAmps(one)),
    pickupLabel: ampsText(pickupAmps(one)),
    kneeX: kneeAmps(one) > 0 ? x(kneeAmps(one)) : undefined,
    kneeLabel: ampsText(kneeAmps(one)),
  }));
  return { kind: 'threshold', curves, restraintLabel: ampsText(restraintAmpsMax) };
}

const kneeAmps = (one: ThresholdCharacteristic): number => (one.kind === 'two-slope' ? one.kneeAmps : 0);

function restraintAmpsShown(one: ThresholdCharacteristic): number {
  if (one.kind === 'adaptive') return 6 * one.pickupAmps;
  const cornerAmps = one.slopeStart === 'from-zero' && one.slope1 > 0 ? one.pickupAmps / one.slope1 : 0;
  return 1.6 * Math.max(one.kneeAmps, cornerAmps, 2 * one.pickupAmps);
}

function alphaDrawing(planes: readonly AlphaPlane[], box: DrawingBox): SchemeDrawing {
  const frame = planeFrame(box);
  const unit = frame.reach / Math.max(...planes.map(({ radius }) => radius));
  const regions = planes.map(({ radius, angleDeg }) => ({
    points: sectorPoints(frame.centre, { inner: unit / radius, outer: unit * radius, halfDeg: angleDeg / 2 }),
    label: `radius ${radius}, angle ${angleDeg}°`,
    mark: { at: [frame.centre[0] - unit * radius, frame.centre[1]] as const, text: String(radius) },
  }));
  return { kind: 'alpha-plane', centre: frame.centre, unit, regions };
}

function sectorDrawing(comparisons: readonly PhaseComparison[], box: DrawingBox): SchemeDrawing {
  const { centre, reach: unit } = planeFrame(box);
  const regions = comparisons.map(({ toleranceDeg, releaseAmps }) => ({
    points: sectorPoints(centre, { inner: 0, outer: unit, halfDeg: toleranceDeg }),
    label: `within ${toleranceDeg}° of opposition, release ${ampsText(releaseAmps)}`,
    mark: { at: [centre[0] - unit, centre[1]] as const, text: `±${toleranceDeg}°` },
  }));
  return { kind: 'phase-comparison', centre, unit, regions };
}

const planeFrame = ({ width, height }: DrawingBox): { centre: Point; reach: number } => ({
  centre: [width / 2, height / 2],
  reach: 0.44 * height,
});

/** Straight pieces this short look round, and a full circle needs no case of its own. */
const ARC_STEP_DEG = 3;

function sectorPoints(
  [centreX, centreY]: Point,
  { inner, outer, halfDeg }: { inner: number; outer: number; halfDeg: number },
): Point[] {
  const steps = Math.max(1, Math.ceil((2 * halfDeg) / ARC_STEP_DEG));
  const angles = Array.from({ length: steps + 1 }, (_, step) => 180 - halfDeg + (2 * halfDeg * step) / steps);
  const at = (radius: number) => (angleDeg: number) => {
    const angleRad = (angleDeg * Math.PI) / 180;
    return [centreX + radius * Math.cos(angleRad), centreY - radius * Math.sin(angleRad)] as const;
  };
  return [...angles.map(at(outer)), ...angles.toReversed().map(at(inner))];
}
