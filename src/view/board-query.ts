import { conditionSchema, type Condition } from '../contract/condition';

/** A line's condition, or 'stale': settled when last heard, and not heard since. */
export type ShownState = Condition | 'stale';

export const SORTS = ['worst', 'name', 'voltage', 'utilisation'] as const;
export type BoardSort = (typeof SORTS)[number];

/** What the Board shows and how; kept in the address, so that it can be sent and the back button works. */
export interface BoardQuery {
  readonly text: string;
  readonly substation: string | undefined;
  readonly voltageKv: number | undefined;
  readonly condition: ShownState | undefined;
  readonly sort: BoardSort;
  readonly group: 'none' | 'substation';
}

export const WHOLE_BOARD: BoardQuery = {
  text: '',
  substation: undefined,
  voltageKv: undefined,
  condition: undefined,
  sort: 'worst',
  group: 'none',
};

const stateOf = (value: string | null): ShownState | undefined => {
  if (value === 'stale') return value;
  const parsed = conditionSchema.safeParse(value);
  return parsed.success ? parsed.data : undefined;
};

/** Reads the address; what it does not understand counts as not chosen. */
export function parseBoardQuery(search: string): BoardQuery {
  const given = new URLSearchParams(search);
  const voltageKv = Number(given.get('voltage') ?? NaN);
  return {
    text: given.get('text') ?? '',
    substation: given.get('substation') || undefined,
    voltageKv: Number.isFinite(voltageKv) && voltageKv > 0 ? voltageKv : undefined,
    condition: stateOf(given.get('condition')),
    sort: SORTS.find((sort) => sort === given.get('sort')) ?? 'worst',
    group: given.get('group') === 'substation' ? 'substation' : 'none',
  };
}

/** The address's query for what is chosen: "" for the whole Board, else "?…" with only what differs from it. */
export function boardSearch(query: BoardQuery): string {
  const chosen = new URLSearchParams();
  if (query.text.trim() !== '') chosen.set('text', query.text);
  if (query.substation !== undefined) chosen.set('substation', query.substation);
  if (query.voltageKv !== undefined) chosen.set('voltage', `${query.voltageKv}`);
  if (query.condition !== undefined) chosen.set('condition', query.condition);
  if (query.sort !== 'worst') chosen.set('sort', query.sort);
  if (query.group !== 'none') chosen.set('group', query.group);
  const search = chosen.toString();
  return search === '' ? '' : `?${search}`;
}

export const isNarrowed = (query: BoardQuery): boolean =>
  query.text.trim() !== '' ||
  query.substation !== undefined ||
  query.voltageKv !== undefined ||
  query.condition !== undefined;
