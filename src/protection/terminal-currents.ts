/**
 * The currents of one phase at all terminals of a line: amperes rms primary, positive into the line.
 *
 * Kirchhoff's law over the protected zone needs every terminal. No terminals is therefore a mistake of the
 * caller and throws: answering 0 A would show a line that nobody measures as a line in perfect balance.
 */
import { magnitude, sum } from './phasor';
import type { Phasor } from './phasor';

/** Differential current in amperes: the magnitude of the phasor sum of all terminals' currents. */
export function differentialAmps(currents: readonly Phasor[]): number {
  assertMeasured(currents);
  return magnitude(sum(currents));
}

/** Sum of the magnitudes of all terminals' currents, in amperes. */
export function magnitudeSumAmps(currents: readonly Phasor[]): number {
  assertMeasured(currents);
  let total = 0;
  for (const current of currents) total += magnitude(current);
  return total;
}

/** The greatest magnitude among the terminals' currents, in amperes. */
export function greatestMagnitudeAmps(currents: readonly Phasor[]): number {
  assertMeasured(currents);
  let greatest = 0;
  // Math.max hands a NaN on, where a comparison would step over the broken terminal.
  for (const current of currents) greatest = Math.max(greatest, magnitude(current));
  return greatest;
}

/** The least magnitude among the terminals' currents, in amperes: what each of them carries at the least. */
export function leastMagnitudeAmps(currents: readonly Phasor[]): number {
  assertMeasured(currents);
  return Math.min(...currents.map(magnitude));
}

function assertMeasured(currents: readonly Phasor[]): void {
  if (currents.length === 0)
    throw new RangeError('A line is evaluated from at least one terminal’s current.');
}
