import { describe, expect, it } from 'vitest';
import { staleHours } from '../../../src/ingest/rungs/stale-hours';
import { registeredLine, rosterLine } from '../made-up-feed';

const LINE = rosterLine();
const OTHER = rosterLine(registeredLine({ id: 8, key: 'corl-dorn' }));
const at = (time: string): number => Date.parse(`2026-03-02T${time}Z`);
const NOW_MS = at('12:20:00');
const hours = (...snapshots: { line: typeof LINE; atMs: number }[]) =>
  staleHours(snapshots, NOW_MS).map(({ lineId, start }) => `${lineId} ${start.toISOString().slice(11, 16)}`);

describe('the hours that snapshots make stale', () => {
  it('are those that were closed when they came', () => {
    expect(hours({ line: LINE, atMs: at('12:19:58') })).toEqual([]);
    expect(hours({ line: LINE, atMs: at('11:30:00') })).toEqual(['7 11:00']);
  });

  it('are named once a line', () => {
    const late = ['09:00:00', '09:00:02', '09:31:00'].map((time) => ({ line: LINE, atMs: at(time) }));
    expect(hours(...late, { line: OTHER, atMs: at('09:00:00') })).toEqual(['7 09:00', '8 09:00']);
  });

  it('are two at the end of an hour, since the next one’s first snapshot is judged against it', () => {
    expect(hours({ line: LINE, atMs: at('09:59:58') })).toEqual(['7 09:00', '7 10:00']);
    expect(hours({ line: LINE, atMs: at('11:59:58') })).toEqual(['7 11:00']);
  });
});
