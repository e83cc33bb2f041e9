import type { CompositionOnWire } from '../contract/composition';
import type { SettingsVersion } from '../contract/settings-version';
import type { Comparison, StandingMark, StandingVerdict } from '../contract/standing';
import { causeAmps } from './composition-polygon';
import type { PolygonCause } from './composition-polygon';
import { intervalText } from './composition-words';
import { ampsText, dateText } from './figures';
import { DASH } from './line-figures';
import type { LineTable, TableColumn } from './line-table';
import { wallTimeTyped } from './register-instant';
import type { PhaseLetters, SiteCustom } from './site-custom';

/** The date as the page's address holds it; what is no date of the calendar is told from what is not there. */
export type ComparedDate =
  | { readonly kind: 'none' }
  | { readonly kind: 'no date'; readonly typed: string }
  | { readonly kind: 'date'; readonly day: string };

export function comparedDate(value: string | null): ComparedDate {
  if (value === null || value.trim() === '') return { kind: 'none' };
  const typed = value.trim();
  const atMs = /^\d{4}-\d{2}-\d{2}$/.test(typed) ? Date.parse(`${typed}T00:00:00Z`) : Number.NaN;
  const isDay = Number.isFinite(atMs) && new Date(atMs).toISOString().startsWith(typed);
  return isDay ? { kind: 'date', day: typed } : { kind: 'no date', typed };
}

/** The site's day of an instant, as the address of a comparison wants it. */
export const comparedDay = (instant: string, timeZone: string): string =>
  wallTimeTyped(instant, timeZone).slice(0, 10);

/** Marks of a verdict that stand nowhere else on the page. */
const MARKED: Readonly<Partial<Record<StandingMark['kind'], string>>> = {
  'channel path changed': 'the channel’s path changed',
  'terminals changed': 'terminals changed',
};

/** A date that something is known of, worth comparing across. */
export interface KnownChange {
  readonly day: string;
  readonly words: string;
}

/** Changes that are known of, newest first; the first version changed nothing, and recorded works stand by themselves. */
export function knownChanges(
  settings: readonly SettingsVersion[],
  standing: readonly StandingVerdict[],
  { timeZone, phaseLetters }: SiteCustom,
): KnownChange[] {
  const versions = [...settings].sort(
    (one, other) => Date.parse(one.validFrom) - Date.parse(other.validFrom),
  );
  const changes = versions
    .slice(1)
    .map(({ validFrom }) => ({ instant: validFrom, words: 'settings changed' }));
  const steps = standing.flatMap(({ phase, step }) =>
    step === null ? [] : [{ instant: step.at, words: `phase ${phaseLetters[phase]} stepped` }],
  );
  const dated = [...changes, ...steps].map(({ instant, words }) => ({
    day: comparedDay(instant, timeZone),
    words,
  }));
  const marks = standing
    .flatMap(({ marks: own }) => own)
    .flatMap(({ on, kind }) => {
      const words = MARKED[kind];
      return words === undefined ? [] : [{ day: on, words }];
    });
  const all = [...dated, ...marks].sort((one, other) => other.day.localeCompare(one.day));
  return [...new Map(all.map((change) => [`${change.day} ${change.words}`, change])).values()];
}

export const dayText = (day: string): string => dateText(`${day}T12:00:00Z`, 'UTC');

type ComparedPhase = Comparison['phases'][number];

/**
 * What changed across the date, in a sentence with its interval and p; or why that can't be told. At one and the same
 * load where both sides have a composition: a winter against a summer differs by its load as well.
 */
export function comparisonSentence(
  { phase, before, after, test, atReference }: ComparedPhase,
  { day, letters }: { day: string; letters: PhaseLetters },
): string {
  const name = `phase ${letters[phase]}`;
  const told = atReference?.test ?? test;
  if (told === null && Math.min(before.days, after.days) >= DAYS_ENOUGH)
    return `The standing level of ${name} drifts too much by itself to tell a shift on ${dayText(day)} from it: median ${ampsText(before.medianAmps)} on ${daysWords(before.days)} before, ${ampsText(after.medianAmps)} on ${daysWords(after.days)} after.`;
  if (told === null)
    return `For ${name} there are ${daysWords(before.days)} with a standing level before ${dayText(day)} and ${daysWords(after.days)} after it: too few to tell whether it has changed.`;
  const isAtOneLoad = told === atReference?.test;
  const load = isAtOneLoad ? ` at one and the same load (${ampsText(atReference!.throughAmps)} through)` : '';
  const [from, to] = isAtOneLoad
    ? [atReference!.beforeAmps, atReference!.afterAmps]
    : [before.medianAmps, after.medianAmps];
  const medians = `median ${ampsText(from)} on ${daysWords(before.days)} before, ${ampsText(to)} on ${daysWords(after.days)} after`;
  return `After ${dayText(day)} ${shiftWords(told, `the standing level of ${name}${load}`)}; ${medians}.`;
}

