export type CsvCell = string | number | null;

/**
 * Rows as comma-separated values (RFC 4180): CRLF line ends, quotes where needed, empty where there is no
 * value. Text that a spreadsheet would run as a formula is kept text by an apostrophe in front.
 */
export function csvText(heads: readonly string[], rows: readonly (readonly CsvCell[])[]): string {
  return [heads, ...rows].map((row) => row.map(csvCell).join(',')).join('\r\n') + '\r\n';
}

function csvCell(cell: CsvCell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return Number.isFinite(cell) ? String(cell) : '';
  const text = /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** A file name that says what it holds: `hask-ostrel-standing-week-2026-03-01.csv`. */
export function csvName(parts: readonly string[], nowMs: number): string {
  const words = [...parts, new Date(nowMs).toISOString().slice(0, 10)];
  return `${words
    .join('-')
    .toLowerCase()
    .replaceAll(/[^a-z0-9-]+/g, '-')}.csv`;
}
