import type { TerminalPair } from './generalised-equivalent';
import { angleRad, conjugate, magnitude, multiply } from './phasor';
import type { SettingProblem } from './setting-problem';

/**
 * Alpha plane: the ratio k = I_R / I_L of the two terminals' currents in the complex plane. A through current
 * lies at −1; around it the scheme restrains where 1/R ≤ |k| ≤ R and |arg k − 180°| ≤ A/2. Outside that region
 * it operates, when the differential current has also reached the pickup.
 */
export interface AlphaPlane {
  readonly kind: 'alpha-plane';
  /** least differential current, amperes rms primary */
  readonly pickupAmps: number;
  /** outer radius R of the restraint region; the inner one is 1/R */
  readonly radius: number;
  /** opening A of the restraint region around 180°, degrees */
  readonly angleDeg: number;
}

/** Where a phase lies in the alpha plane: magnitude of k, and its angle in radians above −π up to π. */
export interface AlphaPoint {
  readonly ratio: number;
  readonly angleRad: number;
}

/** Below this share of the pickup a current is too small for its ratio to another to mean anything. */
export const RATIO_FLOOR_SHARE = 0.01;

const RADIUS_MOST = 100;
const HALF_TURN_DEG = 180;

/** k of two currents; `undefined` where either is below 1 % of the pickup. */
export function alphaPoint(settings: AlphaPlane, { local, remote }: TerminalPair): AlphaPoint | undefined {
  const localAmps = magnitude(local);
  const remoteAmps = magnitude(remote);
  if (!(Math.min(localAmps, remoteAmps) >= RATIO_FLOOR_SHARE * settings.pickupAmps)) return undefined;
  return { ratio: remoteAmps / localAmps, angleRad: angleRad(multiply(remote, conjugate(local))) };
}

/**
 * Utilisation as a ratio: min(I_d/P, max(|ln|k||/ln R, |arg k − 180°|/(A/2))), the second term 1 where there is
 * no k. Its border counts to the operate side, as with every characteristic here. Swapping the ends turns k into
 * 1/k, which leaves it.
 */
export function alphaPlaneUtilisation(
  { pickupAmps, radius, angleDeg }: AlphaPlane,
  differentialAmps: number,
  point: AlphaPoint | undefined,
): number {
  const overPickup = differentialAmps / pickupAmps;
  if (point === undefined) return Math.min(overPickup, 1);
  const outward = Math.abs(Math.log(point.ratio)) / Math.log(radius);
  const deviationDeg = ((Math.PI - Math.abs(point.angleRad)) * HALF_TURN_DEG) / Math.PI;
  return Math.min(overPickup, Math.max(outward, deviationDeg / (angleDeg / 2)));
}

/** Everything that is wrong with the settings, at once; empty when they can be evaluated. */
export function alphaPlaneProblems({ pickupAmps, radius, angleDeg }: AlphaPlane): readonly SettingProblem[] {
  const problems: SettingProblem[] = [];
  if (!(pickupAmps > 0 && pickupAmps < Infinity)) {
    problems.push({ field: 'pickupAmps', problem: 'The pickup must be a number of amperes above 0.' });
  }
  if (!(radius > 1 && radius <= RADIUS_MOST)) {
    const problem = `The radius must be a ratio above 1, up to ${RADIUS_MOST}: the region lies between it and its inverse.`;
    problems.push({ field: 'radius', problem });
  }
  if (!(angleDeg > 0 && angleDeg <= 360)) {
    problems.push({
      field: 'angleDeg',
      problem: 'The angle must be a number of degrees above 0, up to 360.',
    });
  }
  return problems;
}
