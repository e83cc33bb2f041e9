import type { MarginRow } from '../contract/standing';
import { csvText } from './line-csv';
import { isMarginFigure, MARGIN_FIGURE, type MarginColumn, type MarginFigure } from './margin-columns';
import type { PhaseLetters } from './site-custom';

/** What every saved row begins with, and the cause that ends it. */
const OWN = ['line', 'key', 'phase', 'voltage (kV)', 'owner'];
const LAST = ['likely cause', 'computed at (UTC)'];

export const marginCsvHead = (columns: readonly MarginColumn[]): string =>
  csvText(
    [
      ...OWN,
      ...figuresOf(columns).map((figure) => `${MARGIN_FIGURE[figure].name} (${MARGIN_FIGURE[figure].unit})`),
      ...LAST,
    ],
    [],
  );

/** The owner is in the file in any case, with what else tells the lines apart. */
const figuresOf = (columns: readonly MarginColumn[]): MarginFigure[] => columns.filter(isMarginFigure);

/** Rows without a head, so that pieces can be put behind one another. */
export function marginCsvRows(
  rows: readonly MarginRow[],
  columns: readonly MarginColumn[],
  letters: PhaseLetters,
): string {
  if (rows.length === 0) return '';
  const figures = figuresOf(columns);
  const lines = rows.map((row) => [
    row.lineName,
    row.line,
    letters[row.phase],
    row.voltageKv,
    row.owner,
    ...figures.map((figure) => MARGIN_FIGURE[figure].saved(row)),
    row.likelyCause,
    row.computedAt,
  ]);
  const whole = csvText([], lines);
  return whole.slice(whole.indexOf('\r\n') + 2);
}
