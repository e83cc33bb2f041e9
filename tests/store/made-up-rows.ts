import type { NewLine } from '../../src/contract/register';
import type { Store } from '../../src/store/client';
import { packMeasurements } from '../../src/store/packing';
import { readRegisterLine, type RegisteredLine } from '../../src/store/register';
import { insertLine } from '../../src/store/register-edit';
import { inTransaction } from '../../src/store/client';
import { type SnapshotRow, writeSnapshots } from '../../src/store/snapshots';
import { newLine } from '../register/made-up-line';

/** Puts the made-up line into the register, and hands it back with its ids. */
export async function storedLine(
  store: Store,
  change: Record<string, unknown> = {},
): Promise<RegisteredLine> {
  const entry: NewLine = newLine(change);
  const editing = { by: { id: 'p1', name: 'Mira Holt' }, nowMs: Date.parse('2026-03-01T08:00:00Z') };
  const added = await insertLine(store, entry, editing);
  if (!added.ok) throw new Error(added.problem.problem);
  return (await readRegisterLine(store, entry.key))!;
}

/** A raw row of a line: phase b stands 1 A above phase a, phase c 2 A. Null where there is no differential. */
export function snapshotRowOf(
  { id }: { id: number },
  atMs: number,
  differentialAmps: number | null,
  change: Partial<SnapshotRow> = {},
): SnapshotRow {
  const known = <T>(value: T): T | null => (differentialAmps === null ? null : value);
  const above = (amps: number) => (differentialAmps === null ? null : differentialAmps + amps);
  return {
    lineId: id,
    at: new Date(atMs),
    flags: differentialAmps === null ? 1 : 0,
    differentialAAmps: above(0),
    differentialBAmps: above(1),
    differentialCAmps: above(2),
    restraintAAmps: known(400),
    restraintBAmps: known(410),
    restraintCAmps: known(420),
    thresholdAAmps: known(120),
    thresholdBAmps: known(123),
    thresholdCAmps: known(126),
    utilisationA: known((differentialAmps ?? 0) / 120),
    utilisationB: known((differentialAmps ?? 0) / 123),
    utilisationC: known((differentialAmps ?? 0) / 126),
    throughAmps: known(400),
    settingRecordId: null,
    phasors: packMeasurements([]),
    ...change,
  };
}

export const storeRows = (store: Store, rows: readonly SnapshotRow[]): Promise<void> =>
  inTransaction(store, (connection) => writeSnapshots(connection, rows));
