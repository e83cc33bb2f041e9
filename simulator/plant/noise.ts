/**
 * Noise as a function of time alone: any instant can be asked for directly, in any order, and the same seed
 * always answers the same.
 */

/** A seed of its own for each named stream of noise. */
export function seedOf(seed: number, name: string): number {
  let mixed = (seed ^ 0x811c9dc5) | 0;
  for (let index = 0; index < name.length; index++)
    mixed = Math.imul(mixed ^ name.charCodeAt(index), 0x01000193);
  return mixed;
}

/** Evenly spread over 0 to 1 (1 left out), by seed and whole number. */
export function hashed(seed: number, index: number): number {
  let mixed = (seed + Math.imul(index | 0, 0x9e3779b1)) | 0;
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x7feb352d);
  mixed = Math.imul(mixed ^ (mixed >>> 15), 0x846ca68b);
  return ((mixed ^ (mixed >>> 16)) >>> 0) / 4294967296;
}

/** Smooth between random knots one unit of `x` apart; within −1 to 1, mean 0. */
export function smoothNoise(seed: number, x: number): number {
  const knot = Math.floor(x);
  const between = x - knot;
  const weight = between * between * (3 - 2 * between);
  return 2 * (hashed(seed, knot) * (1 - weight) + hashed(seed, knot + 1) * weight) - 1;
}

/** Bell-shaped enough for an instrument: the sum of two even spreads, standard deviation 1. */
export function jitter(seed: number, index: number): number {
  return (hashed(seed, index) + hashed(seed ^ 0x5bd1e995, index) - 1) * 2.449;
}
