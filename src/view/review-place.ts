import type { PlaneKind } from '../contract/review';
import type { CharacteristicOnWire } from '../contract/settings-version';
import type { Evaluated } from '../protection/evaluation';
import { magnitude } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';

/** A place on a scheme's plane, in the plane's own two measures (see `planeKindSchema`). */
export interface ReviewPlace {
  readonly x: number;
  readonly y: number;
}

const DEG = Math.PI / 180;

/** The plane that fits a kind of characteristic. */
export function planeKind(kind: CharacteristicOnWire['kind']): PlaneKind {
  return kind === 'alpha-plane' || kind === 'phase-comparison' ? kind : 'restraint';
}

/** Where an evaluated phase lies; undefined where a current is too small to have a place. */
export function reviewPlace(
  { differentialAmps, restraintAmps, region }: Evaluated,
  currents: readonly Phasor[],
): ReviewPlace | undefined {
  if (region === undefined) {
    return restraintAmps === undefined ? undefined : { x: restraintAmps, y: differentialAmps };
  }
  if (region.kind === 'alpha-plane') {
    return { x: Math.log(region.ratio), y: fromOpposition(region.angleRad) / DEG };
  }
  return { x: Math.min(...currents.map(magnitude)), y: region.deviationRad / DEG };
}

/** How far an angle is from 180°, radians from −π to π, positive counter-clockwise. */
export function fromOpposition(angleRad: number): number {
  return angleRad > 0 ? angleRad - Math.PI : angleRad + Math.PI;
}
