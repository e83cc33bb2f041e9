import { hashPassword } from '../src/auth/passwords';
import type { Measurement } from '../src/contract/feed';
import { computedSnapshot, type ComputedSnapshot } from '../src/ingest/computed-snapshot';
import { roster, type RosterLine } from '../src/ingest/roster';
import {
  channelPathBelow,
  minuteRows,
  rowsByWindow,
  summedBelow,
  windowRows,
} from '../src/ingest/rungs/window-rows';
import { RUNG_MS, rungRows, rungStart } from '../src/ingest/rungs/rung';
import { snapshotRow } from '../src/ingest/snapshot-row';
import { inTransaction, type Store } from '../src/store/client';
import { type LevelRow, writeLevels } from '../src/store/levels';
import { keepPartitions } from '../src/store/partitions';
import { insertUser } from '../src/store/people';
import { readRegister } from '../src/store/register';
import { insertLine } from '../src/store/register-edit';
import { type SnapshotRow, writeSnapshots } from '../src/store/snapshots';
import { createDemoMeasurements, type DemoMeasurements, SAMPLE_MS } from './demo-history';
import { demoPeople } from './demo-people';
import type { NewLine } from '../src/contract/register';
import { demoLines } from './network/demo-lines';

/** How far back the demo's history reaches unless told, and how closely it is sampled: the nearer, the closer. */
export const HISTORY = {
  days: 60,
  sampleMs: 300_000,
  /** beyond the preset's reach */
  oldSampleMs: 15 * 60_000,
  /** raw rows are kept from the start of the day before, at this spacing */
  rawSampleMs: 60_000,
  /** the last minutes are as close as the feed itself, for the operating plane's tails */
  closeMs: 15 * 60_000,
} as const;

const RAW_DAYS = 14;
const MINUTE_DAYS = 90;
const CLOCK_LIMIT_US = 100;
const FREQUENCY_HZ = 50;
const RECORDED_BY = 'Jonas Wehrli';
const ROWS_A_WRITE = 1_000;
/** level rows are written, and progress is told, after as many days */
const DAYS_A_WRITE = 30;

type Site = { readonly seed: number; readonly epochMs: number };

/** What is loaded: two months of the demo network unless told. A progress that throws breaks the load off. */
export type DemoPlan = {
  readonly progress: (share: number) => void;
  readonly days?: number;
  readonly lines?: readonly NewLine[];
};

/** Loads the demo's people, register and history; the history passes through the product's own evaluation. */
export async function loadDemo(
  store: Store,
  site: Site,
  { progress, days = HISTORY.days, lines: entries = demoLines }: DemoPlan,
): Promise<void> {
  await loadPeople(store, site);
  await loadRegister(store, site, entries);
  await keepPartitions(store, { table: 'snapshot', now: site.epochMs, days: RAW_DAYS });
  await keepPartitions(store, { table: 'minute_level', now: site.epochMs, days: MINUTE_DAYS });
  const lines = [
    ...roster(await readRegister(store), {
      workerIndex: 0,
      workerCount: 1,
      frequencyHz: FREQUENCY_HZ,
    }).values(),
  ];
  const measurements = createDemoMeasurements(site);
  for (const [index, line] of lines.entries()) {
    const done = (share: number): void => progress((index + share) / lines.length);
    await loadHistory(store, line, { measurements, epochMs: site.epochMs, days, done });
  }
}

async function loadPeople(store: Store, { epochMs }: Site): Promise<void> {
  for (const { email, name, role, password } of demoPeople)
    await insertUser(store, {
      email,
      name,
      role,
      passwordHash: await hashPassword(password),
      createdAt: new Date(epochMs),
    });
}

async function loadRegister(store: Store, { epochMs }: Site, lines: readonly NewLine[]): Promise<void> {
  const engineer = { id: 'demo', name: RECORDED_BY };
  for (const line of lines) {
    const edit = await insertLine(store, line, { by: engineer, nowMs: epochMs });
    if (!edit.ok) throw new Error(`The demo line ${line.key} is refused: ${JSON.stringify(edit.problem)}`);
  }
}

type Load = {
  readonly measurements: DemoMeasurements;
  readonly epochMs: number;
  readonly days: number;
  readonly done: (share: number) => void;
};

