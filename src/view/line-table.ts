import { csvText } from './line-csv';
import type { CsvCell } from './line-csv';

/** A column of a table behind a chart: words, an instant (milliseconds), or a figure with so many decimals. */
export type TableColumn =
  | { readonly kind: 'text' | 'instant'; readonly head: string }
  | { readonly kind: 'figure'; readonly head: string; readonly digits: number };

/** The figures a chart draws, as rows: one source for the table on the screen and for the saved file. */
export interface LineTable {
  readonly caption: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly (readonly CsvCell[])[];
  /** where the first cell of each row leads, for a chart whose points lead there */
  readonly links?: readonly string[];
}

/** The table as a file: instants in UTC, figures to their decimals, empty where there is none. */
export function tableCsv(table: LineTable): string {
  const heads = table.columns.map(({ kind, head }) => (kind === 'instant' ? `${head} (UTC)` : head));
  const rows = table.rows.map((row) => row.map((cell, index) => savedCell(cell, table.columns[index])));
  return csvText(heads, rows);
}

function savedCell(cell: CsvCell, column: TableColumn | undefined): CsvCell {
  if (typeof cell !== 'number' || !Number.isFinite(cell)) return typeof cell === 'number' ? null : cell;
  if (column?.kind === 'instant') return new Date(cell).toISOString();
  return column?.kind === 'figure' ? Number(cell.toFixed(column.digits)) : cell;
}
