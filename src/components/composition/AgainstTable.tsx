import type { AgainstCell, AgainstRow } from '../../view/composition-rows';

interface Props {
  readonly rows: readonly AgainstRow[];
  /** of one window or of two */
  readonly heads: readonly string[];
  /** which of the two is history */
  readonly past: 'first' | 'second';
}

/** What was measured held against the register. On a narrow page each row is a small block of its own. */
export function AgainstTable({ rows, heads, past }: Props) {
  if (rows.length === 0) return null;
  return (
    <table className="figures max-sm:block">
      <caption className="sr-only">What was measured, held against the register</caption>
      <thead className="max-sm:hidden">
        <tr>
          <th scope="col">held against the register</th>
          {heads.map((head) => (
            <th key={head} scope="col">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody className="max-sm:block">
        {rows.map((row) => (
          <tr key={row.name} className="max-sm:block max-sm:border-b max-sm:border-hairline max-sm:py-1.5">
            <th scope="row" className="max-sm:block max-sm:border-0 max-sm:p-0">
              {row.name}
            </th>
            {[row.now, row.before].slice(0, heads.length).map((cell, index) => (
              <Cell
                key={heads[index]}
                cell={cell}
                head={heads[index] ?? ''}
                isPast={index === (past === 'first' ? 0 : 1)}
              />
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cell({ cell, head, isPast }: { cell: AgainstCell; head: string; isPast: boolean }) {
  return (
    <td
      className={`max-sm:block max-sm:border-0 max-sm:p-0 ${isPast ? 'text-ink-2' : ''} ${cell.beyond ? 'font-semibold' : ''}`}
    >
      <span className="font-normal text-ink-2 sm:hidden">{head}: </span>
      {cell.words}
    </td>
  );
}
