import { beforeEach, describe, expect, it } from 'vitest';
import { inTransaction } from '../../src/store/client';
import { packMeasurements } from '../../src/store/packing';
import { snapshot } from '../../src/store/schema/snapshots';
import {
  readNewestInstants,
  readSnapshotBefore,
  readSnapshotFigures,
  readSnapshots,
  readSnapshotsAt,
  writeSnapshots,
} from '../../src/store/snapshots';
import { testStore } from '../database';
import { measurement } from '../ingest/made-up-feed';
import { snapshotRowOf, storeRows } from './made-up-rows';

const LINE = { id: 7 };
// an hour that the test's own time zone skips: instants are kept in UTC
const AT_MS = Date.parse('2026-03-29T01:30:00.250Z');
const at = (offsetMs: number): Date => new Date(AT_MS + offsetMs);
const store = await testStore();
beforeEach(async () => void (await store.db.delete(snapshot)));

const all = () => readSnapshots(store, LINE.id, { from: at(-60_000), to: at(60_000), most: 100 });

describe('raw rows', () => {
  it('come back exactly as they were written, to the millisecond and the last digit', async () => {
    const phasors = packMeasurements([{ terminalId: 11, measurement: measurement() }]);
    const row = snapshotRowOf(LINE, AT_MS, 8.123456789012345, { phasors, settingRecordId: 3, flags: 64 });
    await storeRows(store, [row]);
    expect(await all()).toEqual([row]);
  });

  it('without a differential come back as null, not as 0', async () => {
    await storeRows(store, [snapshotRowOf(LINE, AT_MS, null)]);
    const [row] = await all();
    expect(row).toMatchObject({ differentialAAmps: null, utilisationC: null, throughAmps: null, flags: 1 });
  });

  it('written again are corrected in place, all but their line and instant', async () => {
    await storeRows(store, [snapshotRowOf(LINE, AT_MS, null), snapshotRowOf(LINE, AT_MS + 2_000, 9)]);
    const corrected = snapshotRowOf(LINE, AT_MS, 12, { settingRecordId: 4 });
    await storeRows(store, [corrected]);
    expect(await all()).toEqual([corrected, snapshotRowOf(LINE, AT_MS + 2_000, 9)]);
  });

  it('written twice with the same figures are there once', async () => {
    const rows = [0, 2_000, 4_000].map((offset) => snapshotRowOf(LINE, AT_MS + offset, 9));
    await storeRows(store, rows);
    await storeRows(store, rows);
    expect(await all()).toEqual(rows);
  });

  it('of a transaction that fails are not there', async () => {
    await expect(
      inTransaction(store, async (connection) => {
        await writeSnapshots(connection, [snapshotRowOf(LINE, AT_MS, 9)]);
        throw new Error('The worker was called away.');
      }),
    ).rejects.toThrow('called away');
    expect(await all()).toEqual([]);
  });

  it('of no snapshot need no statement', async () => {
    await storeRows(store, []);
    expect(await all()).toEqual([]);
  });
});

describe('reading raw rows', () => {
  const offsets = [0, 2_000, 4_000, 6_000];
  beforeEach(() =>
    storeRows(store, [
      ...offsets.map((offset) => snapshotRowOf(LINE, AT_MS + offset, offset)),
      snapshotRowOf({ id: 8 }, AT_MS + 2_000, 500),
    ]),
  );
  const offsetsOf = (rows: readonly { at: Date }[]) => rows.map((row) => row.at.getTime() - AT_MS);

  it('takes a window’s start and leaves its end, oldest first, and no more than asked for', async () => {
    const window = { from: at(2_000), to: at(6_000) };
    expect(offsetsOf(await readSnapshots(store, 7, { ...window, most: 9 }))).toEqual([2_000, 4_000]);
    expect(offsetsOf(await readSnapshots(store, 7, { ...window, most: 1 }))).toEqual([2_000]);
    expect(offsetsOf(await readSnapshotFigures(store, 7, window))).toEqual([2_000, 4_000]);
  });

  it('of figures leaves the packed phasors where they are', async () => {
    const [figures] = await readSnapshotFigures(store, 7, { from: at(0), to: at(1) });
    expect(figures).not.toHaveProperty('phasors');
  });

  it('at given instants finds those of that very line', async () => {
    const asked = [0, 2_000, 99_000].map((offset) => ({ lineId: 7, at: at(offset) }));
    const rows = await readSnapshotsAt(store, [...asked, { lineId: 8, at: at(2_000) }]);
    expect(rows.map((row) => [row.lineId, row.at.getTime() - AT_MS]).sort()).toEqual([
      [7, 0],
      [7, 2_000],
      [8, 2_000],
    ]);
    expect(await readSnapshotsAt(store, [])).toEqual([]);
  });

  it('before an instant finds the newest, or none', async () => {
    expect((await readSnapshotBefore(store, 7, at(4_000)))?.at).toEqual(at(2_000));
    expect(await readSnapshotBefore(store, 7, at(0))).toBeUndefined();
  });

  it('finds the newest instant of each line that has one', async () => {
    expect(await readNewestInstants(store, [7, 8, 9])).toEqual(
      new Map([
        [7, at(6_000)],
        [8, at(2_000)],
      ]),
    );
    expect(await readNewestInstants(store, [])).toEqual(new Map());
  });
});
