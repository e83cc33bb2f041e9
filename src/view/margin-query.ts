import { CREEP_FILTERS, isUsuallyDescending, type CreepFilter, type MarginQuery } from '../contract/margins';
import { MARGIN_SORTS, type MarginSort } from '../contract/standing';
import { areUsual, marginColumnsOf, USUAL_COLUMNS, type MarginColumn } from './margin-columns';

/** What the Margins page shows and how; kept in the address. */
export interface MarginAddress {
  readonly text: string;
  readonly substation: string | undefined;
  readonly voltageKv: number | undefined;
  readonly creep: CreepFilter | undefined;
  readonly owner: string | undefined;
  readonly sort: MarginSort;
  readonly descending: boolean;
  readonly columns: readonly MarginColumn[];
  /** points of the scatter: each line's highest phase, or every phase */
  readonly points: 'worst' | 'all';
}

export const WHOLE_FLEET: MarginAddress = {
  text: '',
  substation: undefined,
  voltageKv: undefined,
  creep: undefined,
  owner: undefined,
  sort: 'shareOfPickup',
  descending: true,
  columns: USUAL_COLUMNS,
  points: 'worst',
};

const TEXT_MOST = 80;

/** Reads the address; what it does not understand counts as not chosen. */
export function parseMarginAddress(search: string): MarginAddress {
  const given = new URLSearchParams(search);
  const voltageKv = Number(given.get('voltage') ?? NaN);
  const sort = MARGIN_SORTS.find((one) => one === given.get('sort')) ?? 'shareOfPickup';
  const descending = given.get('descending');
  const substation = given.get('substation') ?? '';
  return {
    text: (given.get('text') ?? '').slice(0, TEXT_MOST),
    substation: /^[a-z0-9-]{1,40}$/.test(substation) ? substation : undefined,
    voltageKv: Number.isFinite(voltageKv) && voltageKv > 0 ? voltageKv : undefined,
    creep: CREEP_FILTERS.find((one) => one === given.get('creep')),
    owner: given.get('owner')?.trim().slice(0, TEXT_MOST) || undefined,
    sort,
    descending:
      descending === 'true' || descending === 'false' ? descending === 'true' : isUsuallyDescending(sort),
    columns: marginColumnsOf(given.getAll('columns').join(',')),
    points: given.get('points') === 'all' ? 'all' : 'worst',
  };
}

/** The filters alone, as the endpoints take them. */
export function marginFilterParameters(address: MarginAddress): URLSearchParams {
  const chosen = new URLSearchParams();
  if (address.text.trim() !== '') chosen.set('text', address.text);
  if (address.substation !== undefined) chosen.set('substation', address.substation);
  if (address.voltageKv !== undefined) chosen.set('voltage', `${address.voltageKv}`);
  if (address.creep !== undefined) chosen.set('creep', address.creep);
  if (address.owner !== undefined) chosen.set('owner', address.owner);
  return chosen;
}

/** Filters and order, as GET /api/margins takes them. */
export function marginListParameters(address: MarginAddress): URLSearchParams {
  const chosen = marginFilterParameters(address);
  if (address.sort !== 'shareOfPickup') chosen.set('sort', address.sort);
  if (address.descending !== isUsuallyDescending(address.sort))
    chosen.set('descending', `${address.descending}`);
  return chosen;
}

/** "" for the whole fleet, else "?…" with only what differs from it. */
export function marginSearch(address: MarginAddress): string {
  const chosen = marginListParameters(address);
  if (!areUsual(address.columns)) chosen.set('columns', address.columns.join(','));
  if (address.points !== 'worst') chosen.set('points', address.points);
  const search = chosen.toString().replaceAll('%2C', ',');
  return search === '' ? '' : `?${search}`;
}

/** The same as the reading of a page takes it. */
export const marginQueryOf = ({
  text,
  substation,
  voltageKv,
  creep,
  owner,
  sort,
  descending,
}: MarginAddress): MarginQuery => ({
  text: text.trim(),
  ...(substation === undefined ? {} : { substation }),
  ...(voltageKv === undefined ? {} : { voltage: voltageKv }),
  ...(creep === undefined ? {} : { creep }),
  ...(owner === undefined ? {} : { owner }),
  sort,
  descending,
});

/** What a click on a column's head asks for: its usual way, or the other one when it is sorted by already. */
export const sortedBy = (address: MarginAddress, sort: MarginSort): MarginAddress => ({
  ...address,
  sort,
  descending: address.sort === sort ? !address.descending : isUsuallyDescending(sort),
});

export const isFleetNarrowed = (address: MarginAddress): boolean => marginFilterParameters(address).size > 0;
