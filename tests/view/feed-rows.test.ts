import { describe, expect, it } from 'vitest';
import type { FeedTerminal } from '../../src/contract/feed-health';
import { feedCounts, feedListState, feedRows } from '../../src/view/feed-rows';
import { feedSentence, gapsText, refusedText, standingText } from '../../src/view/feed-words';

const NOW_MS = Date.parse('2026-03-02T08:00:00Z');
const heardAgo = (agoMs: number) => new Date(NOW_MS - agoMs).toISOString();
const terminal = (name: string, change: Partial<FeedTerminal> = {}): FeedTerminal => ({
  line: `line-${name}`,
  lineName: `Line ${name}`,
  terminal: name,
  substationName: `Substation ${name}`,
  expected: true,
  presence: 'online',
  lastAt: heardAgo(2_000),
  heardAt: heardAgo(1_000),
  lastSeq: 7,
  gapCount: 0,
  missedCount: 0,
  ...change,
});
const never = { heardAt: null, lastAt: null, lastSeq: null, presence: null } as const;
const usual = { search: '', sort: 'worst' } as const;
const names = (rows: readonly FeedTerminal[]) => rows.map(({ terminal }) => terminal);

const mixed = [
  terminal('a'),
  terminal('b', { heardAt: heardAgo(60_000) }),
  terminal('c', { ...never, expected: false }),
  terminal('d', { heardAt: heardAgo(3_600_000), presence: 'offline' }),
  terminal('e', never),
  terminal('f', { heardAt: heardAgo(400), gapCount: 2, missedCount: 30 }),
];

describe('the list of terminals', () => {
  it('begins with the longest silence and ends with those that are meant to be silent', () => {
    expect(names(feedRows(mixed, usual, NOW_MS))).toEqual(['e', 'd', 'b', 'a', 'f', 'c']);
  });

  it('tells silence, an offline terminal and one never heard apart, in words', () => {
    const words = Object.fromEntries(
      feedRows(mixed, usual, NOW_MS).map((row) => [row.terminal, standingText(row)]),
    );
    expect(words).toEqual({
      a: 'online',
      b: 'online but silent',
      c: 'not expected',
      d: 'offline',
      e: 'never heard',
      f: 'online',
    });
  });

  it('puts the most missed first when asked to', () => {
    expect(names(feedRows(mixed, { search: '', sort: 'missed' }, NOW_MS))[0]).toBe('f');
  });

  it('holds what matches every word of the search, the state among it', () => {
    expect(names(feedRows(mixed, { ...usual, search: 'offline SUBSTATION' }, NOW_MS))).toEqual(['d']);
    expect(feedRows(mixed, { ...usual, search: 'offline line-a' }, NOW_MS)).toEqual([]);
  });

  it('takes its state from the address and anything unknown as usual', () => {
    expect(feedListState(new URLSearchParams('q= hask &sort=gaps'))).toEqual({
      search: 'hask',
      sort: 'gaps',
    });
    expect(feedListState(new URLSearchParams('sort=colour'))).toEqual(usual);
  });

  it('has no silence to tell of a terminal that never spoke', () => {
    expect(feedRows([terminal('e', never)], usual, NOW_MS)[0]).toMatchObject({
      silentMs: undefined,
      wayMs: undefined,
    });
  });
});

describe('the sentence', () => {
  const sentence = (terminals: readonly FeedTerminal[]) =>
    feedSentence(feedCounts(feedRows(terminals, usual, NOW_MS)));

  it('counts only terminals that are expected to be heard', () => {
    expect(sentence(mixed)).toEqual({ well: '2 of 5 terminals are heard', ill: '3 are silent' });
    expect(sentence([terminal('a')])).toEqual({ well: 'The one terminal is heard', ill: undefined });
    expect(sentence([terminal('c', { ...never, expected: false })])).toEqual({
      well: 'No terminal is expected to be heard',
      ill: undefined,
    });
  });

  it('says plainly when nobody is heard', () => {
    expect(sentence([terminal('e', never), terminal('g', never)])).toEqual({
      well: 'No terminal is heard',
      ill: 'All 2 are silent',
    });
  });

  it('of refusals adds up every reason', () => {
    const lastAt = heardAgo(0);
    expect(refusedText([])).toBe('No message refused so far');
    expect(
      refusedText([
        { reason: 'not JSON', count: 12, lastAt },
        { reason: 'over 8 KB', count: 1_700, lastAt },
      ]),
    ).toBe('1,712 messages refused so far');
  });

  it('of gaps tells one from many', () => {
    expect([gapsText({ gapCount: 0, missedCount: 0 }), gapsText({ gapCount: 1, missedCount: 41 })]).toEqual([
      'none',
      '1 gap, 41 missed',
    ]);
  });
});
