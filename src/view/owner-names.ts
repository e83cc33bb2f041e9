/** The owners of these lines by name, each once, as they are written: another spelling is another owner. */
export const ownerNames = (lines: readonly { readonly owner: string | null }[]): string[] =>
  [...new Set(lines.flatMap(({ owner }) => owner ?? []))].sort((one, other) =>
    one.localeCompare(other, 'en', { numeric: true }),
  );

/** What a filter by owner offers: the one chosen stays among them, else a list that it empties would seem unfiltered. */
export const ownerChoices = (owners: readonly string[], chosen: string | undefined): readonly string[] =>
  chosen === undefined || owners.includes(chosen) ? owners : [...owners, chosen];
