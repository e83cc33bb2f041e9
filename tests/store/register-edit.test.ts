import { desc } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import {
  newSettingsVersionSchema,
  newTerminalSchema,
  type InZoneTransformer,
} from '../../src/contract/register';
import {
  readRegister,
  readRegisterLine,
  readRegisterRevision,
  settingsInForce,
} from '../../src/store/register';
import {
  insertLine,
  insertSettingsVersion,
  insertTerminal,
  patchLine,
  patchTerminal,
  removeTerminal,
} from '../../src/store/register-edit';
import { terminalState } from '../../src/store/schema/feed';
import { auditEntry } from '../../src/store/schema/people';
import { line, substation } from '../../src/store/schema/register';
import { testStore } from '../database';
import { newLine, settingsSent, terminalSent } from '../register/made-up-line';

const nowMs = Date.parse('2026-03-02T08:00:00Z');
const editing = { by: { id: 'p1', name: 'Mira Holt' }, nowMs };

const store = await testStore();
beforeEach(async () => {
  await store.db.delete(line);
  await store.db.delete(substation);
  await store.db.delete(auditEntry);
});

const terminal = (key: string) => newTerminalSchema.parse(terminalSent(key));
const version = (change: Record<string, unknown> = {}) =>
  newSettingsVersionSchema.parse(settingsSent(change));
const audited = async () => (await store.db.select().from(auditEntry).orderBy(desc(auditEntry.id)))[0];

