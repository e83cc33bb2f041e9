import { beforeEach, describe, expect, it } from 'vitest';
import { problemSchema } from '../../src/contract/problem';
import { registerLineSchema } from '../../src/contract/register';
import { ROLES } from '../../src/contract/role';
import { GET as getLine, PATCH as patchLine } from '../../src/pages/api/register/lines/[key]';
import { GET as getSettings, POST as postSettings } from '../../src/pages/api/register/lines/[key]/settings';
import { POST as postTerminal } from '../../src/pages/api/register/lines/[key]/terminals';
import {
  DELETE as deleteTerminal,
  PATCH as patchTerminal,
} from '../../src/pages/api/register/lines/[key]/terminals/[terminal]';
import { GET as getLines, POST as postLine } from '../../src/pages/api/register/lines';
import { line, substation } from '../../src/store/schema/register';
import { testStore } from '../database';
import { answerOf, type Sent } from './endpoint-call';
import { lineSent, settingsSent, terminalSent } from './made-up-line';

const store = await testStore();
beforeEach(async () => {
  await store.db.delete(line);
  await store.db.delete(substation);
});

const params = { key: 'arden-birk' };
const asEngineer = (sent: Sent = {}): Sent => ({ role: 'engineer', ...sent });
const fieldsOf = (body: unknown) =>
  Object.fromEntries(problemSchema.parse(body).fields.map(({ field, problem }) => [field, problem]));

describe('a script', () => {
  it('adds a line in one call and reads it back', async () => {
    const added = await answerOf(store, postLine, asEngineer({ body: lineSent() }));
    expect(added.status).toBe(201);
    expect(registerLineSchema.parse(added.body).terminals.map(({ key }) => key)).toEqual(['arden', 'birk']);
    expect(await answerOf(store, getLine, asEngineer({ params }))).toEqual({ status: 200, body: added.body });
    expect(await answerOf(store, getLines, asEngineer())).toEqual({
      status: 200,
      body: { lines: [added.body] },
    });
  });

  it('changes a line, its terminals and its settings piece by piece', async () => {
    await answerOf(store, postLine, asEngineer({ body: lineSent({ terminals: [], settings: [] }) }));
    for (const key of ['arden', 'birk'])
      expect(
        await answerOf(store, postTerminal, asEngineer({ params, body: terminalSent(key) })),
      ).toMatchObject({ status: 201 });
    expect(
      await answerOf(store, patchLine, asEngineer({ params, body: { name: 'Arden – Birk 1' } })),
    ).toMatchObject({
      status: 200,
      body: { name: 'Arden – Birk 1' },
    });
    const birk = { ...params, terminal: 'birk' };
    expect(
      await answerOf(store, patchTerminal, asEngineer({ params: birk, body: { inService: false } })),
    ).toMatchObject({
      body: { terminals: [{ inService: true }, { inService: false }] },
    });
    expect(await answerOf(store, deleteTerminal, asEngineer({ params: birk }))).toMatchObject({
      status: 200,
      body: { terminals: [{ key: 'arden' }] },
    });
    expect(await answerOf(store, getSettings, asEngineer({ params }))).toMatchObject({
      body: { inForce: null, settings: [] },
    });
    expect(await answerOf(store, postSettings, asEngineer({ params, body: settingsSent() }))).toMatchObject({
      status: 201,
    });
    expect(await answerOf(store, getSettings, asEngineer({ params }))).toMatchObject({
      body: { inForce: expect.any(Number), settings: [{ note: 'As commissioned.' }] },
    });
  });
});

describe('the owner of a line', () => {
  const patched = async (owner: unknown) =>
    answerOf(store, patchLine, asEngineer({ params, body: { owner } }));

  it('is null until it is given, stays when a patch leaves it out, and is taken away by null', async () => {
    expect(await answerOf(store, postLine, asEngineer({ body: lineSent() }))).toMatchObject({
      body: { owner: null },
    });
    expect(await patched(' Pellwater Networks ')).toMatchObject({
      status: 200,
      body: { owner: 'Pellwater Networks' },
    });
    const other = await answerOf(store, patchLine, asEngineer({ params, body: { lengthKm: 43 } }));
    expect(other).toMatchObject({ body: { lengthKm: 43, owner: 'Pellwater Networks' } });
    expect(await patched(null)).toMatchObject({ status: 200, body: { owner: null } });
  });

  it('may come with a new line', async () => {
    const sent = lineSent({ owner: 'Tarnside Transmission' });
    const { body } = await answerOf(store, postLine, asEngineer({ body: sent }));
    expect(registerLineSchema.parse(body).owner).toBe('Tarnside Transmission');
  });

  it('has a name of at most 80 characters', async () => {
    await answerOf(store, postLine, asEngineer({ body: lineSent({ owner: 'Pellwater Networks' }) }));
    for (const [owner, problem] of [
      [' ', 'Give the owner’s name.'],
      ['x'.repeat(81), 'A name has at most 80 characters.'],
    ]) {
      const { status, body } = await patched(owner);
      expect([status, fieldsOf(body)]).toEqual([400, { owner: problem }]);
    }
    expect((await patched(7)).status).toBe(400);
    expect(await answerOf(store, getLine, asEngineer({ params }))).toMatchObject({
      body: { owner: 'Pellwater Networks' },
    });
  });
});

