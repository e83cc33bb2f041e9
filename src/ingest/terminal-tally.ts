import type { TerminalStateRow } from '../store/feed';

/** What has been heard of each terminal: presence, newest instant, and the gaps in its count. */
export interface TerminalTally {
  recall(rows: readonly TerminalStateRow[]): void;
  hear(terminalId: number, measurement: { atMs: number; seq: number; heardAtMs: number }): void;
  presence(terminalId: number, presence: 'online' | 'offline'): void;
  /** the terminals whose row has changed since the last call */
  drain(): TerminalStateRow[];
  isEmpty(): boolean;
}

export function createTerminalTally(): TerminalTally {
  const states = new Map<number, TerminalStateRow>();
  const changed = new Set<number>();

  const stateOf = (terminalId: number): TerminalStateRow => {
    let state = states.get(terminalId);
    if (state === undefined) states.set(terminalId, (state = unheard(terminalId)));
    changed.add(terminalId);
    return state;
  };

  return {
    recall: (rows) => rows.forEach((row) => states.set(row.terminalId, { ...row })),
    hear(terminalId, { atMs, seq, heardAtMs }) {
      const state = stateOf(terminalId);
      // a count that has fallen back is a restarted terminal or a repetition, not a gap
      const skipped = state.lastSeq === null ? 0 : seq - state.lastSeq - 1;
      if (skipped > 0) {
        state.gapCount += 1;
        state.missedCount += skipped;
      }
      if (state.lastAt === null || atMs > state.lastAt.getTime()) {
        state.lastAt = new Date(atMs);
        state.lastSeq = seq;
      }
      state.heardAt = new Date(heardAtMs);
    },
    presence: (terminalId, presence) => void (stateOf(terminalId).presence = presence),
    drain() {
      const rows = [...changed].map((id) => ({ ...states.get(id)! }));
      changed.clear();
      return rows;
    },
    isEmpty: () => changed.size === 0,
  };
}

const unheard = (terminalId: number): TerminalStateRow => ({
  terminalId,
  presence: null,
  lastAt: null,
  heardAt: null,
  lastSeq: null,
  gapCount: 0,
  missedCount: 0,
});
