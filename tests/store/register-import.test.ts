import { asc } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { IMPORT_KINDS } from '../../src/contract/register-import';
import { registerFile } from '../../src/records/register-files';
import { registerPlan } from '../../src/records/register-plan';
import { readRegister, readRegisterRevision } from '../../src/store/register';
import { insertLine } from '../../src/store/register-edit';
import { dryImport, readImportBatches, writeImport, type Plan } from '../../src/store/register-import';
import { importBatch } from '../../src/store/schema/imports';
import { auditEntry } from '../../src/store/schema/people';
import { line, substation } from '../../src/store/schema/register';
import { testStore } from '../database';
import { newLine, settingsSent, terminalSent } from '../register/made-up-line';

const editing = { by: { id: 'p1', name: 'Mira Holt' }, nowMs: Date.parse('2026-03-02T08:00:00Z') };
const store = await testStore();
beforeEach(async () => {
  await emptied();
  await store.db.delete(auditEntry);
  await store.db.delete(importBatch);
});

async function emptied(): Promise<void> {
  await store.db.delete(line);
  await store.db.delete(substation);
}

const planOf =
  (text: string): Plan =>
  (register) =>
    registerPlan(text, register);
const write = (text: string, revision?: number) =>
  writeImport(store, { plan: planOf(text), fileName: 'file.csv', revision }, editing);

async function twoLines(): Promise<void> {
  const inZoneTransformer = { otherVoltageKv: 110, clockNumber: 5, otherTerminals: ['birk'] };
  const alpha = {
    characteristic: { kind: 'alpha-plane', pickupAmps: 100, radius: 6, angleDeg: 195 },
    restraint: { kind: 'none' },
    validFrom: '2026-05-01T00:00:00.000Z',
  };
  await insertLine(store, newLine({ settings: [settingsSent(), settingsSent(alpha)] }), editing);
  await insertLine(store, newLine({ key: 'corl-dorn', name: 'Corl – Dorn', inZoneTransformer }), editing);
}

/** The register without what the database numbers by itself. */
const meant = async () =>
  (await readRegister(store)).map(({ id: _id, terminalIds: _ids, settings, ...rest }) => ({
    ...rest,
    settings: settings.map(({ id: _version, ...version }) => version),
  }));

describe('an export', () => {
  it('that comes back changes nothing, not even the revision', async () => {
    await twoLines();
    const [before, revision] = [await readRegister(store), await readRegisterRevision(store)];
    for (const kind of IMPORT_KINDS)
      expect(await write(registerFile(kind, before))).toMatchObject({ written: false, problems: [] });
    expect([await readRegister(store), await readRegisterRevision(store)]).toEqual([before, revision]);
    expect(await readImportBatches(store, 10)).toEqual([]);
  });

  it('builds the same register where there was none', async () => {
    await twoLines();
    const before = await meant();
    const files = IMPORT_KINDS.map((kind) => registerFile(kind, before as never));
    await emptied();
    for (const text of files) expect(await write(text)).toMatchObject({ written: true, problems: [] });
    expect(await meant()).toEqual(before);
  });
});

describe('an import', () => {
  it('that is only looked at writes nothing', async () => {
    await twoLines();
    const text = registerFile('lines', await readRegister(store)).replaceAll('42.5', '43');
    const [before, revision] = [await readRegister(store), await readRegisterRevision(store)];
    const report = await dryImport(store, planOf(text));
    expect(report).toMatchObject({ written: false, batch: null, revision, problems: [] });
    expect(report.rows.map(({ outcome, fields }) => [outcome, fields])).toEqual([
      ['changed', ['length_km']],
      ['changed', ['length_km']],
    ]);
    expect([await readRegister(store), await readRegisterRevision(store)]).toEqual([before, revision]);
  });

  it('is written in one step, counted once, and audited row by row', async () => {
    await twoLines();
    await store.db.delete(auditEntry);
    const revision = await readRegisterRevision(store);
    const text = registerFile('lines', await readRegister(store)).replaceAll('42.5', '43');
    const report = await write(text, revision);
    expect(report).toMatchObject({ written: true, revision: revision + 1 });
    expect((await readRegister(store)).map(({ lengthKm }) => lengthKm)).toEqual([43, 43]);
    expect(await readRegisterRevision(store)).toBe(revision + 1);
    const audited = await store.db.select().from(auditEntry).orderBy(asc(auditEntry.id));
    expect(audited.map(({ userName, action, subject }) => [userName, action, subject])).toEqual([
      ['Mira Holt', 'line changed', 'arden-birk'],
      ['Mira Holt', 'line changed', 'corl-dorn'],
    ]);
    expect(JSON.stringify(audited[0]!.detail)).toContain(`"importBatch":${report.batch}`);
    expect(await readImportBatches(store, 10)).toMatchObject([
      {
        ...{ id: report.batch, importedBy: 'Mira Holt', kind: 'lines', fileName: 'file.csv' },
        ...{ addedCount: 0, changedCount: 2, leftCount: 0 },
      },
    ]);
  });

  it('with a problem in one row writes none of the others', async () => {
    await twoLines();
    const text = registerFile('lines', await readRegister(store))
      .replace('42.5', '43')
      .replace('corl-dorn,Corl – Dorn,220', 'corl-dorn,Corl – Dorn,-1');
    const before = await readRegister(store);
    expect(await write(text)).toMatchObject({
      written: false,
      problems: [{ row: 3, field: 'voltage_kv', problem: 'The voltage is above 0.' }],
    });
    expect(await readRegister(store)).toEqual(before);
  });

  it('of a register that has moved on since it was looked at is not written', async () => {
    await twoLines();
    const text = registerFile('lines', await readRegister(store)).replaceAll('42.5', '43');
    const { revision } = await dryImport(store, planOf(text));
    await insertLine(store, newLine({ key: 'x', terminals: [terminalSent('x')], settings: [] }), editing);
    expect(await write(text, revision)).toMatchObject({ written: false, problems: [] });
    expect((await readRegister(store)).every(({ lengthKm }) => lengthKm === 42.5)).toBe(true);
  });
});
