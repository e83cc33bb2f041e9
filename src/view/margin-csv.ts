import type { MarginRow } from '../contract/standing';
import { csvText } from './line-csv';
import { MARGIN_COLUMN, type MarginColumn } from './margin-columns';
import type { PhaseLetters } from './site-custom';

/** What every saved row begins with, and the cause that ends it. */
const OWN = ['line', 'key', 'phase', 'voltage (kV)', 'owner'];
const LAST = ['likely cause', 'computed at (UTC)'];

export const marginCsvHead = (columns: readonly MarginColumn[]): string =>
  csvText(
    [
      ...OWN,
      ...columns.map((column) => `${MARGIN_COLUMN[column].name} (${MARGIN_COLUMN[column].unit})`),
      ...LAST,
    ],
    [],
  );

/** Rows without a head, so that pieces can be put behind one another. */
export function marginCsvRows(
  rows: readonly MarginRow[],
  columns: readonly MarginColumn[],
  letters: PhaseLetters,
): string {
  if (rows.length === 0) return '';
  const lines = rows.map((row) => [
    row.lineName,
    row.line,
    letters[row.phase],
    row.voltageKv,
    row.owner,
    ...columns.map((column) => MARGIN_COLUMN[column].saved(row)),
    row.likelyCause,
    row.computedAt,
  ]);
  const whole = csvText([], lines);
  return whole.slice(whole.indexOf('\r\n') + 2);
}
