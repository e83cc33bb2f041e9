/**
 * The generalised two-terminal equivalent of a line with any number of terminals, after Miller, Burger, Fischer
 * and Kasztenny, 2010: the two currents that a line with two terminals would carry if it had the same
 * differential current ΣI_k, as a phasor, and the same sum of magnitudes Σ|I_k|.
 *
 * That is three real conditions for four unknowns. The fourth: one of the two takes the direction of that
 * terminal's current whose projection on the differential current is the greatest. In a frame turned so that
 * this direction is real, with the differential current X and the sum of magnitudes S,
 *   I_R = ((Im X)² − (S − Re X)²) / (2·(S − Re X)) + j·Im X,   I_L = S − |I_R|.
 */
import { magnitude, multiply, phasor, scale, sum } from './phasor';
import type { Phasor } from './phasor';

/** The currents of two terminals, amperes rms primary, positive into the line. */
export interface TerminalPair {
  readonly local: Phasor;
  readonly remote: Phasor;
}

/** A differential current below this share of the sum of magnitudes is rounding, and has no direction. */
const NO_DIRECTION = 1e-12;
/** Where S − Re X is below this share of S, all currents are in phase and the formula would divide zero by zero. */
const IN_PHASE = 1e-18;

/**
 * The equivalent of the currents of all terminals. Two terminals come back as they are, the one with the greater
 * projection as the local one. Currents that are all in phase leave the split open; the local one is then that
 * terminal's own and the remote one the sum of the others. Without any current both are zero.
 */
export function generalisedEquivalent(currents: readonly Phasor[]): TerminalPair {
  const leading = leadingCurrent(currents);
  const leadingAmps = magnitude(leading);
  if (leadingAmps === 0) return { local: leading, remote: leading };
  const direction = scale(leading, 1 / leadingAmps);
  let magnitudeSum = 0;
  let across = 0;
  let shortfall = 0;
  for (const current of currents) {
    const amps = magnitude(current);
    const re = current.re * direction.re + current.im * direction.im;
    const im = current.im * direction.re - current.re * direction.im;
    magnitudeSum += amps;
    across += im;
    // |I| − Re I, summed to S − Re X; written so that currents nearly in phase do not cancel to noise.
    shortfall += re > 0 ? (im * im) / (amps + re) : amps - re;
  }
  const along =
    shortfall > IN_PHASE * magnitudeSum
      ? (across * across - shortfall * shortfall) / (2 * shortfall)
      : magnitudeSum - leadingAmps;
  const remote = phasor(along, across);
  return {
    local: scale(direction, magnitudeSum - magnitude(remote)),
    remote: multiply(remote, direction),
  };
}

/** The current with the greatest projection on the differential current, or the greatest one where that is zero. */
function leadingCurrent(currents: readonly Phasor[]): Phasor {
  const differential = sum(currents);
  let magnitudeSum = 0;
  for (const current of currents) magnitudeSum += magnitude(current);
  const hasDirection = magnitude(differential) > NO_DIRECTION * magnitudeSum;
  let leading = phasor(0, 0);
  let most = 0;
  for (const current of currents) {
    const weight = hasDirection
      ? Math.abs(current.re * differential.re + current.im * differential.im)
      : magnitude(current);
    if (weight > most) {
      most = weight;
      leading = current;
    }
  }
  return leading;
}