describe('adding a line', () => {
  it('is read back with its terminals in order and its settings', async () => {
    const added = await insertLine(store, newLine(), editing);
    const read = await readRegisterLine(store, 'arden-birk');
    expect(added).toEqual({ ok: true, line: read });
    expect(read).toMatchObject({
      name: 'Arden – Birk',
      voltageKv: 220,
      capacitanceNfPerKm: 8.9,
      goesBy: 'phasors',
      inService: true,
      inZoneTransformer: null,
      terminals: [
        { key: 'arden', position: 0, substationName: 'Arden', inService: true },
        { key: 'birk', position: 1, substationName: 'Birk', ctPrimaryAmps: 1000 },
      ],
      settings: [
        {
          validFrom: '2026-03-01T10:00:00.000Z',
          characteristic: settingsSent().characteristic,
          restraint: { kind: 'scaled-sum', factor: 0.5 },
          recordedBy: 'Mira Holt',
          recordedAt: '2026-03-02T08:00:00.000Z',
        },
      ],
    });
  });

  it('keeps a transformer inside the zone as it was given', async () => {
    const inZoneTransformer = {
      ...{ otherVoltageKv: 110, clockNumber: 11, otherTerminals: ['birk'] },
      removesZeroSequence: { line: true, other: false },
    };
    await insertLine(store, newLine({ inZoneTransformer, leastInternalFaultAmps: 1850 }), editing);
    const read = await readRegisterLine(store, 'arden-birk');
    expect(read).toMatchObject({ inZoneTransformer, leastInternalFaultAmps: 1850 });
  });

  it('reads a transformer that was kept before its terminals were, with none behind it', async () => {
    await insertLine(store, newLine(), editing);
    const kept = { otherVoltageKv: 110, clockNumber: 11 } as unknown as InZoneTransformer;
    await store.db.update(line).set({ inZoneTransformer: kept });
    expect((await readRegisterLine(store, 'arden-birk'))?.inZoneTransformer).toEqual({
      ...{ ...kept, otherTerminals: [] },
      removesZeroSequence: { line: true, other: true },
    });
  });

  it('names a terminal behind a transformer that the line does not have', async () => {
    const transformer = (otherTerminals: string[]) =>
      newLine({ inZoneTransformer: { otherVoltageKv: 110, clockNumber: 5, otherTerminals } });
    const field = 'inZoneTransformer.otherTerminals';
    const none = await insertLine(store, transformer(['corl']), editing);
    const all = await insertLine(store, transformer(['arden', 'birk']), editing);
    for (const refused of [none, all])
      expect(refused).toMatchObject({ ok: false, problem: { fields: [{ field }] } });
    await insertLine(store, transformer(['birk']), editing);
    const gone = { key: 'arden-birk', terminalKey: 'birk' };
    expect(await removeTerminal(store, gone, editing)).toMatchObject({ ok: false, kind: 'not allowed' });
  });

  it('with a key that is taken says so and writes nothing', async () => {
    await insertLine(store, newLine(), editing);
    const revision = await readRegisterRevision(store);
    const again = await insertLine(
      store,
      newLine({ name: 'Another', terminals: [terminalSent('corl')] }),
      editing,
    );
    expect(again).toMatchObject({ ok: false, kind: 'taken', problem: { fields: [{ field: 'key' }] } });
    expect(await readRegister(store)).toHaveLength(1);
    expect((await store.db.select().from(substation)).map(({ key }) => key).sort()).toEqual([
      'arden',
      'birk',
    ]);
    expect(await readRegisterRevision(store)).toBe(revision);
  });

  it('with impossible settings names each field and writes nothing', async () => {
    const impossible = {
      kind: 'two-slope',
      pickupAmps: 0,
      slope1: 3,
      kneeAmps: -1,
      slope2: -0.1,
      slopeStart: 'from-pickup',
    };
    const refused = await insertLine(
      store,
      newLine({
        settings: [
          settingsSent({ characteristic: impossible, restraint: { kind: 'scaled-sum', factor: 1.5 } }),
        ],
      }),
      editing,
    );
    expect(refused).toMatchObject({ ok: false, kind: 'not allowed' });
    expect(!refused.ok && refused.problem.fields.map(({ field }) => field)).toEqual([
      'settings.0.characteristic.pickupAmps',
      'settings.0.characteristic.slope1',
      'settings.0.characteristic.kneeAmps',
      'settings.0.characteristic.slope2',
      'settings.0.restraint.factor',
    ]);
    expect(await readRegister(store)).toEqual([]);
  });

  it('with two terminals of one key or two versions of one instant names the second', async () => {
    const twice = newLine({
      terminals: [terminalSent('arden'), terminalSent('arden')],
      settings: [settingsSent(), settingsSent({ validFrom: '2026-03-01T11:00:00+01:00' })],
    });
    const refused = await insertLine(store, twice, editing);
    expect(!refused.ok && refused.problem.fields.map(({ field }) => field)).toEqual([
      'terminals.1.key',
      'settings.1.validFrom',
    ]);
  });

  it('may not give a known substation another name', async () => {
    await insertLine(store, newLine(), editing);
    const contradicting = { ...terminalSent('x'), substation: 'arden', substationName: 'Ardenne' };
    const refused = await insertLine(store, newLine({ key: 'other', terminals: [contradicting] }), editing);
    expect(refused).toMatchObject({
      ok: false,
      problem: { fields: [{ field: 'terminals.0.substationName' }] },
    });
    expect(await readRegisterLine(store, 'other')).toBeUndefined();
  });
});

