import {
  and,
  asc,
  count,
  eq,
  getTableColumns,
  gte,
  inArray,
  isNotNull,
  isNull,
  or,
  sql,
  type SQL,
} from 'drizzle-orm';
import type { MarginFilter } from '../contract/margins';
import type { MarginPlace } from '../contract/margin-place';
import type { MarginSort, StandingVerdict } from '../contract/standing';
import type { PhaseName } from '../protection/phase';
import type { Store } from './client';
import { groupedBy } from './grouped';
import { dayLevel } from './schema/levels';
import { line, substation, terminal } from './schema/register';
import { standingVerdict } from './schema/standing';

/** One phase of one line: what a row of the fleet's list is known by. */
export interface MarginKey {
  readonly lineId: number;
  readonly phase: PhaseName;
}

export interface StoredMargin extends MarginKey {
  readonly key: string;
  readonly lineName: string;
  readonly owner: string | null;
  readonly voltageKv: number;
  readonly figures: Omit<typeof standingVerdict.$inferSelect, 'verdict'>;
  readonly verdict: StandingVerdict;
}

/** The columns that the database can sort by; utilisation of now is not in it. */
export type StoredSort = Exclude<MarginSort, 'utilisation'>;

const ORDER: Readonly<Record<StoredSort, SQL>> = {
  shareOfPickup: sql`${standingVerdict.shareOfPickup}`,
  levelAmps: sql`${standingVerdict.levelAmps}`,
  expectedAmps: sql`cast(json_value(${standingVerdict.verdict}, '$.expectedAmps') as double)`,
  utilisationP95: sql`${standingVerdict.utilisationP95}`,
  emergencyUtilisation: sql`${standingVerdict.emergencyUtilisation}`,
  creepAmpsPerMonth: sql`${standingVerdict.creepAmpsPerMonth}`,
  nearLikely: sql`${standingVerdict.nearLikely}`,
  chargingAmps: sql`${standingVerdict.chargingAmps}`,
  mismatchAmps: sql`${standingVerdict.mismatchAmps}`,
  restAmps: sql`${standingVerdict.restAmps}`,
  lineName: sql`${line.name}`,
  owner: sql`${line.owner}`,
};

/** Told apart by every letter, as Forecast groups them: the database itself takes Böhm and bohm for one owner. */
const ownerAsWritten = sql<string | null>`convert(${line.owner} using utf8mb4) collate utf8mb4_bin`;

const { verdict: _verdict, ...FIGURES } = getTableColumns(standingVerdict);

/** How many rows a filter leaves. */
export async function countMargins(store: Store, filter: MarginFilter): Promise<number> {
  const [row] = await store.db
    .select({ rows: count() })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id))
    .where(filtered(filter));
  return row?.rows ?? 0;
}

/** A row in an order: its line's key and the figure that it is sorted by. */
export interface PlacedMargin extends MarginKey {
  readonly key: string;
  readonly value: MarginPlace['value'];
}

interface OrderedPage {
  readonly sort: StoredSort;
  readonly descending: boolean;
  /** the row before the first one; from the top without it */
  readonly after?: MarginPlace;
  readonly limit: number;
}

/**
 * The rows of one page, in order. A row without the figure stands last whichever way the order goes; rows alike stand
 * by the line's key and phase, so that a page begins behind one row and no other. Only keys are sorted: with the
 * findings themselves in the sort, the database would carry megabytes through it.
 */
export async function readMarginKeys(
  store: Store,
  filter: MarginFilter,
  page: OrderedPage,
): Promise<PlacedMargin[]> {
  const by = ORDER[page.sort];
  return store.db
    .select({
      lineId: standingVerdict.lineId,
      phase: standingVerdict.phase,
      key: line.key,
      value: sql<PlacedMargin['value']>`${by}`,
    })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id))
    .where(and(filtered(filter), behind(by, page)))
    .orderBy(
      sql`${by} is null`,
      page.descending ? sql`${by} desc` : sql`${by} asc`,
      asc(line.key),
      asc(standingVerdict.phase),
    )
    .limit(page.limit);
}

