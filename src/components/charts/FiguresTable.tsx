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
            {table.columns.map((column) => (
              <th key={column.head} scope="col" className={column.kind === 'figure' ? 'figure' : ''}>
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <tr key={index}>
              {table.columns.map((column, at) => (
                <td key={column.head} className={column.kind === 'figure' ? 'figure' : ''}>
                  {cellText(row[at] ?? null, column, timeZone)}
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

function cellText(cell: string | number | null, column: TableColumn, timeZone: string): string {
  if (cell === null || (typeof cell === 'number' && !Number.isFinite(cell))) return '–';
  if (typeof cell === 'string') return cell;
  if (column.kind === 'instant') return `${dateText(cell, timeZone)}, ${timeText(cell, timeZone)}`;
  return column.kind === 'figure' ? cell.toFixed(column.digits) : String(cell);
}
