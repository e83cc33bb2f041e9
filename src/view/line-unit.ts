/** What currents are shown in: amperes rms primary, or per unit of the line's rating. */
export type CurrentUnit = 'amperes' | 'per unit';

/** The unit as the page's address holds it (`?unit=pu`); anything else is amperes. */
export function unitFromAddress(value: string | null): CurrentUnit {
  return value === 'pu' ? 'per unit' : 'amperes';
}

/** A current in the unit shown; null stays null, and a rating of nothing has no per unit. */
export function inUnit(amps: number | null, unit: CurrentUnit, ratingAmps: number): number | null {
  if (amps === null || !Number.isFinite(amps)) return null;
  if (unit === 'amperes') return amps;
  return ratingAmps > 0 ? amps / ratingAmps : null;
}

/** The unit in words for an axis or a column. */
export function unitWords(unit: CurrentUnit, ratingAmps: number): string {
  return unit === 'amperes' ? 'A primary' : `per unit of ${Math.round(ratingAmps)} A`;
}

/** The unit's sign behind a figure. */
export function unitSign(unit: CurrentUnit): string {
  return unit === 'amperes' ? 'A' : 'pu';
}
