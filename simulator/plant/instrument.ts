import type { Complex } from './complex';
import { multiply, polar, scale } from './complex';
import { jitter } from './noise';
import type { CtError } from './truth';

/** noise of a measured current: a share of it, and a floor in amperes */
const NOISE_SHARE = 0.0001;
const NOISE_AMPS = 0.02;
const VOLTAGE_NOISE_SHARE = 0.0002;

/** One sample of one phase: its time error as an angle, and which noise it draws. */
export type Sampling = { readonly timeAngleRad: number; readonly seed: number; readonly index: number };

/** A true primary current as a terminal gives it: transformer error, time error as an angle, noise. */
export function measuredAmps(
  trueAmps: Complex,
  error: CtError,
  { timeAngleRad, seed, index }: Sampling,
): Complex {
  const seen = multiply(trueAmps, polar(1 + error.ratio, error.angleRad + timeAngleRad));
  const noiseAmps = NOISE_AMPS + NOISE_SHARE * (Math.abs(seen.re) + Math.abs(seen.im));
  return {
    re: seen.re + noiseAmps * jitter(seed, index),
    im: seen.im + noiseAmps * jitter(seed ^ 0x3c6ef372, index),
  };
}

/** A true voltage as a terminal gives it. */
export function measuredVolts(trueVolts: Complex, { timeAngleRad, seed, index }: Sampling): Complex {
  const noisy = scale(trueVolts, 1 + VOLTAGE_NOISE_SHARE * jitter(seed ^ 0x1b873593, index));
  return timeAngleRad === 0 ? noisy : multiply(noisy, polar(1, timeAngleRad));
}
