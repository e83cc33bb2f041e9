const DAY_MS = 86_400_000;

/** A stretch in which a terminal sends nothing, in days from the site’s epoch; the last is not in it. */
export type Gap = { readonly fromDay: number; readonly toDay: number };

export const isInGap = (gaps: readonly Gap[], sinceEpochMs: number): boolean =>
  gaps.some(({ fromDay, toDay }) => sinceEpochMs >= fromDay * DAY_MS && sinceEpochMs < toDay * DAY_MS);
