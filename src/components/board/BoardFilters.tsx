import { SORTS, isNarrowed, WHOLE_BOARD, type BoardQuery } from '../../view/board-query';
import { queryWords } from '../../view/board-sentence';
import { WORST_FIRST } from '../../view/condition-words';
import { kilovoltsText } from '../../view/figures';
import { plainClick } from './plain-click';
import type { BoardAddress } from './use-board-query';
import { Select } from '../shell/Select';

interface BoardFiltersProps {
  address: BoardAddress;
  choices: {
    readonly substations: readonly { readonly key: string; readonly name: string }[];
    readonly voltagesKv: readonly number[];
  };
}

const SORT_NAMES: Readonly<Record<BoardQuery['sort'], string>> = {
  worst: 'worst first',
  name: 'name',
  voltage: 'voltage',
  utilisation: 'utilisation',
};

/** Order and filters: in words, and behind them the choices. Without a script it is a form that asks the server. */
export function BoardFilters({ address, choices }: BoardFiltersProps) {
  const { query } = address;
  const at = choices.substations.find(({ key }) => key === query.substation)?.name;
  return (
    <details className="group mt-1.5" open={isNarrowed(query) || undefined}>
      <summary className="inline-flex cursor-pointer list-none flex-wrap gap-x-3 text-ink-2 [&::-webkit-details-marker]:hidden">
        <span>{queryWords(query, at)}</span>
        <span className="link group-open:hidden">Filter and sort</span>
        <span className="link hidden group-open:inline">Fold away</span>
      </summary>
      <form method="get" role="search" className="mt-3 flex flex-wrap items-end gap-x-4 gap-y-2">
        <TextChoice address={address} />
        <Selects address={address} choices={choices} />
        <label className="inline-flex min-h-7 items-center gap-2">
          <input
            type="checkbox"
            name="group"
            value="substation"
            checked={query.group === 'substation'}
            onChange={(event) => address.choose({ group: event.target.checked ? 'substation' : 'none' })}
            className="size-3.5 accent-[var(--ink)]"
          />
          Group by substation
        </label>
        <noscript>
          <button className="button">Show</button>
        </noscript>
        {(isNarrowed(query) || query.sort !== 'worst' || query.group !== 'none') && (
          <a
            href="/"
            className="link inline-flex min-h-7 items-center"
            onClick={plainClick(() => address.choose(WHOLE_BOARD))}
          >
            Show all, worst first
          </a>
        )}
      </form>
    </details>
  );
}

function TextChoice({ address }: { address: BoardAddress }) {
  return (
    <label className="grid gap-0.5 text-caption text-ink-2 max-sm:w-full">
      Name or place
      <input
        type="search"
        name="text"
        value={address.query.text}
        onChange={(event) => address.type({ text: event.target.value })}
        className="field w-52 text-body max-sm:w-full"
      />
    </label>
  );
}

function Selects({ address: { query, choose }, choices }: BoardFiltersProps) {
  return (
    <>
      <Select
        label="Substation"
        name="substation"
        value={query.substation ?? ''}
        options={[['', 'all'], ...choices.substations.map(({ key, name }) => [key, name] as const)]}
        onChoose={(value) => choose({ substation: value || undefined })}
      />
      <Select
        label="Voltage"
        name="voltage"
        value={`${query.voltageKv ?? ''}`}
        options={[['', 'all'], ...choices.voltagesKv.map((kv) => [`${kv}`, kilovoltsText(kv)] as const)]}
        onChoose={(value) => choose({ voltageKv: value === '' ? undefined : Number(value) })}
      />
      <Select
        label="Condition"
        name="condition"
        value={query.condition ?? ''}
        options={[
          ['', 'all'],
          ...WORST_FIRST.map((condition) => [condition, condition] as const),
          ['stale', 'no fresh value'],
        ]}
        onChoose={(value) =>
          choose({
            condition: value === 'stale' ? value : WORST_FIRST.find((condition) => condition === value),
          })
        }
      />
      <Select
        label="Sort by"
        name="sort"
        value={query.sort}
        options={SORTS.map((sort) => [sort, SORT_NAMES[sort]] as const)}
        onChoose={(value) => choose({ sort: SORTS.find((sort) => sort === value) ?? 'worst' })}
      />
    </>
  );
}
