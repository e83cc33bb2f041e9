import type { MarginPlace } from '../contract/margin-place';

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

interface Placed {
  readonly value: number | null;
  readonly key: string;
  readonly phase: string;
}

/** The rows of such an order that stand behind a place in it, whether or not that row is still there. */
export function marginsBehind<Row extends Placed>(
  ordered: readonly Row[],
  place: MarginPlace | undefined,
  descending: boolean,
): readonly Row[] {
  if (place === undefined) return ordered;
  const { line, phase } = place;
  const from = typeof place.value === 'number' ? place.value : null;
  const isLater = (row: Row) => row.key > line || (row.key === line && row.phase > phase);
  const first = ordered.findIndex((row) => {
    if (row.value === from) return isLater(row);
    if (row.value === null || from === null) return row.value === null;
    return descending ? row.value < from : row.value > from;
  });
  return first === -1 ? [] : ordered.slice(first);
}

/** The rows of several pages, each once: one that moved between two requests may have come with both. */
export function rowsOfPages<Row extends { readonly line: string; readonly phase: string }>(
  pages: readonly { readonly rows: readonly Row[] }[],
): Row[] {
  const rows = pages.flatMap((page) => page.rows);
  return [...new Map(rows.map((row) => [`${row.line} ${row.phase}`, row])).values()];
}
