import type { MarginSort } from '../../contract/standing';
import { MARGIN_COLUMN, type MarginColumn } from '../../view/margin-columns';
import { marginSearch, sortedBy } from '../../view/margin-query';
import { plainClick } from '../board/plain-click';
import type { MarginAddressState } from './use-margin-address';

/** Two rows of heads: a group's name over its columns, and in each head a link that sorts by it. */
export function MarginHead({ address }: { address: MarginAddressState }) {
  const spans = groupSpans(address.address.columns);
  return (
    <thead className="max-lg:hidden">
      <tr>
        <th scope="col" rowSpan={2} className="align-bottom!" aria-sort={ariaSort(address, 'lineName')}>
          <SortLink address={address} sort="lineName" head="line, phase" meaning="By the line’s name" />
        </th>
        {spans.map(({ group, columns }) =>
          group === undefined ? (
            <Head key={columns[0]} column={columns[0]!} address={address} rows={2} />
          ) : (
            <th
              key={group}
              scope="colgroup"
              colSpan={columns.length}
              className="border-b-0! pr-0! pb-0! pl-3!"
            >
              <span className="block border-b border-hairline text-right">{group}</span>
            </th>
          ),
        )}
      </tr>
      <tr>
        {spans
          .filter(({ group }) => group !== undefined)
          .flatMap(({ columns }) =>
            columns.map((column) => <Head key={column} column={column} address={address} rows={1} />),
          )}
      </tr>
    </thead>
  );
}

interface HeadProps {
  column: MarginColumn;
  address: MarginAddressState;
  rows: 1 | 2;
}

function Head({ column, address, rows }: HeadProps) {
  const { head, meaning, sort } = MARGIN_COLUMN[column];
  return (
    <th
      scope="col"
      rowSpan={rows}
      className={`align-bottom! ${column === 'share' || column === 'owner' ? '' : 'figure'}`}
      aria-sort={ariaSort(address, sort)}
    >
      <SortLink address={address} sort={sort} head={head} meaning={meaning} />
    </th>
  );
}

interface SortLinkProps {
  address: MarginAddressState;
  sort: MarginSort;
  head: string;
  meaning: string;
}

function SortLink({ address: { address, choose }, sort, head, meaning }: SortLinkProps) {
  const next = sortedBy(address, sort);
  const current = address.sort === sort;
  return (
    <a
      href={`/margins${marginSearch(next)}`}
      title={meaning}
      onClick={plainClick(() => choose(next))}
      className={`no-underline hover:text-ink hover:underline ${current ? 'font-medium text-ink' : ''}`}
    >
      {head}
      {current && <span aria-hidden="true">{address.descending ? ' ↓' : ' ↑'}</span>}
    </a>
  );
}

const ariaSort = ({ address }: MarginAddressState, sort: MarginSort) =>
  address.sort !== sort ? undefined : address.descending ? 'descending' : 'ascending';

interface GroupSpan {
  group: string | undefined;
  columns: MarginColumn[];
}

function groupSpans(columns: readonly MarginColumn[]): GroupSpan[] {
  const spans: GroupSpan[] = [];
  for (const column of columns) {
    const { group } = MARGIN_COLUMN[column];
    const last = spans.at(-1);
    if (group !== undefined && last?.group === group) last.columns.push(column);
    else spans.push({ group, columns: [column] });
  }
  return spans;
}
