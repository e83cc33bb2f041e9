/** A phasor as its real and imaginary part, both in the unit of the quantity, rms. */
export type Complex = { readonly re: number; readonly im: number };

export const complex = (re: number, im: number): Complex => ({ re, im });
export const polar = (magnitude: number, angleRad: number): Complex => ({
  re: magnitude * Math.cos(angleRad),
  im: magnitude * Math.sin(angleRad),
});
export const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });
export const subtract = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im });
export const multiply = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});
export const scale = (a: Complex, factor: number): Complex => ({ re: a.re * factor, im: a.im * factor });
/** j·factor·a: what a susceptance draws at a voltage. */
export const scaleByJ = (a: Complex, factor: number): Complex => ({ re: -a.im * factor, im: a.re * factor });
export const magnitude = (a: Complex): number => Math.sqrt(a.re * a.re + a.im * a.im);
export const angleRad = (a: Complex): number => Math.atan2(a.im, a.re);

/** One value for each of phases A, B and C, in that order. */
export type Three<T> = readonly [T, T, T];

export const eachPhase = <T>(of: (phase: 0 | 1 | 2) => T): Three<T> => [of(0), of(1), of(2)];
