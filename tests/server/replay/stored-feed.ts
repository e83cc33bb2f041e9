import type { Measurement } from '../../../src/contract/feed';
import { inTransaction, type Store } from '../../../src/store/client';
import { packMeasurements } from '../../../src/store/packing';
import type { RegisteredLine } from '../../../src/store/register';
import { type SnapshotRow, writeSnapshots } from '../../../src/store/snapshots';
import { balanced, iso, measurement } from '../../ingest/made-up-feed';
import { snapshotRowOf } from '../../store/made-up-rows';

export type Terminals = Readonly<Record<string, Measurement>>;

/** Load of `amps` into Arden that comes out at Birk but for `differentialAmps`. */
export const through = (
  amps: number,
  differentialAmps: number,
  change: Partial<Measurement> = {},
): Terminals => ({
  arden: measurement({ current: balanced(amps, 0) }),
  birk: measurement({ current: balanced(amps - differentialAmps, 180), ...change }),
});

/** A raw row as the worker leaves it, as far as a replay reads it: the instant and what the terminals sent. */
export function feedRow(line: RegisteredLine, atMs: number, sent: Terminals): SnapshotRow {
  const terminals = Object.entries(sent).map(([key, one]) => ({
    terminalId: line.terminalIds.get(key)!,
    measurement: { ...one, at: iso(atMs) },
  }));
  return snapshotRowOf(line, atMs, null, { phasors: packMeasurements(terminals) });
}

export const storeFeed = (store: Store, rows: readonly SnapshotRow[]): Promise<void> =>
  inTransaction(store, (connection) => writeSnapshots(connection, rows));
