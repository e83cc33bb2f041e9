/**
 * A complex number: a phasor (rms, in the unit of whoever holds it) or the coefficient between two of them.
 * The rooms rule keeps this room to itself, so it has the few operations that it needs.
 */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const ZERO: Complex = { re: 0, im: 0 };

/** The sum of any number of complex numbers; 0 of none. */
export function plus(...terms: readonly Complex[]): Complex {
  let re = 0;
  let im = 0;
  for (const term of terms) {
    re += term.re;
    im += term.im;
  }
  return { re, im };
}

/** `from` less `taken`. */
export function minus(from: Complex, taken: Complex): Complex {
  return { re: from.re - taken.re, im: from.im - taken.im };
}

/** The product. */
export function times(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

/** conj(a)·b: its angle is how far b leads a, so that a reference angle common to both drops out. */
export function conjugateProduct(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re + a.im * b.im, im: a.re * b.im - a.im * b.re };
}

/** The number times a real factor. */
export function scaled(a: Complex, factor: number): Complex {
  return { re: a.re * factor, im: a.im * factor };
}

/** a/b; not finite for b = 0. */
export function quotient(a: Complex, b: Complex): Complex {
  return scaled(conjugateProduct(b, a), 1 / squared(b));
}

/** |a|², never negative. */
export function squared({ re, im }: Complex): number {
  return re * re + im * im;
}

/** |a|, never negative. */
export function modulus(a: Complex): number {
  return Math.sqrt(squared(a));
}

/** The number of modulus 1 in the direction of `a`; `undefined` for 0, which has none. */
export function direction(a: Complex): Complex | undefined {
  const length = modulus(a);
  return length > 0 ? scaled(a, 1 / length) : undefined;
}
