import type { LineDetail, LineList, LineSummary } from '../../contract/lines';
import type { Warning } from '../../contract/warning';
import { readCreep, readLevelFigures } from '../../store/levels';
import { groupedBy } from '../../store/grouped';
import { readRegister, readRegisterLine, type RegisteredLine } from '../../store/register';
import { readVerdictsOfLine } from '../../store/standing';
import { readOpenWarnings, readWarningsOfLine } from '../../store/warnings';
import { readWorksOfLine } from '../../store/works';
import { lineSummary } from '../../view/line-summary';
import type { Site } from '../site';

const DAY_MS = 86_400_000;
const HISTORY_DAYS = 60;
const PAST_WARNINGS = 200;

/** Every line as a list shows it. */
export async function readLineList(site: Site): Promise<LineList> {
  const register = await readRegister(site.store);
  const lines = await readSummaries(site, register, await readOpenWarnings(site.store));
  return { at: new Date(site.now()).toISOString(), nearRatio: site.settings.NEAR_RATIO, lines };
}

/** One line with its terminals, settings and warnings; undefined when the register does not hold it. */
export async function readLineDetail(site: Site, key: string): Promise<LineDetail | undefined> {
  const registered = await readRegisterLine(site.store, key);
  if (registered === undefined) return undefined;
  const warnings = await readWarningsOfLine(site.store, registered.id, PAST_WARNINGS);
  const [line] = await readSummaries(
    site,
    [registered],
    warnings.filter(({ state }) => state !== 'normal'),
  );
  return {
    at: new Date(site.now()).toISOString(),
    nearRatio: site.settings.NEAR_RATIO,
    line: line!,
    terminals: registered.terminals,
    result: site.live.results().get(key) ?? null,
    settings: registered.settings.toReversed(),
    standing: await readVerdictsOfLine(site.store, registered.id),
    warnings,
    works: await readWorksOfLine(site.store, registered.id),
  };
}

async function readSummaries(
  { store, live, now, settings }: Site,
  register: readonly RegisteredLine[],
  openWarnings: readonly Warning[],
): Promise<LineSummary[]> {
  const nowMs = now();
  const lineIds = register.map(({ id }) => id);
  const to = new Date(nowMs);
  const [hours, days, creep] = await Promise.all([
    readLevelFigures(store, 'hour', { lineIds, from: new Date(nowMs - DAY_MS), to }),
    readLevelFigures(store, 'day', { lineIds, from: new Date(nowMs - HISTORY_DAYS * DAY_MS), to }),
    readCreep(store, lineIds),
  ]);
  const hoursOf = groupedBy(hours, ({ lineId }) => lineId);
  const daysOf = groupedBy(days, ({ lineId }) => lineId);
  const warningsOf = groupedBy(openWarnings, ({ line }) => line);
  return register.map((line) =>
    lineSummary(line, {
      result: live.results().get(line.key),
      hours: hoursOf.get(line.id) ?? [],
      days: daysOf.get(line.id) ?? [],
      creep: creep.get(line.id) ?? [],
      warnings: warningsOf.get(line.key) ?? [],
      nowMs,
      silentAfterMs: settings.PERIOD_MS * SILENT_PERIODS,
      nominalFrequencyHz: settings.NOMINAL_FREQUENCY_HZ,
    }),
  );
}

/** A result older than this many periods no longer says where a line stands, whatever condition it carries. */
const SILENT_PERIODS = 10;
