import { LIVE_LIMITS, type LiveFrame } from '../contract/live';
import type { Result } from '../contract/result';
import type { Warning } from '../contract/warning';

/** One browser's end: what the hub may ask of it. */
export interface Listener {
  /** keys of the lines it asked for; undefined for all */
  readonly lines: ReadonlySet<string> | undefined;
  waitingBytes(): number;
  send(frame: string): void;
}

/** The newest of everything, and who listens to it. */
export interface LiveHub {
  /** newest result of each line heard of, by key */
  results(): ReadonlyMap<string, Result>;
  takeResult(result: Result): void;
  takeWarnings(warnings: readonly Warning[]): void;
  /** Adds a browser; it gets the newest of everything with the next tick. The function returned takes it out again. */
  listen(listener: Listener): () => void;
  listenerCount(): number;
  close(): void;
}

interface Versioned<T> {
  readonly value: T;
  readonly json: string;
  /** number of the change, counted over everything the hub takes */
  readonly change: number;
}

const WARNINGS_REMEMBERED = 2_000;

/**
 * Sends each browser, once a tick, the newest of what has changed since its last frame. Nothing is queued: a
 * browser that reads slowly is passed over until it has drained, and then gets the newest state.
 */
export function createLiveHub(now: () => number): LiveHub {
  const results = new Map<string, Versioned<Result>>();
  const warnings = new Map<number, Versioned<Warning>>();
  const newest = new Map<string, Result>();
  /** each listener with the last change it has been sent */
  const listeners = new Map<Listener, number>();
  let change = 0;
  let ticked = 0;

  const frameSince = (since: number, lines: Listener['lines']) =>
    tickFrame(
      { results: results.values(), warnings: warnings.values() },
      { since, lines, at: new Date(now()) },
    );

  const tick = () => {
    if (listeners.size === 0 || (change === ticked && isAllSent(listeners, change))) return;
    // whoever is up to date and wants everything gets one shared string
    let shared: string | undefined | null = null;
    for (const [listener, sent] of listeners) {
      if (sent === change || listener.waitingBytes() > LIVE_LIMITS.waitingBytes) continue;
      const isShared = sent === ticked && listener.lines === undefined;
      if (isShared && shared === null) shared = frameSince(ticked, undefined);
      const text = isShared ? shared : frameSince(sent, listener.lines);
      if (text !== undefined && text !== null) listener.send(text);
      listeners.set(listener, change);
    }
    ticked = change;
  };

  const beat = () => {
    const heartbeat: LiveFrame = { kind: 'heartbeat', at: new Date(now()).toISOString() };
    const text = JSON.stringify(heartbeat);
    for (const listener of listeners.keys())
      if (listener.waitingBytes() <= LIVE_LIMITS.waitingBytes) listener.send(text);
  };

  const timers = [setInterval(tick, LIVE_LIMITS.tickMs), setInterval(beat, LIVE_LIMITS.heartbeatMs)];

  return {
    results: () => newest,
    takeResult(result) {
      newest.set(result.line, result);
      results.set(result.line, { value: result, json: JSON.stringify(result), change: (change += 1) });
    },
    takeWarnings(changed) {
      for (const warning of changed) {
        const json = JSON.stringify(warning);
        if (warnings.get(warning.id)?.json === json) continue;
        warnings.delete(warning.id);
        warnings.set(warning.id, { value: warning, json, change: (change += 1) });
        if (warnings.size > WARNINGS_REMEMBERED) warnings.delete(warnings.keys().next().value!);
      }
    },
    listen(listener) {
      listeners.set(listener, 0);
      return () => void listeners.delete(listener);
    },
    listenerCount: () => listeners.size,
    close: () => timers.forEach((timer) => clearInterval(timer)),
  };
}

/** What has changed since a change, of the lines asked for, as one frame; undefined when nothing has. */
function tickFrame(
  held: { results: Iterable<Versioned<Result>>; warnings: Iterable<Versioned<Warning>> },
  { since, lines, at }: { since: number; lines: Listener['lines']; at: Date },
): string | undefined {
  const fresh = <T>(entries: Iterable<Versioned<T>>, lineOf: (value: T) => string) =>
    [...entries].flatMap(({ change, value, json }) =>
      change > since && (lines === undefined || lines.has(lineOf(value))) ? [json] : [],
    );
  const results = fresh(held.results, (result) => result.line);
  const warnings = fresh(held.warnings, (warning) => warning.line);
  if (results.length === 0 && warnings.length === 0) return undefined;
  return `{"kind":"tick","at":"${at.toISOString()}","results":[${results.join()}],"warnings":[${warnings.join()}]}`;
}

function isAllSent(listeners: ReadonlyMap<Listener, number>, change: number): boolean {
  for (const sent of listeners.values()) if (sent !== change) return false;
  return true;
}
