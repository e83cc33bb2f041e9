import { describe, expect, it } from 'vitest';
import type { BoardCounts } from '../../src/view/board';
import { WHOLE_BOARD } from '../../src/view/board-query';
import { boardSentence, queryWords } from '../../src/view/board-sentence';

const NONE: BoardCounts = {
  over: 0,
  near: 0,
  rising: 0,
  blind: 0,
  'not evaluated': 0,
  'out of service': 0,
  settled: 0,
  stale: 0,
  all: 0,
};
const told = (counts: Partial<BoardCounts>, lastLive?: string) =>
  boardSentence({ ...NONE, ...counts }, lastLive)
    .map(({ words }) => words)
    .join('');

describe("the Board's sentence", () => {
  it.each([
    [{ all: 24, settled: 24 }, 'All 24 lines are settled.'],
    [{ all: 1, settled: 1 }, 'The one line is settled.'],
    [
      { all: 24, settled: 21, near: 1, rising: 1, blind: 1 },
      '21 of 24 lines are settled. One is near, one rising, one cannot be seen.',
    ],
    [
      { all: 24, settled: 20, over: 1, near: 2, 'out of service': 1 },
      '20 of 24 lines are settled. One is over, two are near, one is out of service.',
    ],
    [{ all: 3, blind: 3 }, 'None of 3 lines is settled. Three cannot be seen.'],
    [{ all: 2, settled: 1, stale: 1 }, '1 of 2 lines is settled. One has no fresh value.'],
    [{ all: 40, settled: 27, near: 13 }, '27 of 40 lines are settled. 13 are near.'],
  ])('says %o', (counts, sentence) => expect(told(counts)).toBe(sentence));

  it('speaks of the past, with its time, once the stream is lost', () => {
    expect(told({ all: 24, settled: 22, near: 1, blind: 1 }, '14:32:08')).toBe(
      'At 14:32:08, 22 of 24 lines were settled. One was near, one could not be seen.',
    );
  });

  it('links each of its coloured words to the lines it speaks of', () => {
    const pieces = boardSentence({ ...NONE, all: 3, settled: 1, near: 1, blind: 1 });
    expect(pieces.flatMap(({ state }) => state ?? [])).toEqual(['near', 'blind']);
  });
});

describe('its second line', () => {
  it('says order and filters in words', () => {
    expect(queryWords(WHOLE_BOARD, undefined)).toBe('Worst first · all substations · all voltages');
    const narrowed = {
      ...WHOLE_BOARD,
      substation: 'hask',
      voltageKv: 220,
      condition: 'near',
      sort: 'name',
    } as const;
    expect(queryWords(narrowed, 'Hask')).toBe('By name · lines at Hask · 220\u00a0kV · only near');
  });
});
