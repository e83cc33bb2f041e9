import { type Store, inTransaction } from '../store/client';
import { type TerminalStateRow, writeRefusals, writeTerminalStates } from '../store/feed';
import { type StaleHour, writeStaleHours } from '../store/levels';
import { readSnapshotsAt, type SnapshotRow, writeSnapshots } from '../store/snapshots';
import { openWarning, readStandingWarnings, returnWarning } from '../store/warnings';
import type { Gathered } from './alignment';
import type { WarningChange } from './line-watch';
import { unpackMeasurements } from '../store/packing';
import type { RefusalBatch } from './refusal-tally';

/** Everything that one transaction stores. */
export interface Batch {
  readonly rows: readonly SnapshotRow[];
  readonly refusals: RefusalBatch;
  readonly terminals: readonly TerminalStateRow[];
  readonly warnings: readonly LineChange[];
  readonly staleHours: readonly StaleHour[];
}

export interface LineChange {
  readonly lineId: number;
  readonly change: WarningChange;
}

export async function commitBatch(store: Store, batch: Batch, now: Date): Promise<void> {
  await inTransaction(store, async (connection, db) => {
    await writeSnapshots(connection, batch.rows);
    await writeRefusals(db, { ...batch.refusals, lastAt: now });
    await writeTerminalStates(db, batch.terminals);
    await writeStaleHours(db, batch.staleHours);
    if (batch.warnings.length > 0) await writeWarnings({ ...store, db }, batch.warnings, now);
  });
}

/** The database says what stands, so that a batch written twice after a doubtful commit opens nothing twice. */
async function writeWarnings(store: Store, changes: Batch['warnings'], now: Date): Promise<void> {
  const lineIds = [...new Set(changes.map(({ lineId }) => lineId))];
  const standing = await readStandingWarnings(store, lineIds);
  for (const { lineId, change } of changes) {
    const at = new Date(change.atMs);
    const index = standing.findIndex((warning) => warning.lineId === lineId && warning.kind === change.kind);
    const found = standing[index];
    if (change.turn === 'opens' && found === undefined) {
      const { kind, cause } = change;
      const id = await openWarning(store.db, { lineId, kind, cause, openedAt: at }, now);
      standing.push({ id, lineId, kind, cause });
    }
    if (change.turn === 'returns' && found !== undefined) {
      await returnWarning(store.db, found.id, { returnedAt: at, changedAt: now });
      standing.splice(index, 1);
    }
  }
}

/** Joins what an earlier run stored of these instants to what has been gathered now; what was stored first stands. */
export async function joinStored<Receipt>(
  store: Store,
  gathered: readonly Gathered<Receipt>[],
): Promise<void> {
  const doubtful = gathered.filter(({ mayBeStored }) => mayBeStored);
  if (doubtful.length === 0) return;
  const instants = doubtful.map(({ line, atMs }) => ({ lineId: line.id, at: new Date(atMs) }));
  const rows = await readSnapshotsAt(store, instants);
  const stored = new Map(rows.map((row) => [`${row.lineId} ${row.at.getTime()}`, row]));
  for (const { line, atMs, measurements } of doubtful) {
    const row = stored.get(`${line.id} ${atMs}`);
    if (row === undefined) continue;
    const keys = new Map([...line.terminals.values()].map(({ id, key }) => [id, key]));
    for (const { terminalId, measurement } of unpackMeasurements(row.phasors, row.at)) {
      const key = keys.get(terminalId);
      if (key !== undefined) measurements.set(key, measurement);
    }
  }
}
