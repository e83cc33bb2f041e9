/**
 * What theory says a scheme does with the currents of two terminals, from the definitions and with the plant's own
 * complex arithmetic: nothing of the product's. Verdicts of fault cases are taken from here and from reasoning.
 */
import { add, angleRad, type Complex, magnitude } from '../../simulator/plant/complex';
import type { Adaptive } from '../../src/protection/adaptive';
import type { AlphaPlane } from '../../src/protection/alpha-plane';
import type { PhaseComparison } from '../../src/protection/phase-comparison';
import type { TwoSlope } from '../../src/protection/two-slope';

export type Verdict = 'operates' | 'restrains';
export type Ends = readonly [Complex, Complex];

const verdict = (operates: boolean): Verdict => (operates ? 'operates' : 'restrains');

/** Degrees between the second current and the first one, from 0 to 180. */
function betweenDeg([first, second]: Ends): number {
  const apart = Math.abs(angleRad(second) - angleRad(first)) * (180 / Math.PI);
  return apart > 180 ? 360 - apart : apart;
}

const differential = ([first, second]: Ends): number => magnitude(add(first, second));

/** On half the sum of both magnitudes, the first slope from zero. */
export function twoSlopeVerdict(settings: TwoSlope, ends: Ends): Verdict {
  const { pickupAmps, slope1, kneeAmps, slope2 } = settings;
  const restraint = (magnitude(ends[0]) + magnitude(ends[1])) / 2;
  const upToKnee = Math.max(pickupAmps, slope1 * Math.min(restraint, kneeAmps));
  return verdict(differential(ends) >= upToKnee + slope2 * Math.max(0, restraint - kneeAmps));
}

/** At 50 Hz, where a millisecond is 18°. */
export function adaptiveVerdict(settings: Adaptive, ends: Ends): Verdict {
  const chord = 2 * Math.sin((((settings.timeErrorMs * 18) / 2) * Math.PI) / 180);
  const explained = settings.ctErrors.map(({ errorBelow, errorAbove, limitAmps }, index) => {
    const amps = magnitude(ends[index]!);
    return ((amps > limitAmps ? errorAbove : errorBelow) + chord) * amps;
  });
  return verdict(differential(ends) >= settings.pickupAmps + explained[0]! + explained[1]!);
}

export function alphaPlaneVerdict({ pickupAmps, radius, angleDeg }: AlphaPlane, ends: Ends): Verdict {
  const [less, more] = ends.map(magnitude).sort((one, other) => one - other);
  const isWithinRadius = more! <= radius * less!;
  const isWithinAngle = 180 - betweenDeg(ends) <= angleDeg / 2;
  return verdict(differential(ends) >= pickupAmps && !(isWithinRadius && isWithinAngle));
}

export function phaseComparisonVerdict(settings: PhaseComparison, ends: Ends): Verdict {
  const isReleased = Math.min(...ends.map(magnitude)) >= settings.releaseAmps;
  return verdict(isReleased && 180 - betweenDeg(ends) >= settings.toleranceDeg);
}
