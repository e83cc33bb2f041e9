import type { ReplayPoint } from '../../contract/replay';
import type { Evaluated } from '../../protection/evaluation';
import type { JudgedPoint } from './tally';

const degrees = (angleRad: number): number => (angleRad * 180) / Math.PI;

/** One phase as the worker's evaluation gives it, in the units of the wire. */
export function judgedPoint(point: Evaluated): JudgedPoint {
  return {
    utilisation: point.utilisation,
    differentialAmps: point.differentialAmps,
    restraintAmps: point.restraintAmps ?? null,
    thresholdAmps: point.thresholdAmps ?? null,
    region: point.region === undefined ? null : regionPlace(point.region),
  };
}

function regionPlace(region: NonNullable<Evaluated['region']>): ReplayPoint['region'] {
  switch (region.kind) {
    case 'alpha-plane':
      return { kind: 'alpha-plane', ratio: region.ratio, angleDeg: degrees(region.angleRad) };
    case 'phase-comparison':
      return { kind: 'phase-comparison', deviationDeg: degrees(region.deviationRad) };
  }
}