function behind(by: SQL, { after, descending }: OrderedPage): SQL | undefined {
  if (after === undefined) return undefined;
  const alikeAndLater = sql`(${line.key} > ${after.line}
    or (${line.key} = ${after.line} and ${standingVerdict.phase} > ${after.phase}))`;
  if (after.value === null) return sql`(${by} is null and ${alikeAndLater})`;
  const further = descending ? sql`${by} < ${after.value}` : sql`${by} > ${after.value}`;
  return sql`(${by} is null or ${further} or (${by} = ${after.value} and ${alikeAndLater}))`;
}

/** Every row that a filter leaves, by the line's key and phase: for an order that the database does not know. */
export async function readAllMarginKeys(
  store: Store,
  filter: MarginFilter,
): Promise<Omit<PlacedMargin, 'value'>[]> {
  return store.db
    .select({ lineId: standingVerdict.lineId, phase: standingVerdict.phase, key: line.key })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id))
    .where(filtered(filter))
    .orderBy(asc(line.key), asc(standingVerdict.phase));
}

/** Whole rows, in the order of their keys. */
export async function readMargins(store: Store, keys: readonly MarginKey[]): Promise<StoredMargin[]> {
  if (keys.length === 0) return [];
  const rows = await store.db
    .select({
      figures: FIGURES,
      verdict: standingVerdict.verdict,
      key: line.key,
      name: line.name,
      owner: line.owner,
      kv: line.voltageKv,
    })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id))
    .where(inArray(standingVerdict.lineId, [...new Set(keys.map(({ lineId }) => lineId))]));
  const found = new Map(rows.map((row) => [`${row.figures.lineId} ${row.figures.phase}`, row]));
  return keys.flatMap(({ lineId, phase }) => {
    const row = found.get(`${lineId} ${phase}`);
    if (row === undefined) return [];
    const { figures, verdict, key, name, owner, kv } = row;
    return [{ lineId, phase, key, lineName: name, owner, voltageKv: kv, figures, verdict }];
  });
}

export interface MarginPoint {
  readonly key: string;
  readonly lineName: string;
  readonly phase: PhaseName;
  readonly chargingShare: number;
  readonly mismatchShare: number;
  readonly shareOfPickup: number | null;
}

/** Charging and mismatch as shares of the pickup, of every row that has both: without reading the findings themselves. */
export async function readMarginPoints(store: Store, filter: MarginFilter): Promise<MarginPoint[]> {
  // the share is level over pickup, so the pickup is at hand without opening the JSON, save where there is no level
  const pickupAmps = sql`coalesce(
    ${standingVerdict.levelAmps} / nullif(${standingVerdict.shareOfPickup}, 0),
    cast(json_value(${standingVerdict.verdict}, '$.pickupAmps') as double))`;
  const [rows, lines] = await Promise.all([
    store.db
      .select({
        lineId: standingVerdict.lineId,
        phase: standingVerdict.phase,
        chargingShare: sql<number | null>`${standingVerdict.chargingAmps} / nullif(${pickupAmps}, 0)`,
        mismatchShare: sql<number | null>`${standingVerdict.mismatchAmps} / nullif(${pickupAmps}, 0)`,
        shareOfPickup: standingVerdict.shareOfPickup,
      })
      .from(standingVerdict)
      .innerJoin(line, eq(standingVerdict.lineId, line.id))
      .where(
        and(
          filtered(filter),
          isNotNull(standingVerdict.chargingAmps),
          isNotNull(standingVerdict.mismatchAmps),
        ),
      ),
    // names once a line and not with each phase: half of what would have to be carried
    store.db.select({ id: line.id, key: line.key, lineName: line.name }).from(line),
  ]);
  const named = new Map(lines.map(({ id, ...names }) => [id, names]));
  return rows.flatMap(({ lineId, chargingShare, mismatchShare, ...row }) => {
    const names = named.get(lineId);
    if (names === undefined || chargingShare === null || mismatchShare === null) return [];
    return [{ ...names, ...row, chargingShare, mismatchShare }];
  });
}