describe('changing a line', () => {
  it('leaves what the patch leaves out, and audits before and after', async () => {
    await insertLine(store, newLine(), editing);
    const changed = await patchLine(store, { key: 'arden-birk', patch: { lengthKm: 43 } }, editing);
    expect(changed).toMatchObject({ ok: true, line: { lengthKm: 43, voltageKv: 220, name: 'Arden – Birk' } });
    expect(await audited()).toMatchObject({
      userId: 'p1',
      userName: 'Mira Holt',
      action: 'line changed',
      subject: 'arden-birk',
    });
  });

  it('records who owns it and takes that away again, each before and after in the audit trail', async () => {
    await insertLine(store, newLine(), editing);
    const patched = async (owner: string | null) => {
      const edit = await patchLine(store, { key: 'arden-birk', patch: { owner } }, editing);
      return [edit.ok && edit.line.owner, (await audited())?.detail];
    };
    expect(await patched('Pellwater Networks')).toEqual([
      'Pellwater Networks',
      { before: { owner: null }, after: { owner: 'Pellwater Networks' } },
    ]);
    expect(await patched(null)).toEqual([
      null,
      { before: { owner: 'Pellwater Networks' }, after: { owner: null } },
    ]);
    const revision = await readRegisterRevision(store);
    await patched(null);
    expect(await readRegisterRevision(store)).toBe(revision);
    await insertLine(store, newLine({ key: 'corl-dorn', owner: 'Tarnside Transmission' }), editing);
    expect((await audited())?.detail).toMatchObject({ owner: 'Tarnside Transmission' });
    expect((await readRegisterLine(store, 'corl-dorn'))?.owner).toBe('Tarnside Transmission');
  });

  it('holds a rating against the emergency rating that stands', async () => {
    await insertLine(store, newLine(), editing);
    const refused = await patchLine(store, { key: 'arden-birk', patch: { ratingAmps: 1300 } }, editing);
    expect(refused).toMatchObject({
      ok: false,
      kind: 'not allowed',
      problem: { fields: [{ field: 'emergencyRatingAmps' }] },
    });
  });

  it('of a key that the register has not is refused as unknown', async () => {
    expect(await patchLine(store, { key: 'nowhere', patch: { lengthKm: 1 } }, editing)).toMatchObject({
      ok: false,
      kind: 'unknown',
    });
  });
});

describe('terminals', () => {
  const key = 'arden-birk';

  it('are added after those that are there, up to six', async () => {
    await insertLine(store, newLine(), editing);
    for (const name of ['c', 'd', 'e', 'f'])
      await insertTerminal(store, { key, entry: terminal(name) }, editing);
    const seventh = await insertTerminal(store, { key, entry: terminal('g') }, editing);
    expect(seventh).toEqual({
      ok: false,
      kind: 'not allowed',
      problem: { problem: 'A line has at most 6 terminals.', fields: [] },
    });
    const positions = (await readRegisterLine(store, key))?.terminals.map(
      (one) => `${one.position} ${one.key}`,
    );
    expect(positions).toEqual(['0 arden', '1 birk', '2 c', '3 d', '4 e', '5 f']);
  });

  it('of one line differ in their keys', async () => {
    await insertLine(store, newLine(), editing);
    expect(await insertTerminal(store, { key, entry: terminal('birk') }, editing)).toMatchObject({
      ok: false,
      kind: 'taken',
      problem: { fields: [{ field: 'key' }] },
    });
  });

  it('go out of service and stay in the register', async () => {
    await insertLine(store, newLine(), editing);
    const changed = await patchTerminal(
      store,
      { key, terminalKey: 'birk', patch: { inService: false } },
      editing,
    );
    expect(changed.ok && changed.line.terminals[1]).toMatchObject({
      key: 'birk',
      inService: false,
      ctPrimaryAmps: 1000,
    });
  });

  it('move to a new substation, and rename the one they are at', async () => {
    await insertLine(store, newLine(), editing);
    const nameless = await patchTerminal(
      store,
      { key, terminalKey: 'birk', patch: { substation: 'dorn' } },
      editing,
    );
    expect(nameless).toMatchObject({ ok: false, problem: { fields: [{ field: 'substationName' }] } });
    const patch = { substation: 'dorn', substationName: 'Dorn' };
    const moved = await patchTerminal(store, { key, terminalKey: 'birk', patch }, editing);
    expect(moved.ok && moved.line.terminals[1]).toMatchObject({ substation: 'dorn', substationName: 'Dorn' });
    const renamed = await patchTerminal(
      store,
      { key, terminalKey: 'birk', patch: { substationName: 'Dorn East' } },
      editing,
    );
    expect(renamed.ok && renamed.line.terminals[1]?.substationName).toBe('Dorn East');
  });

  it('that were never heard can be removed, and the rest close up', async () => {
    await insertLine(store, newLine(), editing);
    await insertTerminal(store, { key, entry: terminal('c') }, editing);
    const removed = await removeTerminal(store, { key, terminalKey: 'birk' }, editing);
    expect(removed.ok && removed.line.terminals.map((one) => [one.position, one.key])).toEqual([
      [0, 'arden'],
      [1, 'c'],
    ]);
  });

  it('that have been heard cannot be removed', async () => {
    const added = await insertLine(store, newLine(), editing);
    const terminalId = added.ok ? added.line.terminalIds.get('birk')! : 0;
    const at = new Date(nowMs);
    await store.db.insert(terminalState).values({
      terminalId,
      presence: 'online',
      lastAt: at,
      heardAt: at,
      lastSeq: 1,
      gapCount: 0,
      missedCount: 0,
    });
    expect(await removeTerminal(store, { key, terminalKey: 'birk' }, editing)).toMatchObject({
      ok: false,
      kind: 'taken',
    });
    expect(await removeTerminal(store, { key, terminalKey: 'none' }, editing)).toMatchObject({
      ok: false,
      kind: 'unknown',
    });
  });
});

