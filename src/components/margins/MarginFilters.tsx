import { CREEP_FILTERS, isUsuallyDescending, type FleetChoices } from '../../contract/margins';
import { MARGIN_SORTS } from '../../contract/standing';
import { kilovoltsText } from '../../view/figures';
import { areUsual, MARGIN_COLUMN, MARGIN_COLUMNS, type MarginColumn } from '../../view/margin-columns';
import {
  isFleetNarrowed,
  marginListParameters,
  WHOLE_FLEET,
  type MarginAddress,
} from '../../view/margin-query';
import { plainClick } from '../board/plain-click';
import { OwnerFilter } from './OwnerFilter';
import { Select } from '../shell/Select';
import type { MarginAddressState } from './use-margin-address';

interface MarginFiltersProps {
  state: MarginAddressState;
  choices: FleetChoices;
  /** "50 of 6,000 rows" */
  shown: string;
}

const CREEP_WORDS: Readonly<Record<(typeof CREEP_FILTERS)[number], string>> = {
  creep: 'creeping to the near mark',
  'within margin': 'rising within margin',
  none: 'no significant rise',
};

/** Filters, columns and the way to save. Without a script it is a form that asks the server. */
export function MarginFilters({ state, choices, shown }: MarginFiltersProps) {
  const { address, choose, type } = state;
  return (
    <form method="get" role="search" className="mt-4 flex flex-wrap items-end gap-x-4 gap-y-2">
      <label className="grid gap-0.5 text-caption text-ink-2 max-sm:w-full">
        Name or place
        <input
          type="search"
          name="text"
          value={address.text}
          maxLength={80}
          onChange={(event) => type({ text: event.target.value })}
          className="field w-52 text-body max-sm:w-full"
        />
      </label>
      <Selects state={state} choices={choices} />
      <ColumnChoice address={address} onChoose={(columns) => choose({ columns })} />
      <a
        className="button"
        href={`/api/margins/export.csv?${saveParameters(address)}`}
        download
        title="Every row that fits the filters, with the columns chosen"
      >
        Save as CSV
      </a>
      <noscript>
        <button className="button">Show</button>
      </noscript>
      <p className="flex min-h-7 items-center gap-3 text-ink-2">
        <span role="status">{shown}</span>
        {isFleetNarrowed(address) && (
          <a
            href="/margins"
            className="link"
            onClick={plainClick(() => choose({ ...WHOLE_FLEET, columns: address.columns }))}
          >
            Show all
          </a>
        )}
      </p>
    </form>
  );
}

const saveParameters = (address: MarginAddress): string => {
  const asked = marginListParameters(address);
  if (!areUsual(address.columns)) asked.set('columns', address.columns.join(','));
  return asked.toString();
};

function Selects({ state: { address, choose }, choices }: Omit<MarginFiltersProps, 'shown'>) {
  return (
    <>
      <Select
        label="Substation"
        name="substation"
        value={address.substation ?? ''}
        options={[['', 'all'], ...choices.substations.map(({ key, name }) => [key, name] as const)]}
        onChoose={(value) => choose({ substation: value || undefined })}
      />
      <Select
        label="Voltage"
        name="voltage"
        value={`${address.voltageKv ?? ''}`}
        options={[['', 'all'], ...choices.voltagesKv.map((kv) => [`${kv}`, kilovoltsText(kv)] as const)]}
        onChoose={(value) => choose({ voltageKv: value === '' ? undefined : Number(value) })}
      />
      <OwnerFilter owners={choices.owners} chosen={address.owner} onChoose={(owner) => choose({ owner })} />
      <Select
        label="Drift"
        name="creep"
        value={address.creep ?? ''}
        options={[['', 'all'], ...CREEP_FILTERS.map((creep) => [creep, CREEP_WORDS[creep]] as const)]}
        onChoose={(value) => choose({ creep: CREEP_FILTERS.find((creep) => creep === value) })}
      />
      <Select
        label="Sort by"
        name="sort"
        value={address.sort}
        options={MARGIN_SORTS.map((sort) => [sort, sortWords(sort)] as const)}
        onChoose={(value) => {
          const sort = MARGIN_SORTS.find((one) => one === value) ?? 'shareOfPickup';
          choose({ sort, descending: isUsuallyDescending(sort) });
        }}
      />
      <Select
        label="Order"
        name="descending"
        value={`${address.descending}`}
        options={[
          ['true', 'from the top'],
          ['false', 'from the bottom'],
        ]}
        onChoose={(value) => choose({ descending: value === 'true' })}
      />
    </>
  );
}

const sortWords = (sort: (typeof MARGIN_SORTS)[number]): string => {
  const column = MARGIN_COLUMNS.find((one) => MARGIN_COLUMN[one].sort === sort);
  return column === undefined ? 'line' : MARGIN_COLUMN[column].name;
};

interface ColumnChoiceProps {
  address: MarginAddress;
  onChoose: (columns: readonly MarginColumn[]) => void;
}

function ColumnChoice({ address: { columns }, onChoose }: ColumnChoiceProps) {
  return (
    <details className="relative">
      <summary className="button list-none [&::-webkit-details-marker]:hidden">
        Columns{areUsual(columns) ? '' : `, ${columns.length} of ${MARGIN_COLUMNS.length}`}
      </summary>
      <fieldset className="panel absolute z-10 mt-1 grid w-max max-w-[80vw] gap-1 p-3">
        <legend className="sr-only">Columns shown</legend>
        {MARGIN_COLUMNS.map((column) => (
          <label key={column} className="flex min-h-6 items-center gap-2">
            <input
              type="checkbox"
              name="columns"
              value={column}
              checked={columns.includes(column)}
              disabled={columns.length === 1 && columns.includes(column)}
              onChange={(event) =>
                onChoose(
                  MARGIN_COLUMNS.filter((one) =>
                    one === column ? event.target.checked : columns.includes(one),
                  ),
                )
              }
              className="size-3.5 accent-[var(--ink)]"
            />
            {MARGIN_COLUMN[column].name}
          </label>
        ))}
      </fieldset>
    </details>
  );
}