/** Rows that rise, whether to the near mark or within their margin, and rows that stand beyond it; most urgent first. */
export async function readForecastKeys(store: Store, nearRatio: number, most: number): Promise<MarginKey[]> {
  return store.db
    .select({ lineId: standingVerdict.lineId, phase: standingVerdict.phase })
    .from(standingVerdict)
    .where(or(isNotNull(standingVerdict.creepVerdict), gte(standingVerdict.shareOfPickup, nearRatio)))
    .orderBy(
      sql`coalesce(${standingVerdict.shareOfPickup} >= ${nearRatio}, false) desc`,
      sql`coalesce(${standingVerdict.creepVerdict} = 'creep', false) desc`,
      sql`${standingVerdict.nearLikely} is null`,
      asc(standingVerdict.nearLikely),
      asc(standingVerdict.lineId),
      asc(standingVerdict.phase),
    )
    .limit(most);
}

export interface ForecastCounts {
  /** lines with findings */
  readonly found: number;
  readonly beyond: number;
  /** on the way to the near mark, and not beyond it */
  readonly coming: number;
  readonly withinMargin: number;
  /** lines in service without findings */
  readonly unknown: number;
}

/** How many lines stand where, each by its most urgent phase. */
export async function countForecastLines(store: Store, nearRatio: number): Promise<ForecastCounts> {
  const byLine = store.db
    .select({
      lineId: standingVerdict.lineId,
      beyond: sql<number>`coalesce(max(${standingVerdict.shareOfPickup} >= ${nearRatio}), 0)`.as('beyond'),
      creeps: sql<number>`coalesce(max(${standingVerdict.creepVerdict} = 'creep'), 0)`.as('creeps'),
      rises: sql<number>`max(${standingVerdict.creepVerdict} is not null)`.as('rises'),
    })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id))
    .groupBy(standingVerdict.lineId)
    .as('by_line');
  const held = (condition: SQL) => sql<number>`coalesce(sum(${condition}), 0)`.mapWith(Number);
  const [[known], [without]] = await Promise.all([
    store.db
      .select({
        found: count(),
        beyond: held(sql`${byLine.beyond}`),
        coming: held(sql`${byLine.creeps} and not ${byLine.beyond}`),
        withinMargin: held(sql`${byLine.rises} and not ${byLine.creeps} and not ${byLine.beyond}`),
      })
      .from(byLine),
    store.db
      .select({ lines: sql<number>`count(distinct ${line.id})`.mapWith(Number) })
      .from(line)
      .leftJoin(standingVerdict, eq(standingVerdict.lineId, line.id))
      .where(and(eq(line.inService, true), isNull(standingVerdict.lineId))),
  ]);
  const { found = 0, beyond = 0, coming = 0, withinMargin = 0 } = known ?? {};
  return { found, beyond, coming, withinMargin, unknown: without?.lines ?? 0 };
}

export interface DailyLevels extends MarginKey {
  /** days after the first day asked for, each with its level; null on a day without one */
  readonly days: readonly (readonly [place: number, levelAmps: number | null])[];
}

/**
 * Daily standing levels of these phases from a day on, to a tenth of an ampere. A phase's days come as one text: as
 * rows of their own, the driver would make tens of thousands of objects for a page.
 */
export async function readDailyLevels(
  store: Store,
  keys: readonly MarginKey[],
  from: Date,
): Promise<DailyLevels[]> {
  if (keys.length === 0) return [];
  const ofPhase = [...groupedBy(keys, ({ phase }) => phase)].map(([phase, own]) =>
    and(
      inArray(
        dayLevel.lineId,
        own.map(({ lineId }) => lineId),
      ),
      eq(dayLevel.phase, phase),
    ),
  );
  const place = sql`datediff(${dayLevel.start}, ${from})`;
  const rows = await store.db
    .select({
      lineId: dayLevel.lineId,
      phase: dayLevel.phase,
      days: sql<string>`group_concat(
        concat(${place}, ':', coalesce(round(${dayLevel.medianAmps}, 1), '')) order by ${dayLevel.start})`,
    })
    .from(dayLevel)
    .where(and(or(...ofPhase), gte(dayLevel.start, from)))
    .groupBy(dayLevel.lineId, dayLevel.phase);
  return rows.map(({ days, ...key }) => ({ ...key, days: days.split(',').map(placedLevel) }));
}

function placedLevel(text: string): [place: number, levelAmps: number | null] {
  const [place = '', levelAmps = ''] = text.split(':');
  return [Number(place), levelAmps === '' ? null : Number(levelAmps)];
}