describe('a refusal', () => {
  it('names every field with a sentence', async () => {
    const sent = lineSent({
      key: 'Ärger',
      voltageKv: '220',
      ratingAmps: -1,
      kind: 'tunnel',
      lengthKm: undefined,
      colour: 'red',
    });
    const { status, body } = await answerOf(store, postLine, asEngineer({ body: sent }));
    expect(status).toBe(400);
    expect(fieldsOf(body)).toEqual({
      key: 'A key is 1 to 40 lower-case letters, digits or hyphens.',
      voltageKv: 'The voltage is a number.',
      ratingAmps: 'The rating is above 0.',
      lengthKm: 'The length is a number.',
      kind: 'Give one of overhead, cable, mixed.',
      colour: 'There is no field of the name "colour" here.',
    });
  });

  it('reaches into terminals and settings', async () => {
    const sent = lineSent({
      terminals: [{ ...terminalSent('a'), substation: undefined }],
      settings: [
        { ...settingsSent(), validFrom: 'tomorrow', characteristic: { kind: 'three-slope' }, note: ' ' },
      ],
    });
    const { status, body } = await answerOf(store, postLine, asEngineer({ body: sent }));
    expect(status).toBe(400);
    expect(fieldsOf(body)).toEqual({
      'terminals.0.substation': 'This is missing.',
      'settings.0.validFrom': 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.',
      'settings.0.characteristic.kind': 'Give one of two-slope, adaptive, alpha-plane, phase-comparison.',
      'settings.0.note': 'Say why these settings are recorded.',
    });
  });

  it('of a line with seven terminals is a 400 and writes nothing', async () => {
    const terminals = ['a', 'b', 'c', 'd', 'e', 'f', 'g'].map(terminalSent);
    const { status, body } = await answerOf(store, postLine, asEngineer({ body: lineSent({ terminals }) }));
    expect([status, fieldsOf(body)]).toEqual([400, { terminals: 'A line has at most 6 terminals.' }]);
    expect(await answerOf(store, getLines, asEngineer())).toMatchObject({ body: { lines: [] } });
  });

  it('of impossible settings is a 400 beside the field', async () => {
    await answerOf(store, postLine, asEngineer({ body: lineSent() }));
    const characteristic = { ...(settingsSent().characteristic as object), pickupAmps: 0 };
    const sent = settingsSent({ validFrom: '2026-05-01T00:00:00Z', characteristic });
    const { status, body } = await answerOf(store, postSettings, asEngineer({ params, body: sent }));
    expect([status, Object.keys(fieldsOf(body))]).toEqual([400, ['characteristic.pickupAmps']]);
  });

  it('of what is taken is a 409', async () => {
    await answerOf(store, postLine, asEngineer({ body: lineSent() }));
    const again = [
      await answerOf(store, postLine, asEngineer({ body: lineSent() })),
      await answerOf(store, postTerminal, asEngineer({ params, body: terminalSent('arden') })),
      await answerOf(store, postSettings, asEngineer({ params, body: settingsSent() })),
    ];
    expect(again.map(({ status }) => status)).toEqual([409, 409, 409]);
  });

  it('of an unknown line or terminal is a 404', async () => {
    const nowhere = { key: 'nowhere', terminal: 'nobody' };
    const calls: [Parameters<typeof answerOf>[1], unknown][] = [
      [getLine, undefined],
      [getSettings, undefined],
      [deleteTerminal, undefined],
      [patchLine, { lengthKm: 3 }],
      [patchTerminal, { inService: false }],
      [postTerminal, terminalSent('a')],
      [postSettings, settingsSent()],
    ];
    for (const [endpoint, body] of calls)
      expect(await answerOf(store, endpoint, asEngineer({ params: nowhere, body }))).toMatchObject({
        status: 404,
      });
  });

  it('says when a body is not JSON, not declared as JSON, or too large', async () => {
    const statusOf = async (sent: Sent) => (await answerOf(store, postLine, asEngineer(sent))).status;
    expect(await statusOf({ body: '{"key":' })).toBe(400);
    expect(await statusOf({ body: '{}', contentType: 'text/plain' })).toBe(415);
    expect(await statusOf({ body: `"${'x'.repeat(300_000)}"` })).toBe(413);
  });
});

describe('the guard', () => {
  it('keeps out whoever is not signed in or has no such role', async () => {
    const statuses = async (role: Sent['role']) => [
      (await answerOf(store, getLines, { role })).status,
      (await answerOf(store, postLine, { role, body: lineSent() })).status,
    ];
    expect(await statuses(undefined)).toEqual([401, 401]);
    for (const role of ROLES)
      expect([role, ...(await statuses(role))]).toEqual(
        role === 'engineer' ? [role, 200, 201] : role === 'admin' ? [role, 200, 409] : [role, 403, 403],
      );
  });
});
