import type { LineTable, TableColumn } from '../../view/line-table';
import { dateText, timeText } from '../../view/figures';

interface Props {
  readonly table: LineTable;
  readonly timeZone: string;
}

/** More rows than this make a page slow and are read by nobody; the saved file has them all. */
const ROWS_MOST = 400;

/** The figures behind a chart. Scrolls within itself and can be scrolled by keys. */
export function FiguresTable({ table, timeZone }: Props) {
  const rows = table.rows.slice(0, ROWS_MOST);
  return (
    <div
      className="max-h-80 overflow-auto border border-hairline px-3"
      tabIndex={0}
      role="region"
      aria-label={table.caption}
    >
      <table className="figures">
        <caption className="sr-only">{table.caption}</caption>
        <thead className="sticky top-0 bg-panel">
          <tr>
            {table.columns.map((column, at) => (
              <th key={column.head} scope="col" className={cellClass(table.columns, at)}>
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <tr key={index}>
              {table.columns.map((column, at) => (
                <td key={column.head} className={cellClass(table.columns, at)}>
                  <Cell
                    text={cellText(row[at] ?? null, column, timeZone)}
                    leadsTo={at === 0 ? table.links?.[index] : undefined}
                  />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {table.rows.length > ROWS_MOST && (
        <p className="py-2 text-caption text-ink-2">
          The first {ROWS_MOST} of {table.rows.length} rows; Save as CSV has them all.
        </p>
      )}
    </div>
  );
}

function Cell({ text, leadsTo }: { text: string; leadsTo: string | undefined }) {
  if (leadsTo === undefined) return text;
  return (
    <a href={leadsTo} className="link whitespace-nowrap">
      {text}
    </a>
  );
}

/** Figures stand to the right; words that come after them need their distance, and room where they are many. */
function cellClass(columns: readonly TableColumn[], at: number): string {
  if (columns[at]?.kind === 'figure') return 'figure';
  if (columns[at]?.kind === 'instant') return 'whitespace-nowrap';
  return columns[at - 1]?.kind === 'figure' ? 'min-w-48 pl-6' : '';
}

function cellText(cell: string | number | null, column: TableColumn, timeZone: string): string {
  if (cell === null || (typeof cell === 'number' && !Number.isFinite(cell))) return '–';
  if (typeof cell === 'string') return cell;
  if (column.kind === 'instant') return `${dateText(cell, timeZone)}, ${timeText(cell, timeZone)}`;
  return column.kind === 'figure' ? cell.toFixed(column.digits) : String(cell);
}
