import type { Measurement } from '../contract/feed';
import type { TerminalResult } from '../contract/result';

/** What one terminal sent for an instant, or that it sent nothing. */
export function terminalOnWire(key: string, sent: Measurement | undefined): TerminalResult {
  return {
    key,
    present: sent !== undefined,
    current: sent?.current ?? null,
    voltage: sent?.voltage ?? null,
    frequencyHz: sent?.frequency ?? null,
    breaker: sent?.breaker ?? null,
    clock: sent?.clock ?? null,
    channel: sent?.channel ?? null,
    validity: sent?.validity ?? null,
    test: sent?.test ?? false,
  };
}
