import { CAUSES, type Cause } from '../contract/standing';

export const FORECAST_GROUPS = ['none', 'substation', 'cause', 'owner'] as const;
export type ForecastGrouping = (typeof FORECAST_GROUPS)[number];
export const FORECAST_SORTS = ['date', 'share', 'name'] as const;
export type ForecastSort = (typeof FORECAST_SORTS)[number];

/** What the Forecast page shows and how; kept in the address. */
export interface ForecastAddress {
  readonly text: string;
  readonly substation: string | undefined;
  readonly cause: Cause | undefined;
  readonly owner: string | undefined;
  readonly group: ForecastGrouping;
  readonly sort: ForecastSort;
}

export const WHOLE_FORECAST: ForecastAddress = {
  text: '',
  substation: undefined,
  cause: undefined,
  owner: undefined,
  group: 'none',
  sort: 'date',
};

/** Reads the address; what it does not understand counts as not chosen. */
export function parseForecastAddress(search: string): ForecastAddress {
  const given = new URLSearchParams(search);
  return {
    text: given.get('text') ?? '',
    substation: given.get('substation') || undefined,
    owner: given.get('owner') || undefined,
    cause: CAUSES.find((cause) => cause === given.get('cause')),
    group: FORECAST_GROUPS.find((group) => group === given.get('group')) ?? 'none',
    sort: FORECAST_SORTS.find((sort) => sort === given.get('sort')) ?? 'date',
  };
}

/** "" for the usual list, else "?…" with only what differs from it. */
export function forecastSearch(address: ForecastAddress): string {
  const chosen = new URLSearchParams();
  if (address.text.trim() !== '') chosen.set('text', address.text);
  if (address.substation !== undefined) chosen.set('substation', address.substation);
  if (address.cause !== undefined) chosen.set('cause', address.cause);
  if (address.owner !== undefined) chosen.set('owner', address.owner);
  if (address.group !== 'none') chosen.set('group', address.group);
  if (address.sort !== 'date') chosen.set('sort', address.sort);
  const search = chosen.toString();
  return search === '' ? '' : `?${search}`;
}

export const isForecastNarrowed = ({ text, substation, cause, owner }: ForecastAddress): boolean =>
  text.trim() !== '' || substation !== undefined || cause !== undefined || owner !== undefined;