function shiftWords({ shiftAmps, pTwoSided }: NonNullable<ComparedPhase['test']>, level: string): string {
  const { value, low, high } = shiftAmps;
  if (low <= 0 && high >= 0) {
    const digits = digitsOf(Math.max(Math.abs(low), Math.abs(high)));
    return `no shift of ${level} can be told: ${signedAmps(value, digits)} (95 %: ${intervalText(shiftAmps, digits)}), ${pWords(pTwoSided)}`;
  }
  const sizes = { value: Math.abs(value), low: Math.abs(low), high: Math.abs(high) };
  const limits = { ...sizes, low: Math.min(sizes.low, sizes.high), high: Math.max(sizes.low, sizes.high) };
  return (
    `${level} is ${value < 0 ? 'lower' : 'higher'} by ${ampsText(sizes.value)} ` +
    `(95 %: ${intervalText(limits, digitsOf(sizes.value))}), ${pWords(pTwoSided)}`
  );
}

/** With so many days on either side it is not for want of days that nothing can be told. */
const DAYS_ENOUGH = 8;

const daysWords = (days: number): string => `${days} ${days === 1 ? 'day' : 'days'}`;
const digitsOf = (amps: number): number => (amps < 0.95 ? 2 : amps < 9.95 ? 1 : 0);

function signedAmps(amps: number, digits: number): string {
  const size = Math.abs(amps).toFixed(digits);
  return `${Number(size) === 0 ? '' : amps < 0 ? '−' : '+'}${size}\u00a0A`;
}

const pWords = (p: number): string => (p < 0.0001 ? 'p\u00a0<\u00a00.0001' : `p\u00a0=\u00a0${p.toFixed(4)}`);

const CAUSES = ['charging', 'ratio', 'angle', 'rest'] as const satisfies readonly PolygonCause[];

/** Both sides of every phase in figures; empty where a side can't tell. */
export function comparisonTable(
  { phases, at }: Comparison,
  { letters, name }: { letters: PhaseLetters; name: string },
): LineTable {
  const amps = (head: string): TableColumn => ({ kind: 'figure', head: `${head}, A`, digits: 2 });
  const count = (head: string): TableColumn => ({ kind: 'figure', head, digits: 0 });
  return {
    caption: `${name} before and after ${dayText(at)}`,
    columns: [
      { kind: 'text', head: 'phase' },
      count('days before'),
      count('days after'),
      amps('median before'),
      amps('median after'),
      amps('shift'),
      amps('shift from'),
      amps('shift to'),
      { kind: 'text', head: 'p' },
      amps('at one load, before'),
      amps('at one load, after'),
      amps('shift at one load'),
      { kind: 'text', head: 'p at one load' },
      ...CAUSES.flatMap((cause) => [amps(`${cause} before`), amps(`${cause} after`)]),
    ],
    rows: phases.map(({ phase, before, after, test, atReference }) => [
      letters[phase],
      before.days,
      after.days,
      before.medianAmps,
      after.medianAmps,
      test?.shiftAmps.value ?? null,
      test?.shiftAmps.low ?? null,
      test?.shiftAmps.high ?? null,
      pCell(test),
      atReference?.beforeAmps ?? null,
      atReference?.afterAmps ?? null,
      atReference?.test?.shiftAmps.value ?? null,
      pCell(atReference?.test ?? null),
      ...CAUSES.flatMap((cause) => [sideAmps(before.composition, cause), sideAmps(after.composition, cause)]),
    ]),
  };
}

const pCell = (test: ComparedPhase['test']): string | null =>
  test === null ? null : String(Number(test.pTwoSided.toPrecision(2)));

/** The same figures with a row each and a column a phase, as they are read on a screen. */
export function turnedTable({ columns, rows }: LineTable): { heads: string[]; rows: string[][] } {
  const shown = (cell: string | number | null | undefined, column: TableColumn): string => {
    if (cell === null || cell === undefined) return DASH;
    if (typeof cell !== 'number' || column.kind !== 'figure') return String(cell);
    // a nought has no sign
    return cell.toFixed(column.digits).replace(/^-(?=[0.]*$)/, '');
  };
  const [first, ...others] = columns.map((column, at) => [
    column.head,
    ...rows.map((row) => shown(row[at], column).replace(/^-/, '−')),
  ]);
  return { heads: first ?? [], rows: others };
}

/** Null where the side is not separable, and for charging that no voltage tells. */
function sideAmps(composition: CompositionOnWire, cause: PolygonCause): number | null {
  if (composition.kind !== 'separated' || composition.polygon === null) return null;
  if (cause === 'charging' && composition.chargingAmps === null) return null;
  return causeAmps(composition.polygon, cause);
}

/** The phase worth looking at first: the one with the greatest shift, where any was tested. */
export function mostMovedPhase({ phases }: Comparison): ComparedPhase['phase'] {
  const size = ({ test, atReference }: ComparedPhase) =>
    Math.abs((atReference?.test ?? test)?.shiftAmps.value ?? 0);
  return phases.reduce((most, each) => (size(each) > size(most) ? each : most), phases[0]!).phase;
}