describe('settings', () => {
  const key = 'arden-birk';

  it('are in force from their instant until the next one', async () => {
    await insertLine(store, newLine(), editing);
    await insertSettingsVersion(
      store,
      { key, version: version({ validFrom: '2026-06-01T00:00:00Z', note: 'Raised.' }) },
      editing,
    );
    await insertSettingsVersion(
      store,
      { key, version: version({ validFrom: '2026-04-01T00:00:00Z', note: 'Lowered.' }) },
      editing,
    );
    const settings = (await readRegisterLine(store, key))?.settings ?? [];
    const noteAt = (instant: string) => settingsInForce(settings, Date.parse(instant))?.note;
    expect(noteAt('2026-03-01T09:59:59.999Z')).toBeUndefined();
    expect(noteAt('2026-03-01T10:00:00.000Z')).toBe('As commissioned.');
    expect(noteAt('2026-05-31T23:59:59.999Z')).toBe('Lowered.');
    expect(noteAt('2026-06-01T00:00:00.000Z')).toBe('Raised.');
  });

  it('of one instant are recorded once, however the instant is written', async () => {
    await insertLine(store, newLine(), editing);
    const same = version({ validFrom: '2026-03-01T11:00:00+01:00' });
    expect(await insertSettingsVersion(store, { key, version: same }, editing)).toMatchObject({
      ok: false,
      kind: 'taken',
      problem: { fields: [{ field: 'validFrom' }] },
    });
  });

  it('that no scheme can have are refused beside their fields', async () => {
    await insertLine(store, newLine(), editing);
    const characteristic = { ...(settingsSent().characteristic as object), kneeAmps: 100, slope2: 0.1 };
    const refused = await insertSettingsVersion(
      store,
      { key, version: version({ validFrom: '2026-07-01T00:00:00Z', characteristic }) },
      editing,
    );
    expect(!refused.ok && refused.problem.fields).toEqual([
      {
        field: 'characteristic.kneeAmps',
        problem: 'The knee must be at or beyond 400 A, where the first slope leaves the pickup.',
      },
      { field: 'characteristic.slope2', problem: 'The second slope must not be below the first slope.' },
    ]);
  });
});

