import { ampsText } from './figures';
import { inUnit, unitSign } from './line-unit';
import type { CurrentUnit } from './line-unit';

/** Stands where nothing can be told; the reason stands beside it in words. */
export const DASH = '–';

/** A current in the unit shown: "38 A", "0.059 pu"; a dash where there is none. */
export function currentText(amps: number | null, unit: CurrentUnit, ratingAmps: number): string {
  const value = inUnit(amps, unit, ratingAmps);
  if (value === null) return DASH;
  return unit === 'amperes' ? ampsText(value) : `${value.toFixed(3)}\u00a0${unitSign(unit)}`;
}

/** An angle in degrees: "−167.8°"; a dash where there is none. */
export function degreesText(degrees: number | undefined): string {
  if (degrees === undefined || !Number.isFinite(degrees)) return DASH;
  const rounded = degrees.toFixed(1);
  return `${rounded === '-0.0' ? '0.0' : rounded.replace('-', '−')}°`;
}
