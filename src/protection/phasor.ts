/**
 * A sinusoidal quantity of one frequency: rms value and angle, held as a complex number.
 *
 * The unit is that of whoever holds it (amperes primary for currents, kilovolts for voltages). Angles are
 * radians, counter-clockwise positive, against a time reference common to all phasors that are combined.
 */
export interface Phasor {
  readonly re: number;
  readonly im: number;
}

/** The phasor of these real and imaginary parts, both in the unit of the quantity. */
export function phasor(re: number, im: number): Phasor {
  return { re, im };
}

/** The phasor of this rms magnitude, in the unit of the quantity, at this angle in radians. */
export function phasorFromPolar(magnitude: number, angleRad: number): Phasor {
  return { re: magnitude * Math.cos(angleRad), im: magnitude * Math.sin(angleRad) };
}

/** Rms magnitude in the unit of the quantity, never negative. */
export function magnitude({ re, im }: Phasor): number {
  // Not Math.hypot: it is several times slower, and currents are far from the overflow it guards against.
  return Math.sqrt(re * re + im * im);
}

/** Angle in radians, above −π up to π. A zero phasor has no direction and comes back as 0. */
export function angleRad({ re, im }: Phasor): number {
  return Math.atan2(im, re);
}

/** Phasor sum. The sum of none is the zero phasor. */
export function sum(phasors: readonly Phasor[]): Phasor {
  let re = 0;
  let im = 0;
  for (const each of phasors) {
    re += each.re;
    im += each.im;
  }
  return { re, im };
}

/** `from` less `taken`. */
export function subtract(from: Phasor, taken: Phasor): Phasor {
  return { re: from.re - taken.re, im: from.im - taken.im };
}

/** Complex product: magnitudes multiply, angles add. */
export function multiply(p: Phasor, q: Phasor): Phasor {
  return { re: p.re * q.re - p.im * q.im, im: p.re * q.im + p.im * q.re };
}

/** Complex quotient p/q: magnitudes divide, angles subtract; not finite for a zero q. */
export function quotient(p: Phasor, q: Phasor): Phasor {
  return scale(multiply(p, conjugate(q)), 1 / (q.re * q.re + q.im * q.im));
}

/** The phasor times a real factor; a negative factor turns it round. */
export function scale(p: Phasor, factor: number): Phasor {
  return { re: p.re * factor, im: p.im * factor };
}

/** The phasor mirrored at the real axis: same magnitude, opposite angle. */
export function conjugate(p: Phasor): Phasor {
  return { re: p.re, im: -p.im };
}

/** The phasor advanced by an angle in radians. */
export function rotate(p: Phasor, angleRad: number): Phasor {
  return multiply(p, phasorFromPolar(1, angleRad));
}
