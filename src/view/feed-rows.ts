import type { FeedTerminal } from '../contract/feed-health';
import { isStale } from './staleness';

export const FEED_SORTS = ['worst', 'line', 'gaps', 'missed'] as const;
export type FeedSort = (typeof FEED_SORTS)[number];

/** How a terminal's feed stands. Only `heard` is as it should be; `resting` is silent and meant to be. */
export type FeedStanding = 'never heard' | 'offline' | 'silent' | 'heard' | 'resting';

export interface FeedRow extends FeedTerminal {
  readonly standing: FeedStanding;
  /** since the last message; undefined when there never was one */
  readonly silentMs: number | undefined;
  /** from the newest instant to its receipt: what the way here takes; undefined when there never was one */
  readonly wayMs: number | undefined;
}

export interface FeedListState {
  readonly search: string;
  readonly sort: FeedSort;
}

export function feedListState(parameters: URLSearchParams): FeedListState {
  const asked = parameters.get('sort');
  return {
    search: parameters.get('q')?.trim() ?? '',
    sort: FEED_SORTS.find((sort) => sort === asked) ?? 'worst',
  };
}

/** Terminals that match every word of the search, in the order asked for, as they stand at an instant. */
export function feedRows(terminals: readonly FeedTerminal[], state: FeedListState, nowMs: number): FeedRow[] {
  const words = state.search.toLowerCase().split(/\s+/).filter(Boolean);
  return terminals
    .map((terminal) => feedRow(terminal, nowMs))
    .filter((row) => words.every((word) => searchedText(row).includes(word)))
    .sort((one, other) => compared(one, other, state.sort) || byLine(one, other));
}

/** How many terminals stand in each way. */
export function feedCounts(rows: readonly FeedRow[]): Record<FeedStanding, number> {
  const counts: Record<FeedStanding, number> = {
    'never heard': 0,
    offline: 0,
    silent: 0,
    heard: 0,
    resting: 0,
  };
  for (const { standing } of rows) counts[standing] += 1;
  return counts;
}

function feedRow(terminal: FeedTerminal, nowMs: number): FeedRow {
  const heardMs = terminal.heardAt === null ? undefined : Date.parse(terminal.heardAt);
  const lastMs = terminal.lastAt === null ? undefined : Date.parse(terminal.lastAt);
  return {
    ...terminal,
    standing: standing(terminal, { heardMs, nowMs }),
    silentMs: heardMs === undefined ? undefined : Math.max(0, nowMs - heardMs),
    wayMs: heardMs === undefined || lastMs === undefined ? undefined : heardMs - lastMs,
  };
}

function standing(
  { expected, presence }: FeedTerminal,
  { heardMs, nowMs }: { heardMs: number | undefined; nowMs: number },
): FeedStanding {
  if (!isStale(heardMs, nowMs)) return 'heard';
  if (!expected) return 'resting';
  if (heardMs === undefined) return 'never heard';
  return presence === 'offline' ? 'offline' : 'silent';
}

const searchedText = (row: FeedRow): string =>
  [row.lineName, row.line, row.terminal, row.substationName, row.standing].join(' ').toLowerCase();

function byLine(one: FeedRow, other: FeedRow): number {
  return one.lineName.localeCompare(other.lineName, 'en') || one.terminal.localeCompare(other.terminal, 'en');
}

function compared(one: FeedRow, other: FeedRow, sort: FeedSort): number {
  switch (sort) {
    case 'worst':
      return rank(one) - rank(other) || longestSilence(one, other);
    case 'line':
      return 0;
    case 'gaps':
      return other.gapCount - one.gapCount;
    case 'missed':
      return other.missedCount - one.missedCount;
  }
}

/** Silence from the longest down, then those that are heard, in whose ages of seconds there is no order worth showing. */
function rank({ standing }: FeedRow): number {
  switch (standing) {
    case 'never heard':
      return 0;
    case 'offline':
    case 'silent':
      return 1;
    case 'heard':
      return 2;
    case 'resting':
      return 3;
  }
}

function longestSilence(one: FeedRow, other: FeedRow): number {
  return one.standing === 'heard' ? 0 : (other.silentMs ?? 0) - (one.silentMs ?? 0);
}
