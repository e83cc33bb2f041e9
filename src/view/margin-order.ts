/** Rows by a figure, as the database orders them: those without it last whichever way, those alike as they came. */
export function marginOrder<Row>(
  rows: readonly Row[],
  figure: (row: Row) => number | null,
  descending: boolean,
): Row[] {
  const known = rows.filter((row) => figure(row) !== null);
  const unknown = rows.filter((row) => figure(row) === null);
  const direction = descending ? -1 : 1;
  return [...known.toSorted((one, other) => direction * (figure(one)! - figure(other)!)), ...unknown];
}
