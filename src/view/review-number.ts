/** A number that an address may hold: the one given where it lies within the bounds, else the preset. */
export function numberFromAddress(
  value: string | null,
  { least, most, preset }: { least: number; most: number; preset: number },
): number {
  if (value === null || value.trim() === '') return preset;
  const number = Number(value);
  return number >= least && number <= most ? number : preset;
}

/** Multiples of the standing level that a pickup window may start from. */
export const MULTIPLE_BOUNDS = { least: 1, most: 10, preset: 2.5 } as const;

/** Half widths of the range of power-factor angles, degrees. */
export const LAG_CHOICES = ['15', '30', '45', '90'] as const;
export type LagChoice = (typeof LAG_CHOICES)[number];

export const lagFromAddress = (value: string | null): LagChoice =>
  LAG_CHOICES.find((each) => each === value) ?? '30';
