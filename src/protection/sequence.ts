import type { PerPhase } from './phase';
import { multiply, phasorFromPolar, scale, sum } from './phasor';
import type { Phasor } from './phasor';

/** Symmetrical components of three phase quantities, in their unit and referred to phase a. */
export interface SequencePhasors {
  readonly zero: Phasor;
  readonly positive: Phasor;
  readonly negative: Phasor;
}

const ADVANCED_BY_THIRD = phasorFromPolar(1, (2 * Math.PI) / 3);
const DELAYED_BY_THIRD = phasorFromPolar(1, (-2 * Math.PI) / 3);

/**
 * Fortescue's transformation of three phase quantities whose positive rotation is a, b, c: zero sequence
 * (a + b + c)/3, positive (a + α·b + α²·c)/3, negative (a + α²·b + α·c)/3 with α = 1∠120°.
 */
export function symmetricalComponents({ a, b, c }: PerPhase<Phasor>): SequencePhasors {
  const third = (first: Phasor, second: Phasor, last: Phasor) => scale(sum([first, second, last]), 1 / 3);
  return {
    zero: third(a, b, c),
    positive: third(a, multiply(ADVANCED_BY_THIRD, b), multiply(DELAYED_BY_THIRD, c)),
    negative: third(a, multiply(DELAYED_BY_THIRD, b), multiply(ADVANCED_BY_THIRD, c)),
  };
}
