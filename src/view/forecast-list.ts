import type { ForecastLine, ForecastPhase } from '../contract/forecast-list';
import type { Cause } from '../contract/standing';
import type { ForecastDatesOnWire } from '../contract/warning';
import type { ForecastAddress } from './forecast-query';

/** Where a line stands: beyond the near mark, on its way there, or rising without getting near it. */
export type ForecastPlace = 'beyond' | 'coming' | 'within margin';

export interface ForecastRow {
  readonly line: ForecastLine;
  readonly place: ForecastPlace;
  /** the phase that decides, and the others that rise or stand beyond as well */
  readonly phase: ForecastPhase;
  readonly others: readonly ForecastPhase[];
}

const RANK: Readonly<Record<ForecastPlace, number>> = { beyond: 0, coming: 1, 'within margin': 2 };

export function phasePlace(
  { verdict, creepVerdict }: Pick<ForecastPhase, 'verdict' | 'creepVerdict'>,
  nearRatio: number,
): ForecastPlace {
  if (verdict.shareOfPickup !== null && verdict.shareOfPickup >= nearRatio) return 'beyond';
  return creepVerdict === 'creep' ? 'coming' : 'within margin';
}

/** A line by its most urgent phase. */
export function forecastRow(line: ForecastLine, nearRatio: number): ForecastRow {
  const [phase, ...others] = line.phases.toSorted(
    (one, other) =>
      RANK[phasePlace(one, nearRatio)] - RANK[phasePlace(other, nearRatio)] ||
      byDate(one, other) ||
      byShare(one, other),
  );
  return { line, place: phasePlace(phase!, nearRatio), phase: phase!, others };
}

/** The dates that count where the line stands: of the pickup once the near mark is passed. */
export const shownDates = ({ phase: { verdict }, place }: ForecastRow): ForecastDatesOnWire | null =>
  place === 'beyond' ? verdict.pickup : verdict.near;

const DAY_MS = 86_400_000;

/** The history in small, as a sparkline takes it. */
export const dailyLevelsOf = ({ history }: ForecastPhase): { day: string; levelAmps: number | null }[] =>
  history === undefined
    ? []
    : history.levelsAmps.map((levelAmps, index) => ({
        day: new Date(Date.parse(history.from) + index * DAY_MS).toISOString().slice(0, 10),
        levelAmps,
      }));

/** A date that is not within reach stands behind every one that is. */
const far = (day: string | null | undefined): string => day ?? '9999';

function byDate(one: ForecastPhase, other: ForecastPhase): number {
  const [left, right] = [one.verdict.near, other.verdict.near];
  return (
    far(left?.likely).localeCompare(far(right?.likely)) ||
    far(left?.earliest).localeCompare(far(right?.earliest))
  );
}

const byShare = (one: ForecastPhase, other: ForecastPhase): number =>
  (other.verdict.shareOfPickup ?? 0) - (one.verdict.shareOfPickup ?? 0);

const byName = (one: ForecastRow, other: ForecastRow): number =>
  one.line.name.localeCompare(other.line.name, 'en', { numeric: true });

/** Beyond the mark the pickup comes next, so the highest stands first; on the way there the date decides. */
const byUrgency = (one: ForecastRow, other: ForecastRow): number =>
  one.place === 'beyond' ? byShare(one.phase, other.phase) : byDate(one.phase, other.phase);

const ORDERS: Readonly<Record<ForecastAddress['sort'], (one: ForecastRow, other: ForecastRow) => number>> = {
  date: byUrgency,
  share: (one, other) => byShare(one.phase, other.phase),
  name: byName,
};

function fits({ line, phase }: ForecastRow, { text, substation, cause, owner }: ForecastAddress): boolean {
  if (substation !== undefined && !line.substations.some(({ key }) => key === substation)) return false;
  if (cause !== undefined && phase.verdict.likelyCause !== cause) return false;
  if (owner !== undefined && line.owner !== owner) return false;
  const haystack = [line.name, line.key, ...line.substations.map(({ name }) => name)].join(' ').toLowerCase();
  return text
    .toLowerCase()
    .split(/\s+/)
    .every((word) => haystack.includes(word));
}

export type ForecastSections = Readonly<Record<ForecastPlace, readonly ForecastRow[]>>;

/** The page's three sections, filtered and in order. */
export function forecastSections(rows: readonly ForecastRow[], address: ForecastAddress): ForecastSections {
  const shown = rows
    .filter((row) => fits(row, address))
    .toSorted(
      (one, other) =>
        RANK[one.place] - RANK[other.place] || ORDERS[address.sort](one, other) || byName(one, other),
    );
  const at = (place: ForecastPlace) => shown.filter((row) => row.place === place);
  return { beyond: at('beyond'), coming: at('coming'), 'within margin': at('within margin') };
}

export interface ForecastGroup {
  readonly key: string;
  readonly name: string;
  readonly rows: readonly ForecastRow[];
}

/** One group without a name, or one a substation (a line stands under each of its ends), a cause or an owner. */
export function forecastGroups(
  rows: readonly ForecastRow[],
  grouping: ForecastAddress['group'],
): ForecastGroup[] {
  if (grouping === 'none') return [{ key: '', name: '', rows }];
  const groups = new Map<string, { name: string; rows: ForecastRow[] }>();
  for (const row of rows)
    for (const { key, name } of groupsOf(row, grouping)) {
      const group = groups.get(key) ?? { name, rows: [] };
      group.rows.push(row);
      groups.set(key, group);
    }
  return [...groups]
    .map(([key, group]) => ({ key, ...group }))
    .sort(
      (one, other) =>
        Number(one.key === UNOWNED.key) - Number(other.key === UNOWNED.key) ||
        one.name.localeCompare(other.name, 'en', { numeric: true }),
    );
}

/** Stands behind the owners there are; its key is no owner's, since an owner has a name. */
const UNOWNED = { key: '', name: 'owner not recorded' };

function groupsOf(
  row: ForecastRow,
  grouping: Exclude<ForecastAddress['group'], 'none'>,
): readonly { readonly key: string; readonly name: string }[] {
  switch (grouping) {
    case 'substation':
      return row.line.substations;
    case 'cause':
      return [causeGroup(row)];
    case 'owner':
      return [row.line.owner === null ? UNOWNED : { key: row.line.owner, name: row.line.owner }];
  }
}

const causeGroup = ({ phase }: ForecastRow): { key: Cause; name: string } => ({
  key: phase.verdict.likelyCause,
  name: shortCauseName(phase.verdict.likelyCause),
});

/** A cause as a filter and a group have it, without its place. */
export const shortCauseName = (cause: Cause): string => (cause === 'not told' ? 'cause not told' : cause);
