/** The load of one bench: lines of two terminals each, every terminal a connection of its own. */
export const LOAD = { lines: 25, instantsALine: 1_200, runs: 3 } as const;
export const MEASUREMENTS = LOAD.lines * 2 * LOAD.instantsALine;

export const lineKey = (index: number): string => `bench-${String(index).padStart(2, '0')}`;

/** What the bench's own processes tell their parent. */
export type BenchMessage =
  { kind: 'ready' } | { kind: 'published'; firstMs: number } | { kind: 'received'; lastMs: number };