async function loadHistory(store: Store, line: RosterLine, load: Load): Promise<void> {
  const { epochMs } = load;
  const written = { hour: [] as LevelRow[], day: [] as LevelRow[] };
  const write = async (): Promise<void> => {
    await writeLevels(store, 'hour', written.hour.splice(0));
    await writeLevels(store, 'day', written.day.splice(0));
  };
  const today = rungStart('day', epochMs);
  const rawFromMs = today - RUNG_MS.day;
  let before: SnapshotRow | undefined;
  for (let back = load.days; back >= 0; back--) {
    const dayMs = today - back * RUNG_MS.day;
    const rows = dayRows(line, dayMs, load);
    const isRaw = dayMs >= rawFromMs;
    const levels = levelsOfDay(line, { dayMs, rows, isRaw }, before);
    before = rows.at(-1) ?? before;
    written.hour.push(...levels.hours);
    written.day.push(...levels.days);
    if (isRaw) await writeRaw(store, rows);
    if (back % DAYS_A_WRITE !== 0) continue;
    await write();
    load.done(1 - back / (load.days + 1));
  }
}

function dayRows(line: RosterLine, dayMs: number, { measurements, epochMs }: Load): SnapshotRow[] {
  const rows: SnapshotRow[] = [];
  for (const atMs of instants(dayMs, epochMs)) {
    const snapshot = demoSnapshot(line, atMs, measurements);
    if (snapshot !== undefined) rows.push(snapshotRow(snapshot));
  }
  return rows;
}

function levelsOfDay(
  line: RosterLine,
  { dayMs, rows, isRaw }: { dayMs: number; rows: readonly SnapshotRow[]; isRaw: boolean },
  beforeDay: SnapshotRow | undefined,
): { hours: LevelRow[]; days: LevelRow[] } {
  const hours: LevelRow[] = [];
  let before = beforeDay;
  for (const hourRows of rowsByWindow('hour', rows)) {
    hours.push(...hourRowsOf(line, hourRows, { before, isRaw }));
    before = hourRows.at(-1);
  }
  const day = { lineId: line.id, start: new Date(dayMs), ratingAmps: line.ratingAmps };
  const days = rungRows(day, rows, beforeDay).map((row) => ({
    ...row,
    sums: summedBelow(hours, row.phase),
    channelPath: channelPathBelow(hours, row.phase),
  }));
  return { hours, days };
}

/** As the worker builds them, over their minutes, where raw rows are kept: so that a rebuild gives the same numbers. */
function hourRowsOf(
  line: RosterLine,
  rows: readonly SnapshotRow[],
  { before, isRaw }: { before: SnapshotRow | undefined; isRaw: boolean },
): LevelRow[] {
  const hour = windowRows(line, { rung: 'hour', rows }, before);
  if (!isRaw) return hour;
  const minutes = minuteRows(line, rows, before);
  return hour.map((row) => ({ ...row, sums: summedBelow(minutes, row.phase) }));
}

/** The instants of one day that are loaded, up to the moment the site came up. */
function* instants(dayMs: number, epochMs: number): Generator<number> {
  const endMs = Math.min(dayMs + RUNG_MS.day, Math.floor(epochMs / SAMPLE_MS) * SAMPLE_MS);
  const spacingMs = spacingOf(rungStart('day', epochMs) - dayMs);
  let atMs = dayMs;
  while (atMs < endMs) {
    yield atMs;
    atMs += atMs >= epochMs - HISTORY.closeMs ? SAMPLE_MS : spacingMs;
  }
}

function spacingOf(ageMs: number): number {
  if (ageMs <= RUNG_MS.day) return HISTORY.rawSampleMs;
  return ageMs <= HISTORY.days * RUNG_MS.day ? HISTORY.sampleMs : HISTORY.oldSampleMs;
}

function demoSnapshot(
  line: RosterLine,
  atMs: number,
  measurements: DemoMeasurements,
): ComputedSnapshot | undefined {
  const sent = new Map<string, Measurement>(
    measurements(line.key, atMs).map(({ terminal, measurement }) => [terminal, measurement]),
  );
  return sent.size === 0 ? undefined : computedSnapshot({ line, atMs, measurements: sent }, CLOCK_LIMIT_US);
}

async function writeRaw(store: Store, rows: readonly SnapshotRow[]): Promise<void> {
  await inTransaction(store, async (connection) => {
    for (let from = 0; from < rows.length; from += ROWS_A_WRITE)
      await writeSnapshots(connection, rows.slice(from, from + ROWS_A_WRITE));
  });
}
