import type { Condition } from '../contract/condition';
import type { LineSummary } from '../contract/lines';
import type { BoardQuery, ShownState } from './board-query';
import { needsAttention, severityRank, WORST_FIRST } from './condition-words';
import { worstUtilisation } from './phase-condition';
import { isStale } from './staleness';

/** A line as the Board shows it: what is stale keeps its last condition and is never counted as settled. */
export interface BoardLine {
  readonly line: LineSummary;
  readonly stale: boolean;
}

/** Conditions that rest on a present value; the others say themselves that there is none. */
const RESTS_ON_A_VALUE: readonly Condition[] = ['over', 'near', 'rising', 'settled'];

export function boardLine(line: LineSummary, nowMs: number): BoardLine {
  const atMs = line.at === null ? undefined : Date.parse(line.at);
  return { line, stale: RESTS_ON_A_VALUE.includes(line.condition) && isStale(atMs, nowMs) };
}

/** The state by which a line is counted and filtered. */
export const shownState = ({ line, stale }: BoardLine): ShownState =>
  stale && line.condition === 'settled' ? 'stale' : line.condition;

export type BoardCounts = Readonly<Record<ShownState, number>> & { readonly all: number };

export function boardCounts(lines: readonly BoardLine[]): BoardCounts {
  const counts = { stale: 0, all: lines.length } as Record<ShownState | 'all', number>;
  for (const condition of WORST_FIRST) counts[condition] = 0;
  for (const line of lines) counts[shownState(line)] += 1;
  return counts;
}

export function matches(one: BoardLine, query: BoardQuery): boolean {
  const { line } = one;
  if (query.condition !== undefined && shownState(one) !== query.condition) return false;
  if (query.voltageKv !== undefined && line.voltageKv !== query.voltageKv) return false;
  if (query.substation !== undefined && !line.substations.some(({ key }) => key === query.substation))
    return false;
  const haystack = [line.name, line.key, line.kind, ...line.substations.map(({ name }) => name)]
    .join(' ')
    .toLowerCase();
  return query.text
    .toLowerCase()
    .split(/\s+/)
    .every((word) => haystack.includes(word));
}

const byName = (one: BoardLine, other: BoardLine): number =>
  one.line.name.localeCompare(other.line.name, 'en', { numeric: true });

// A line whose utilisation is unknown is not one at zero: it stands before those that are known.
const utilisationRank = ({ line }: BoardLine): number => worstUtilisation(line) ?? Infinity;

const byUtilisation = (one: BoardLine, other: BoardLine): number => {
  const [left, right] = [utilisationRank(one), utilisationRank(other)];
  return left === right ? 0 : right - left;
};

const byWorst = (one: BoardLine, other: BoardLine): number =>
  severityRank(one.line.condition) - severityRank(other.line.condition) ||
  Number(other.stale) - Number(one.stale) ||
  byUtilisation(one, other);

const ORDERS: Readonly<Record<BoardQuery['sort'], (one: BoardLine, other: BoardLine) => number>> = {
  worst: byWorst,
  name: byName,
  voltage: (one, other) => other.line.voltageKv - one.line.voltageKv,
  utilisation: byUtilisation,
};

export const sorted = (lines: readonly BoardLine[], sort: BoardQuery['sort']): BoardLine[] =>
  [...lines].sort((one, other) => ORDERS[sort](one, other) || byName(one, other));

/** The Board's three parts: what asks for an eye, what is quiet but not known, and what is settled. */
export interface BoardParts {
  readonly attention: readonly BoardLine[];
  readonly quiet: readonly BoardLine[];
  readonly settled: readonly BoardLine[];
}

export function boardParts(lines: readonly BoardLine[], query: BoardQuery): BoardParts {
  const shown = sorted(
    lines.filter((line) => matches(line, query)),
    query.sort,
  );
  return {
    attention: shown.filter(({ line }) => needsAttention(line.condition)),
    quiet: shown.filter(
      ({ line }) => line.condition === 'not evaluated' || line.condition === 'out of service',
    ),
    settled: shown.filter(({ line }) => line.condition === 'settled'),
  };
}

export interface BoardGroup {
  readonly key: string;
  readonly name: string;
  readonly lines: readonly BoardLine[];
}

/** Lines under each of their ends, substations by name: a line of two ends stands in two groups. */
export function bySubstation(lines: readonly BoardLine[]): BoardGroup[] {
  const groups = new Map<string, { name: string; lines: BoardLine[] }>();
  for (const one of lines) {
    for (const { key, name } of one.line.substations) {
      const group = groups.get(key) ?? { name, lines: [] };
      group.lines.push(one);
      groups.set(key, group);
    }
  }
  return [...groups]
    .map(([key, group]) => ({ key, ...group }))
    .sort((one, other) => one.name.localeCompare(other.name, 'en', { numeric: true }));
}

/** What the filters can offer: substations by name, voltages from high to low. */
export function boardChoices(lines: readonly LineSummary[]) {
  const substations = new Map(
    lines.flatMap((line) => line.substations.map(({ key, name }) => [key, name] as const)),
  );
  return {
    substations: [...substations]
      .map(([key, name]) => ({ key, name }))
      .sort((one, other) => one.name.localeCompare(other.name, 'en', { numeric: true })),
    voltagesKv: [...new Set(lines.map((line) => line.voltageKv))].sort((one, other) => other - one),
  };
}
