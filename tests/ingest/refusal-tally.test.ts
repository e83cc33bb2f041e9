import { describe, expect, it } from 'vitest';
import { createRefusalTally } from '../../src/ingest/refusal-tally';

const AT = new Date('2026-03-02T10:00:00.000Z');
const message = (payload: string | Buffer, topic = 'feed/a/b/measurement') => ({
  topic,
  payload: Buffer.from(payload),
});

describe('refusals between two commits', () => {
  it('are counted by reason and kept with topic, detail and instant', () => {
    const tally = createRefusalTally(10);
    expect(tally.isEmpty()).toBe(true);
    tally.add(message('one'), { reason: 'not JSON', detail: 'Unexpected token.' }, AT);
    tally.add(message('two'), { reason: 'not JSON', detail: 'Unexpected token.' }, AT);
    tally.add(message('{}', 'feed/x/b/measurement'), { reason: 'unknown line', detail: 'x' }, AT);
    const { kept, counts } = tally.drain();
    expect(Object.fromEntries(counts)).toEqual({ 'not JSON': 2, 'unknown line': 1 });
    expect(kept[2]).toEqual({
      at: AT,
      topic: 'feed/x/b/measurement',
      reason: 'unknown line',
      detail: 'x',
      payload: Buffer.from('{}'),
    });
    expect(tally.isEmpty()).toBe(true);
    expect(tally.drain()).toEqual({ kept: [], counts: new Map() });
  });

  it('are kept with their payload cut at 2 KB, and with no more of topic and detail than the store holds', () => {
    const tally = createRefusalTally(10);
    tally.add(
      message('x'.repeat(9_000), 't'.repeat(300)),
      { reason: 'over 8 KB', detail: 'd'.repeat(900) },
      AT,
    );
    const [kept] = tally.drain().kept;
    expect([kept?.payload.length, kept?.topic.length, kept?.detail.length]).toEqual([2048, 255, 500]);
  });

  it('are counted in full in a flood, and kept in part', () => {
    const tally = createRefusalTally(3);
    for (let index = 0; index < 1_000; index += 1)
      tally.add(message('x'), { reason: 'not JSON', detail: '' }, AT);
    const { kept, counts } = tally.drain();
    expect(kept).toHaveLength(3);
    expect(counts.get('not JSON')).toBe(1_000);
  });
});
