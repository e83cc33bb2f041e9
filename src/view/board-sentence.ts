import type { BoardCounts } from './board';
import type { BoardQuery, ShownState } from './board-query';
import { kilovoltsText } from './figures';

/** A piece of the Board's sentence; one with a state is a link that shows those lines alone. */
export interface SentencePiece {
  readonly words: string;
  readonly state?: ShownState;
}

const NUMBERS = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];
const numberWord = (count: number): string => NUMBERS[count] ?? `${count}`;
const uncapital = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);
const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** How each state goes on after its count; the verb is dropped where the one before already gave it. */
const GOES_ON: readonly {
  readonly state: ShownState;
  readonly words: (count: number, now: boolean) => { verb: string; rest: string };
}[] = [
  { state: 'over', words: (count, now) => ({ verb: be(count, now), rest: 'over' }) },
  { state: 'near', words: (count, now) => ({ verb: be(count, now), rest: 'near' }) },
  { state: 'rising', words: (count, now) => ({ verb: be(count, now), rest: 'rising' }) },
  { state: 'blind', words: (_, now) => ({ verb: now ? 'cannot' : 'could not', rest: 'be seen' }) },
  {
    state: 'stale',
    words: (count, now) => ({ verb: now ? (count === 1 ? 'has' : 'have') : 'had', rest: 'no fresh value' }),
  },
  { state: 'not evaluated', words: (count, now) => ({ verb: be(count, now), rest: 'not evaluated' }) },
  { state: 'out of service', words: (count, now) => ({ verb: be(count, now), rest: 'out of service' }) },
];

const be = (count: number, now: boolean): string =>
  now ? (count === 1 ? 'is' : 'are') : count === 1 ? 'was' : 'were';

/**
 * The state of the network as a sentence: "21 of 24 lines are settled. One is near, one rising."
 * When the stream is lost it speaks of the instant at which it was last live, in the past tense: what is old is
 * never told as if it were so now.
 */
export function boardSentence(counts: BoardCounts, lastLive?: string): SentencePiece[] {
  const now = lastLive === undefined;
  const first = settledWords(counts, now);
  const pieces: SentencePiece[] = [{ words: now ? `${first}.` : `At ${lastLive}, ${uncapital(first)}.` }];
  let verbBefore: string | undefined;
  for (const { state, words } of GOES_ON) {
    const count = counts[state];
    if (count === 0) continue;
    const { verb, rest } = words(count, now);
    const told = [numberWord(count), verb === verbBefore ? '' : verb, rest]
      .filter((word) => word !== '')
      .join(' ');
    pieces.push({ words: verbBefore === undefined ? ' ' : ', ' });
    pieces.push({ words: verbBefore === undefined ? capital(told) : told, state });
    verbBefore = verb;
  }
  return verbBefore === undefined ? pieces : [...pieces, { words: '.' }];
}

function settledWords(counts: BoardCounts, now: boolean): string {
  const { settled, all } = counts;
  if (settled === all)
    return all === 1 ? `The one line ${be(1, now)} settled` : `All ${all} lines ${be(2, now)} settled`;
  if (settled === 0)
    return all === 1
      ? `The one line ${be(1, now)} not settled`
      : `None of ${all} lines ${be(1, now)} settled`;
  return `${settled} of ${all} lines ${be(settled, now)} settled`;
}

const SORT_WORDS: Readonly<Record<BoardQuery['sort'], string>> = {
  worst: 'Worst first',
  name: 'By name',
  voltage: 'Highest voltage first',
  utilisation: 'Highest utilisation first',
};

/** The sentence's second line: order and filters in words. */
export function queryWords(query: BoardQuery, substationName: string | undefined): string {
  const parts = [
    SORT_WORDS[query.sort],
    query.substation === undefined ? 'all substations' : `lines at ${substationName ?? query.substation}`,
    query.voltageKv === undefined ? 'all voltages' : kilovoltsText(query.voltageKv),
  ];
  if (query.condition !== undefined)
    parts.push(query.condition === 'stale' ? 'only without a fresh value' : `only ${query.condition}`);
  if (query.text.trim() !== '') parts.push(`matching “${query.text.trim()}”`);
  if (query.group === 'substation') parts.push('settled lines under each of their ends');
  return parts.join(' · ');
}
