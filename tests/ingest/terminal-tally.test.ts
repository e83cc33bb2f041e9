import { describe, expect, it } from 'vitest';
import { createTerminalTally } from '../../src/ingest/terminal-tally';
import { AT_MS } from './made-up-feed';

/** A tally to which terminal 11 has sent these counts, one a period, each heard 100 ms after its instant. */
function heard(...seqs: number[]) {
  const tally = createTerminalTally();
  seqs.forEach((seq, period) => {
    const atMs = AT_MS + period * 2_000;
    tally.hear(11, { atMs, seq, heardAtMs: atMs + 100 });
  });
  return tally;
}
const stateOf = (tally: ReturnType<typeof createTerminalTally>) => tally.drain()[0];

describe('what is known of a terminal', () => {
  it('is its newest instant and count, and when that was heard', () => {
    expect(stateOf(heard(1, 2, 3))).toEqual({
      terminalId: 11,
      presence: null,
      lastAt: new Date(AT_MS + 4_000),
      heardAt: new Date(AT_MS + 4_100),
      lastSeq: 3,
      gapCount: 0,
      missedCount: 0,
    });
  });

  it.each([
    ['none in a steady count', [5, 6, 7], 0, 0],
    ['one by a jump of one', [5, 7], 1, 1],
    ['one by a jump of ten', [5, 16], 1, 10],
    ['two', [1, 3, 4, 8], 2, 4],
    ['none by a count that starts again', [900, 901, 1, 2], 0, 0],
    ['none by a repetition', [5, 5, 6], 0, 0],
  ] as const)('counts gaps: %s', (_, seqs, gapCount, missedCount) => {
    expect(stateOf(heard(...seqs))).toMatchObject({ gapCount, missedCount, lastSeq: seqs.at(-1) });
  });

  it('keeps its newest instant when an older measurement is delivered again', () => {
    const tally = heard(1, 2, 3);
    tally.hear(11, { atMs: AT_MS, seq: 1, heardAtMs: AT_MS + 60_000 });
    expect(stateOf(tally)).toMatchObject({
      lastAt: new Date(AT_MS + 4_000),
      lastSeq: 3,
      gapCount: 0,
      heardAt: new Date(AT_MS + 60_000),
    });
  });

  it('goes on from what an earlier run had counted', () => {
    const before = stateOf(heard(1, 4))!;
    const tally = createTerminalTally();
    tally.recall([before]);
    expect(tally.isEmpty()).toBe(true);
    tally.hear(11, { atMs: AT_MS + 60_000, seq: 7, heardAtMs: AT_MS + 60_000 });
    expect(stateOf(tally)).toMatchObject({ gapCount: 2, missedCount: 4, lastSeq: 7 });
  });

  it('is drained once for each change', () => {
    const tally = heard(1);
    tally.presence(11, 'offline');
    expect(stateOf(tally)).toMatchObject({ presence: 'offline', lastSeq: 1 });
    expect(tally.isEmpty()).toBe(true);
    expect(tally.drain()).toEqual([]);
  });
});
