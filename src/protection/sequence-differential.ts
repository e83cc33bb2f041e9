import { magnitude, sum } from './phasor';
import type { Phasor } from './phasor';
import type { PerPhase } from './phase';
import { schemeRestraintAmps } from './scheme';
import type { Conditions, Scheme } from './scheme';
import { symmetricalComponents } from './sequence';
import type { SequencePhasors } from './sequence';

/** The differential current of one sequence, and the restraint of the terminals' currents of that sequence. */
export interface SequenceDifferential {
  /** amperes rms primary, referred to phase a */
  readonly differential: Phasor;
  readonly differentialAmps: number;
  /** amperes rms primary by the scheme's own convention; undefined where it forms no restraint */
  readonly restraintAmps: number | undefined;
}

/**
 * Zero-, positive- and negative-sequence differential currents of a zone from the three phase currents of its
 * terminals (amperes rms primary, positive into the line, in the order that the scheme expects). Throws when
 * there is no terminal.
 */
export function sequenceDifferentials(
  scheme: Scheme,
  terminals: readonly PerPhase<Phasor>[],
  conditions: Conditions,
): Readonly<Record<keyof SequencePhasors, SequenceDifferential>> {
  if (terminals.length === 0)
    throw new RangeError('A line has a sequence differential from one terminal on.');
  const components = terminals.map(symmetricalComponents);
  const balance = (sequence: keyof SequencePhasors): SequenceDifferential => {
    const currents = components.map((terminal) => terminal[sequence]);
    const differential = sum(currents);
    return {
      differential,
      differentialAmps: magnitude(differential),
      restraintAmps: schemeRestraintAmps(scheme, currents, conditions),
    };
  };
  return { zero: balance('zero'), positive: balance('positive'), negative: balance('negative') };
}
