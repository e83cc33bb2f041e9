/**
 * What one snapshot tells of the mismatch of a line's two terminals.
 *
 * By the model of `line-model.ts`, D = Y·V̄ + E·I_2. With Y taken from the line constants, what the charging leaves
 * of the differential is put down to the mismatch: leakage, tapped load and whatever this one instant holds beside
 * them are in it. The differential of more terminals is one equation for several mismatches.
 */
import { magnitude, quotient, sum } from './phasor';
import type { Phasor } from './phasor';
import type { ZonePhase } from './zone';

/**
 * Mismatch E of terminal 2 against terminal 1 as it acts on the current that the scheme judges, per unit: the
 * differential without its charging, over that current. `uncharged` is the phase with the charging taken out whatever
 * the scheme does, `judged` as the scheme has it; amperes rms primary. Undefined where the charging could not be
 * taken out, or terminal 2 carries nothing. Throws for any other number of terminals.
 */
export function snapshotMismatch(uncharged: ZonePhase, judged: ZonePhase): Phasor | undefined {
  const [, second, ...more] = judged.currents;
  if (second === undefined || more.length > 0 || uncharged.currents.length !== 2) {
    throw new RangeError('One snapshot tells the mismatch of two terminals, no more and no fewer.');
  }
  if (uncharged.compensation?.state !== 'compensated' || magnitude(second) === 0) return undefined;
  return quotient(sum(uncharged.currents), second);
}
