/**
 * What an asymmetric channel does to a scheme that aligns its terminals over the channel itself.
 *
 * Such a scheme takes half the round trip for the delay of one way. Where the two ways differ, its clocks are
 * off by half the difference, every remote phasor is turned by the angle of that time, and a healthy through
 * current no longer cancels.
 */

/** Time error in milliseconds from the one-way delays; positive where sending takes longer. */
export function channelTimeErrorMs(sendMs: number, receiveMs: number): number {
  return (sendMs - receiveMs) / 2;
}

/** The angle in radians by which a time error in milliseconds turns a phasor, of the same sign. */
export function timeErrorAngleRad(timeErrorMs: number, frequencyHz: number): number {
  return (2 * Math.PI * frequencyHz * timeErrorMs) / 1000;
}

/**
 * Apparent differential current as a ratio of the through current, when one end is turned by `angleRad`:
 * 2·|sin(θ/2)|, from 0 to 2.
 */
export function apparentDifferentialFactor(angleRad: number): number {
  return 2 * Math.abs(Math.sin(angleRad / 2));
}