describe('settings of each kind', () => {
  const key = 'arden-birk';
  const errors = (name: string) => ({
    terminal: name,
    errorBelow: 0.01,
    errorAbove: 0.05,
    limitAmps: 2400,
  });
  const adaptive = {
    kind: 'adaptive',
    pickupAmps: 80,
    ctErrors: [errors('arden'), errors('birk')],
    timeErrorMs: 0.2,
  };
  const alphaPlane = { kind: 'alpha-plane', pickupAmps: 100, radius: 6, angleDeg: 195 };
  const comparison = { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 120 };
  const none = { kind: 'none' };
  const recorded = (change: Record<string, unknown>) =>
    insertSettingsVersion(store, { key, version: version({ ...later, ...change }) }, editing);
  const later = { validFrom: '2026-07-01T00:00:00.000Z' };

  it.each([
    ['two slopes', { restraint: { kind: 'maximum' }, chargingCompensation: true }],
    ['adaptive', { characteristic: adaptive, restraint: { kind: 'error-sum' }, chargingCompensation: false }],
    ['alpha plane', { characteristic: alphaPlane, restraint: none, chargingCompensation: false }],
    ['phase comparison', { characteristic: comparison, restraint: none, chargingCompensation: true }],
  ])('are read back as they were recorded: %s', async (_kind, scheme) => {
    await insertLine(store, newLine(), editing);
    const edit = await recorded(scheme);
    expect(edit.ok && edit.line.settings.at(-1)).toMatchObject({ ...later, ...scheme });
  });

  it.each([
    [{ ...alphaPlane, radius: 1 }, none, 'characteristic.radius'],
    [{ ...alphaPlane, angleDeg: 361 }, none, 'characteristic.angleDeg'],
    [{ ...alphaPlane, pickupAmps: -5 }, none, 'characteristic.pickupAmps'],
    [{ ...comparison, toleranceDeg: -1 }, none, 'characteristic.toleranceDeg'],
    [{ ...adaptive, ctErrors: [errors('arden')] }, { kind: 'error-sum' }, 'characteristic.ctErrors'],
    [alphaPlane, { kind: 'maximum' }, 'restraint.kind'],
  ])('that are impossible are refused beside their field: %o', async (characteristic, restraint, field) => {
    await insertLine(store, newLine(), editing);
    const refused = await recorded({ characteristic, restraint });
    expect(refused).toMatchObject({ ok: false, kind: 'not allowed' });
    expect(!refused.ok && refused.problem.fields.map((found) => found.field)).toEqual([field]);
  });

  it('compare phases of two terminals only', async () => {
    await insertLine(store, newLine(), editing);
    await insertTerminal(store, { key, entry: terminal('corl') }, editing);
    const refused = await recorded({ characteristic: comparison, restraint: none });
    expect(!refused.ok && refused.problem.fields).toEqual([
      {
        field: 'characteristic.kind',
        problem: 'A phase comparison weighs two terminals against each other; this line has 3.',
      },
    ]);
  });

  it('compensate the charging only where the capacitance is recorded', async () => {
    await insertLine(store, newLine({ capacitanceNfPerKm: null }), editing);
    const refused = await recorded({ chargingCompensation: true });
    expect(!refused.ok && refused.problem.fields.map(({ field }) => field)).toEqual(['chargingCompensation']);
  });
});

describe('the revision', () => {
  it('counts up with every change, and not with one that changes nothing', async () => {
    const key = 'arden-birk';
    const start = await readRegisterRevision(store);
    const since = async () => (await readRegisterRevision(store)) - start;
    await insertLine(store, newLine(), editing);
    expect(await since()).toBe(1);
    await patchLine(store, { key, patch: { name: 'Arden – Birk 1' } }, editing);
    await insertTerminal(store, { key, entry: terminal('c') }, editing);
    await patchTerminal(store, { key, terminalKey: 'c', patch: { ctPrimaryAmps: 400 } }, editing);
    await removeTerminal(store, { key, terminalKey: 'c' }, editing);
    await insertSettingsVersion(
      store,
      { key, version: version({ validFrom: '2026-08-01T00:00:00Z' }) },
      editing,
    );
    expect(await since()).toBe(6);
    expect(await patchLine(store, { key, patch: { name: 'Arden – Birk 1' } }, editing)).toMatchObject({
      ok: true,
    });
    expect(await since()).toBe(6);
  });

  it('loses none of several changes made at once', async () => {
    const start = await readRegisterRevision(store);
    const edits = await Promise.all(
      ['one', 'two', 'three', 'one'].map((key) => insertLine(store, newLine({ key }), editing)),
    );
    expect(edits.filter(({ ok }) => ok)).toHaveLength(3);
    expect((await readRegisterRevision(store)) - start).toBe(3);
  });
});
