import { CAUSES } from '../../contract/standing';
import { shortCauseName } from '../../view/forecast-list';
import {
  FORECAST_GROUPS,
  FORECAST_SORTS,
  forecastSearch,
  WHOLE_FORECAST,
  type ForecastAddress,
} from '../../view/forecast-query';
import { plainClick } from '../board/plain-click';
import { OwnerFilter } from '../margins/OwnerFilter';
import { Select } from '../shell/Select';
import type { ForecastAddressState } from './use-forecast-address';

interface ForecastFiltersProps {
  state: ForecastAddressState;
  substations: readonly { readonly key: string; readonly name: string }[];
  owners: readonly string[];
}

const SORT_WORDS: Readonly<Record<ForecastAddress['sort'], string>> = {
  date: 'date',
  share: 'share of pickup',
  name: 'name',
};
const GROUP_WORDS: Readonly<Record<ForecastAddress['group'], string>> = {
  none: 'nothing',
  substation: 'substation',
  cause: 'likely cause',
  owner: 'owner',
};

/** Filters, order and grouping. Without a script it is a form that asks the server. */
export function ForecastFilters({
  state: { address, choose, type },
  substations,
  owners,
}: ForecastFiltersProps) {
  return (
    <form method="get" role="search" className="mt-4 flex flex-wrap items-end gap-x-4 gap-y-2">
      <label className="grid gap-0.5 text-caption text-ink-2 max-sm:w-full">
        Name or place
        <input
          type="search"
          name="text"
          value={address.text}
          onChange={(event) => type({ text: event.target.value })}
          className="field w-52 text-body max-sm:w-full"
        />
      </label>
      <Select
        label="Substation"
        name="substation"
        value={address.substation ?? ''}
        options={[['', 'all'], ...substations.map(({ key, name }) => [key, name] as const)]}
        onChoose={(value) => choose({ substation: value || undefined })}
      />
      <Select
        label="Likely cause"
        name="cause"
        value={address.cause ?? ''}
        options={[['', 'all'], ...CAUSES.map((cause) => [cause, shortCauseName(cause)] as const)]}
        onChoose={(value) => choose({ cause: CAUSES.find((cause) => cause === value) })}
      />
      <OwnerFilter owners={owners} chosen={address.owner} onChoose={(owner) => choose({ owner })} />
      <Select
        label="Sort by"
        name="sort"
        value={address.sort}
        options={FORECAST_SORTS.map((sort) => [sort, SORT_WORDS[sort]] as const)}
        onChoose={(value) => choose({ sort: FORECAST_SORTS.find((sort) => sort === value) ?? 'date' })}
      />
      <Select
        label="Group by"
        name="group"
        value={address.group}
        options={FORECAST_GROUPS.map((group) => [group, GROUP_WORDS[group]] as const)}
        onChoose={(value) => choose({ group: FORECAST_GROUPS.find((group) => group === value) ?? 'none' })}
      />
      <noscript>
        <button className="button">Show</button>
      </noscript>
      {forecastSearch(address) !== '' && (
        <a
          href="/forecast"
          className="link inline-flex min-h-7 items-center"
          onClick={plainClick(() => choose(WHOLE_FORECAST))}
        >
          Show all by date
        </a>
      )}
    </form>
  );
}
