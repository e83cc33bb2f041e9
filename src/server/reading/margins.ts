import type { MarginFilter, MarginQuery, MarginScatter } from '../../contract/margins';
import { marginPlaceText } from '../../contract/margin-place';
import { MARGINS_A_PAGE } from '../../contract/margins';
import type { MarginList, MarginRow } from '../../contract/standing';
import {
  countMargins,
  readAllMarginKeys,
  readLineEnds,
  readMarginKeys,
  readMarginPoints,
  readMargins,
  type LineEnds,
  type MarginKey,
  type PlacedMargin,
  type StoredMargin,
} from '../../store/margins';
import { marginOrder, marginsBehind } from '../../view/margin-order';
import { liveUtilisation } from '../../view/margin-utilisation';
import type { Site } from '../site';

/** Findings are read in pieces: all of a large fleet's at once would be tens of megabytes. */
const ROWS_A_READ = 500;

/** A page of the fleet, each row a phase of a line. */
export async function readMarginList(
  site: Site,
  query: MarginQuery,
  limit = MARGINS_A_PAGE,
): Promise<MarginList> {
  const [total, keys] = await Promise.all([
    countMargins(site.store, query),
    sortedKeys(site, query, limit + 1),
  ]);
  const shown = keys.slice(0, limit);
  const last = keys.length > limit ? shown.at(-1) : undefined;
  return {
    at: new Date(site.now()).toISOString(),
    total,
    rows: await marginRows(site, shown),
    next: last === undefined ? null : marginPlaceText({ ...last, line: last.key }),
  };
}

/** Every row that a query leaves, in its order, piece by piece. */
export async function* readEveryMargin(
  site: Site,
  query: Omit<MarginQuery, 'after'>,
): AsyncGenerator<MarginRow[]> {
  const keys = await sortedKeys(site, query, Number.MAX_SAFE_INTEGER);
  for (let from = 0; from < keys.length; from += ROWS_A_READ)
    yield marginRows(site, keys.slice(from, from + ROWS_A_READ));
}

/** Where the fleet stands by its two great causes. */
export async function readMarginScatter(site: Site, filter: MarginFilter): Promise<MarginScatter> {
  const points = await readMarginPoints(site.store, filter);
  const places = new Map<string, number>();
  const lines: [string, string][] = [];
  for (const { key, lineName } of points) {
    if (places.has(key)) continue;
    places.set(key, lines.length);
    lines.push([key, lineName]);
  }
  return {
    at: new Date(site.now()).toISOString(),
    nearRatio: site.settings.NEAR_RATIO,
    lines,
    points: points.map(({ key, phase, chargingShare, mismatchShare, shareOfPickup }) => [
      places.get(key)!,
      phase,
      thousandths(chargingShare),
      thousandths(mismatchShare),
      shareOfPickup === null ? null : thousandths(shareOfPickup),
    ]),
  };
}

const thousandths = (ratio: number): number => Math.round(ratio * 1000) / 1000;

/** The database knows every order but one: utilisation of now is in the newest results, which this process holds. */
async function sortedKeys(
  { store, live, now }: Site,
  query: MarginQuery,
  limit: number,
): Promise<readonly PlacedMargin[]> {
  const { sort, descending, after } = query;
  const begin = after === undefined ? {} : { after };
  if (sort !== 'utilisation') return readMarginKeys(store, query, { sort, descending, limit, ...begin });
  const results = live.results();
  const nowMs = now();
  const keys = (await readAllMarginKeys(store, query)).map((one) => ({
    ...one,
    value: liveUtilisation(results.get(one.key), one.phase, nowMs),
  }));
  const ordered = marginOrder(keys, ({ value }) => value, descending);
  return marginsBehind(ordered, after, descending).slice(0, limit);
}

async function marginRows(site: Site, keys: readonly MarginKey[]): Promise<MarginRow[]> {
  const lineIds = keys.map(({ lineId }) => lineId);
  const [rows, ends] = await Promise.all([readMargins(site.store, keys), readLineEnds(site.store, lineIds)]);
  return rows.map((row) => marginRow(row, ends, site));
}

function marginRow(row: StoredMargin, ends: LineEnds, { live, now }: Site): MarginRow {
  const { verdict, figures } = row;
  const {
    composition: _composition,
    compositionBefore: _before,
    loadDependence: _dependence,
    creep: _creep,
    creepAtReference: _atReference,
    marks: _marks,
    ...rest
  } = verdict;
  return {
    ...rest,
    line: row.key,
    lineName: row.lineName,
    owner: row.owner,
    voltageKv: row.voltageKv,
    substations: [...(ends.get(row.lineId) ?? [])],
    utilisation: liveUtilisation(live.results().get(row.key), row.phase, now()),
    chargingAmps: figures.chargingAmps,
    mismatchAmps: figures.mismatchAmps,
    restAmps: figures.restAmps,
    creepAmpsPerMonth: figures.creepAmpsPerMonth,
    creepVerdict: figures.creepVerdict,
  };
}
