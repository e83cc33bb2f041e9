/** The owners of these lines by name, each once, as they are written: another spelling is another owner. */
export const ownerNames = (lines: readonly { readonly owner: string | null }[]): string[] =>
  [...new Set(lines.flatMap(({ owner }) => owner ?? []))].sort((one, other) =>
    one.localeCompare(other, 'en', { numeric: true }),
  );