export interface FleetCounts {
  readonly phases: number;
  readonly beyond: number;
  readonly creeping: number;
  readonly withinMargin: number;
  readonly newest: Date | undefined;
}

/** How the fleet stands as a whole. */
export async function readFleetCounts(store: Store, nearRatio: number): Promise<FleetCounts> {
  const held = (condition: SQL) => sql<number>`coalesce(sum(${condition}), 0)`.mapWith(Number);
  const [row] = await store.db
    .select({
      phases: count(),
      beyond: held(sql`${standingVerdict.shareOfPickup} >= ${nearRatio}`),
      creeping: held(sql`${standingVerdict.creepVerdict} = 'creep'`),
      withinMargin: held(sql`${standingVerdict.creepVerdict} = 'within margin'`),
      newest: sql<Date | null>`max(${standingVerdict.computedAt})`.mapWith(standingVerdict.computedAt),
    })
    .from(standingVerdict)
    .innerJoin(line, eq(standingVerdict.lineId, line.id));
  return {
    phases: row?.phases ?? 0,
    beyond: row?.beyond ?? 0,
    creeping: row?.creeping ?? 0,
    withinMargin: row?.withinMargin ?? 0,
    newest: row?.newest ?? undefined,
  };
}

export type LineEnds = ReadonlyMap<number, readonly { readonly key: string; readonly name: string }[]>;

/** The substations at the ends of these lines, in the terminals' order, each once. */
export async function readLineEnds(store: Store, lineIds: readonly number[]): Promise<LineEnds> {
  if (lineIds.length === 0) return new Map();
  const rows = await store.db
    .select({ lineId: terminal.lineId, key: substation.key, name: substation.name })
    .from(terminal)
    .innerJoin(substation, eq(terminal.substation, substation.key))
    .where(inArray(terminal.lineId, [...new Set(lineIds)]))
    .orderBy(asc(terminal.position));
  return new Map(
    [...groupedBy(rows, ({ lineId }) => lineId)].map(([lineId, ends]) => [
      lineId,
      [...new Map(ends.map(({ key, name }) => [key, { key, name }])).values()],
    ]),
  );
}

/** What the fleet's filters can offer: substations by name, voltages from high to low. */
export async function readFleetChoices(store: Store): Promise<{
  substations: { key: string; name: string }[];
  voltagesKv: number[];
  owners: string[];
}> {
  const [substations, voltages, owners] = await Promise.all([
    store.db.select().from(substation).orderBy(asc(substation.name)),
    store.db.selectDistinct({ kv: line.voltageKv }).from(line),
    store.db
      .selectDistinct({ owner: ownerAsWritten })
      .from(line)
      .where(isNotNull(line.owner))
      .orderBy(asc(ownerAsWritten)),
  ]);
  return {
    substations,
    owners: owners.flatMap(({ owner }) => owner ?? []),
    voltagesKv: voltages.map(({ kv }) => kv).sort((one, other) => other - one),
  };
}

function filtered({ text, substation: at, voltage, creep, owner }: MarginFilter): SQL | undefined {
  return and(
    ...text
      .split(/\s+/)
      .filter((word) => word !== '')
      .map(namesWord),
    at === undefined ? undefined : endsAt(sql`${terminal.substation} = ${at}`),
    owner === undefined ? undefined : sql`${ownerAsWritten} = ${owner}`,
    voltage === undefined ? undefined : eq(line.voltageKv, voltage),
    creep === undefined
      ? undefined
      : creep === 'none'
        ? isNull(standingVerdict.creepVerdict)
        : eq(standingVerdict.creepVerdict, creep),
  );
}

function namesWord(word: string): SQL {
  const pattern = `%${word.replaceAll(/[\\%_]/g, '\\$&')}%`;
  const atSubstation = sql`${terminal.substation} in
    (select ${substation.key} from ${substation} where ${substation.name} like ${pattern})`;
  return sql`(${line.name} like ${pattern} or ${line.key} like ${pattern} or ${endsAt(atSubstation)})`;
}

// by id, so that the database looks the lines up once and not once for every row
const endsAt = (condition: SQL): SQL =>
  sql`${line.id} in (select ${terminal.lineId} from ${terminal} where ${condition})`;
