import type { Measurement } from '../contract/feed';
import type { RosterLine } from './roster';

export interface Arrival<Receipt> {
  readonly line: RosterLine;
  readonly terminal: string;
  readonly atMs: number;
  readonly measurement: Measurement;
  /** undefined for a measurement that needs no acknowledgement */
  readonly receipt: Receipt | undefined;
  readonly nowMs: number;
}

/** What has been gathered of a line's snapshot instant, to be stored as it is. */
export interface Gathered<Receipt> {
  readonly line: RosterLine;
  readonly atMs: number;
  readonly measurements: Map<string, Measurement>;
  readonly receipts: Receipt[];
  /** an earlier run of the worker may have stored part of this instant: look before writing */
  readonly mayBeStored: boolean;
}

interface Pending<Receipt> extends Gathered<Receipt> {
  readonly firstAtMs: number;
}

/** Of a complete instant only the fact is kept; of an incomplete one what it had, for a late measurement to complete. */
type Closed = 'complete' | ReadonlyMap<string, Measurement>;

interface LineMemory {
  newestAtMs: number;
  readonly closed: Map<number, Closed>;
}

export const isComplete = (line: RosterLine, measurements: ReadonlyMap<string, Measurement>): boolean =>
  line.expected.length > 0 && line.expected.every((terminal) => measurements.has(terminal));

/**
 * Makes one of what was gathered of the same line and instant at different times. Only so may they be stored
 * together: each alone would be written over the other, and neither would find the other in the store.
 */
export function joined<Receipt>(gathered: readonly Gathered<Receipt>[]): Gathered<Receipt>[] {
  const byInstant = new Map<string, Gathered<Receipt>>();
  for (const entry of gathered) {
    const key = instantKey(entry);
    const earlier = byInstant.get(key);
    byInstant.set(key, earlier === undefined ? entry : joinedPair(earlier, entry));
  }
  return [...byInstant.values()];
}

function joinedPair<Receipt>(earlier: Gathered<Receipt>, later: Gathered<Receipt>): Gathered<Receipt> {
  return {
    line: later.line,
    atMs: later.atMs,
    // the first word of a terminal stands
    measurements: new Map([...later.measurements, ...earlier.measurements]),
    receipts: [...earlier.receipts, ...later.receipts],
    mayBeStored: earlier.mayBeStored || later.mayBeStored,
  };
}

const instantKey = ({ line, atMs }: { line: RosterLine; atMs: number }): string => `${line.key} ${atMs}`;

export interface Alignment<Receipt> {
  /** Takes a measurement; hands back what is ready by it, or that it changed nothing. */
  take(arrival: Arrival<Receipt>): Gathered<Receipt> | 'waiting' | 'duplicate';
  /** Instants that have waited long enough for their missing terminals. */
  due(nowMs: number): Gathered<Receipt>[];
  /** The newest instant that the store holds of a line: whatever is older may be stored already. */
  recall(lineKey: string, newestAtMs: number): void;
  pendingCount(): number;
}

function begun<Receipt>(
  { line, atMs, nowMs }: Arrival<Receipt>,
  { memory, known }: { memory: LineMemory; known: ReadonlyMap<string, Measurement> | undefined },
): Pending<Receipt> {
  // also of an instant that was closed before: its row may hold what an earlier run has heard of it
  const mayBeStored = atMs <= memory.newestAtMs;
  memory.newestAtMs = Math.max(memory.newestAtMs, atMs);
  return { line, atMs, measurements: new Map(known), receipts: [], mayBeStored, firstAtMs: nowMs };
}

/** Brings the terminals of a line together by snapshot instant. Holds no clock: time comes with every call. */
export function createAlignment<Receipt>(limits: {
  latenessMs: number;
  closedRemembered: number;
  pendingMost: number;
}): Alignment<Receipt> {
  // in order of first arrival, which is the order in which they fall due
  const pending = new Map<string, Pending<Receipt>>();
  const memories = new Map<string, LineMemory>();

  const memoryOf = (lineKey: string): LineMemory => {
    let memory = memories.get(lineKey);
    if (memory === undefined) memories.set(lineKey, (memory = { newestAtMs: -Infinity, closed: new Map() }));
    return memory;
  };

  const close = (key: string, entry: Pending<Receipt>): Gathered<Receipt> => {
    pending.delete(key);
    const { closed } = memoryOf(entry.line.key);
    closed.delete(entry.atMs);
    closed.set(entry.atMs, isComplete(entry.line, entry.measurements) ? 'complete' : entry.measurements);
    if (closed.size > limits.closedRemembered) closed.delete(closed.keys().next().value!);
    return entry;
  };

  return {
    take(arrival) {
      const { line, terminal, atMs, measurement, receipt } = arrival;
      const key = instantKey(arrival);
      const known = memoryOf(line.key).closed.get(atMs);
      if (known === 'complete' || known?.has(terminal) === true) return 'duplicate';
      let entry = pending.get(key);
      if (entry === undefined)
        pending.set(key, (entry = begun(arrival, { memory: memoryOf(line.key), known })));
      if (receipt !== undefined) entry.receipts.push(receipt);
      // the first word of a terminal stands: a repetition changes nothing
      if (!entry.measurements.has(terminal)) entry.measurements.set(terminal, measurement);
      return isComplete(line, entry.measurements) ? close(key, entry) : 'waiting';
    },
    due(nowMs) {
      const ready: Gathered<Receipt>[] = [];
      for (const [key, entry] of pending) {
        const waitedMs = nowMs - entry.firstAtMs;
        // a clock that was set back must not keep an instant waiting: below zero it is due as well
        const waits = waitedMs >= 0 && waitedMs < limits.latenessMs;
        if (waits && pending.size <= limits.pendingMost) break;
        ready.push(close(key, entry));
      }
      return ready;
    },
    recall(lineKey, newestAtMs) {
      const memory = memoryOf(lineKey);
      memory.newestAtMs = Math.max(memory.newestAtMs, newestAtMs);
    },
    pendingCount: () => pending.size,
  };
}
