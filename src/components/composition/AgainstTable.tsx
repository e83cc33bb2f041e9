import type { AgainstRow } from '../../view/composition-rows';

interface Props {
  readonly rows: readonly AgainstRow[];
  readonly heads: readonly [string, string];
}

/** What was measured held against the register. */
export function AgainstTable({ rows, heads }: Props) {
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
            <td className={`max-sm:block max-sm:border-0 max-sm:p-0 ${row.beyond ? 'font-semibold' : ''}`}>
              {row.now}
            </td>
            <td className="text-ink-2 max-sm:block max-sm:border-0 max-sm:p-0">
              <span className="sm:hidden">{heads[1]}: </span>
              {row.before}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
