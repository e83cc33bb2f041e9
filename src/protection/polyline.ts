/** A point of a threshold curve: restraint current and the threshold there, both amperes rms primary. */
export interface ThresholdPoint {
  readonly restraintAmps: number;
  readonly thresholdAmps: number;
}

/**
 * A threshold that grows with restraint in straight pieces, none flatter than the one before (convex).
 *
 * The first vertex lies at zero restraint, vertices ascend strictly in restraint, and beyond the last one the
 * threshold rises by `finalSlope` amperes per ampere for ever. A piece can be flat only at the height of the
 * first vertex, which is the pickup.
 */
export interface ThresholdPolyline {
  readonly vertices: readonly [ThresholdPoint, ...ThresholdPoint[]];
  readonly finalSlope: number;
}

/** Threshold in amperes at a restraint current in amperes. Throws unless that is finite and zero or more. */
export function polylineThresholdAmps(polyline: ThresholdPolyline, restraintAmps: number): number {
  if (!(restraintAmps >= 0 && restraintAmps < Infinity)) {
    throw new RangeError(`A restraint current is finite and at least 0 A, which ${restraintAmps} is not.`);
  }
  let start = polyline.vertices[0];
  for (const end of polyline.vertices) {
    if (restraintAmps < end.restraintAmps) {
      return start.thresholdAmps + slope(start, end) * (restraintAmps - start.restraintAmps);
    }
    start = end;
  }
  return start.thresholdAmps + polyline.finalSlope * (restraintAmps - start.restraintAmps);
}

/**
 * The restraint current in amperes at which the threshold is `thresholdAmps`: the inverse of the curve.
 * `undefined` where no single restraint answers: below the pickup, at the height of a flat piece, and above a
 * curve that never rises.
 */
export function polylineRestraintAmps(
  polyline: ThresholdPolyline,
  thresholdAmps: number,
): number | undefined {
  let start = polyline.vertices[0];
  if (!(thresholdAmps >= start.thresholdAmps)) return undefined;
  for (const end of polyline.vertices.slice(1)) {
    if (thresholdAmps <= end.thresholdAmps) {
      return restraintOnPiece(start, slope(start, end), thresholdAmps);
    }
    start = end;
  }
  return restraintOnPiece(start, polyline.finalSlope, thresholdAmps);
}

/** The vertices up to `restraintAmpsMax`, closed by the point of the curve there: what a chart draws. */
export function polylinePath(polyline: ThresholdPolyline, restraintAmpsMax: number): ThresholdPoint[] {
  const before = polyline.vertices.filter((vertex) => vertex.restraintAmps < restraintAmpsMax);
  const thresholdAmps = polylineThresholdAmps(polyline, restraintAmpsMax);
  return [...before, { restraintAmps: restraintAmpsMax, thresholdAmps }];
}

function slope(start: ThresholdPoint, end: ThresholdPoint): number {
  return (end.thresholdAmps - start.thresholdAmps) / (end.restraintAmps - start.restraintAmps);
}

function restraintOnPiece(start: ThresholdPoint, slope: number, thresholdAmps: number): number | undefined {
  return slope > 0 ? start.restraintAmps + (thresholdAmps - start.thresholdAmps) / slope : undefined;
}
