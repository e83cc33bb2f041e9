const DAY_MS = 86_400_000;

/** Something that grows evenly from one day to another, both counted from the site’s epoch. */
export type Ramp = { readonly perDay: number; readonly fromDay: number; readonly toDay: number };

/** What a ramp has added by an instant, in the unit of `perDay` times days. */
export function ramped({ perDay, fromDay, toDay }: Ramp, sinceEpochMs: number): number {
  const days = Math.min(toDay, Math.max(fromDay, sinceEpochMs / DAY_MS));
  return perDay * (days - fromDay);
}
