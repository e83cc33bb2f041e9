import type { CauseCell, CauseRow } from '../../view/composition-rows';
import { DASH } from '../../view/line-figures';
import { StrokeOfCause } from './StrokeOfCause';

interface Props {
  readonly rows: readonly CauseRow[];
  /** of one window or of two */
  readonly heads: readonly string[];
  readonly caption: string;
  /** the colour that the phase has earned, as a text utility; ink otherwise */
  readonly ink: string;
  readonly marked: CauseRow['id'] | undefined;
}

/** The causes in figures over two windows, each with the stroke it is drawn in. */
export function CauseTable({ rows, heads, caption, ink, marked }: Props) {
  return (
    <table className="figures">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">cause</th>
          {heads.map((head) => (
            <th key={head} scope="col" className="figure">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className={row.id === 'differential' ? 'font-medium' : ''}>
            <th scope="row" className="text-ink">
              <span className="flex items-center gap-2">
                <StrokeOfCause cause={row.id} ink={row.id === marked ? ink : 'text-ink'} />
                <span className={row.id === marked ? ink : ''}>{row.name}</span>
              </span>
            </th>
            <Cell cell={row.now} ink={row.id === marked ? ink : ''} />
            {heads.length > 1 && <Cell cell={row.before} ink="" />}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cell({ cell, ink }: { cell: CauseCell | undefined; ink: string }) {
  if (cell === undefined) return <td className="figure">{DASH}</td>;
  return (
    <td className={`figure ${ink}`} title={cell.interval && `95 %: ${cell.interval}`}>
      {cell.figure}
      {cell.interval !== undefined && <span className="block text-caption text-ink-2">{cell.interval}</span>}
    </td>
  );
}
