import type { APIContext, APIRoute } from 'astro';
import { beforeEach, describe, expect, it } from 'vitest';
import type { Role } from '../../src/contract/role';
import { GET as getFile } from '../../src/pages/api/register/export/[file].csv';
import { POST as postImport } from '../../src/pages/api/register/import';
import { readRegister } from '../../src/store/register';
import { insertLine } from '../../src/store/register-edit';
import { line, substation } from '../../src/store/schema/register';
import { testStore } from '../database';
import { NOW_MS } from './endpoint-call';
import { newLine } from './made-up-line';

const store = await testStore();
const editing = { by: { id: 'p1', name: 'Mira Holt' }, nowMs: NOW_MS };
beforeEach(async () => {
  await store.db.delete(line);
  await store.db.delete(substation);
  await insertLine(store, newLine(), editing);
});

interface Sent {
  readonly role?: Role | undefined;
  readonly query?: string;
  readonly file?: string;
  readonly body?: BodyInit;
  readonly type?: string;
}

async function called(endpoint: APIRoute, { role = 'engineer', query = '', file, body, type }: Sent) {
  const url = new URL(`https://tareline.example/api/register${query}`);
  const request = new Request(url, {
    method: body === undefined ? 'GET' : 'POST',
    ...(body === undefined ? {} : { body }),
    ...(type === undefined ? {} : { headers: { 'content-type': type } }),
  });
  const person = { id: 'p1', email: 'mira@tareline.example', name: 'Mira Holt', role };
  const site = { store, now: () => NOW_MS };
  const context = { request, url, params: { file }, locals: { site, person } } as unknown as APIContext;
  return (await endpoint(context)) as Response;
}
const exported = async (file: string) => (await called(getFile, { file })).text();
const imported = async (sent: Sent) => {
  const answer = await called(postImport, { type: 'text/csv', ...sent });
  return { status: answer.status, body: (await answer.json()) as Record<string, unknown> };
};

describe('the export', () => {
  it('is a file of each kind, for whoever may see the register', async () => {
    const answer = await called(getFile, { file: 'lines' });
    expect(answer.headers.get('content-type')).toBe('text/csv; charset=utf-8');
    expect(answer.headers.get('content-disposition')).toBe('attachment; filename="lines.csv"');
    expect(await answer.text()).toContain('arden-birk,Arden – Birk,220,1000,1200,42.5,overhead,8.9,');
    expect(await exported('terminals')).toContain('arden-birk,birk,birk,Birk,1000,,yes,no');
    expect(await exported('settings')).toContain(',two-slope,120,0.3,1500,0.6,from-zero,scaled-sum,0.5,');
    expect((await called(getFile, { file: 'people' })).status).toBe(404);
    expect((await called(getFile, { file: 'lines', role: 'operator' })).status).toBe(403);
  });
});

describe('the import', () => {
  it('only looks unless it is told to write', async () => {
    const body = (await exported('lines')).replace('42.5', '43');
    expect(await imported({ body })).toMatchObject({ status: 200, body: { kind: 'lines', written: false } });
    expect((await readRegister(store))[0]?.lengthKm).toBe(42.5);
    expect(await imported({ body, query: '?dry=false' })).toMatchObject({
      status: 200,
      body: { written: true, rows: [{ row: 2, outcome: 'changed', fields: ['length_km'] }] },
    });
    expect((await readRegister(store))[0]?.lengthKm).toBe(43);
  });

  it('tells the owner that it would record before it records it', async () => {
    expect(await exported('lines')).toContain(',owner,');
    const body = (await exported('lines')).replace(',yes,no,,', ',yes,no,Pellwater Networks,');
    const ownerNow = async () => (await readRegister(store))[0]?.owner;
    const row = { row: 2, outcome: 'changed', fields: ['owner'] };
    expect(await imported({ body })).toMatchObject({ body: { written: false, problems: [], rows: [row] } });
    expect(await ownerNow()).toBeNull();
    expect(await imported({ body, query: '?dry=false' })).toMatchObject({
      body: { written: true, rows: [row] },
    });
    expect(await ownerNow()).toBe('Pellwater Networks');
    const emptied = (await exported('lines')).replace('Pellwater Networks', '');
    expect(await imported({ body: emptied, query: '?dry=false' })).toMatchObject({ body: { rows: [row] } });
    expect(await ownerNow()).toBeNull();
  });

  it('leaves the owners as they are by a file that has no such column', async () => {
    const owned = (await exported('lines')).replace(',yes,no,,', ',yes,no,Pellwater Networks,');
    await imported({ body: owned, query: '?dry=false' });
    const body = (await exported('lines'))
      .replace(',owner,', ',')
      .replace('Pellwater Networks,', '')
      .replace('42.5', '43');
    expect(await imported({ body, query: '?dry=false' })).toMatchObject({
      body: { written: true, problems: [], rows: [{ outcome: 'changed', fields: ['length_km'] }] },
    });
    expect((await readRegister(store))[0]).toMatchObject({ owner: 'Pellwater Networks', lengthKm: 43 });
    await store.db.delete(line);
    expect(await imported({ body, query: '?dry=false' })).toMatchObject({ body: { written: true } });
    expect((await readRegister(store))[0]).toMatchObject({ key: 'arden-birk', owner: null });
  });

  it('takes the file as part of a form too', async () => {
    const form = new FormData();
    form.set('file', new File([await exported('terminals')], 'terminals.csv'));
    const answer = await called(postImport, { body: form });
    expect([answer.status, await answer.json()]).toMatchObject([200, { kind: 'terminals', problems: [] }]);
  });

  it('names every problem by row and column, and is then a 400 when it was to write', async () => {
    const body = (await exported('lines')).replace('220,1000', '-1,x');
    const looked = await imported({ body });
    expect(looked.status).toBe(200);
    const refused = await imported({ body, query: '?dry=false' });
    expect(refused).toMatchObject({
      status: 400,
      body: {
        written: false,
        problem: 'The file has 2 problems, so nothing of it is written.',
        problems: [
          { row: 2, field: 'voltage_kv', problem: 'The voltage is above 0.' },
          { row: 2, field: 'rating_a' },
        ],
        fields: [{ field: '2.voltage_kv' }, { field: '2.rating_a' }],
      },
    });
  });

  it('refuses what is no file of text, too large, or asked for in another way', async () => {
    const statusOf = async (sent: Sent) => (await imported(sent)).status;
    expect(await statusOf({ body: 'x', type: 'text/plain' })).toBe(415);
    expect(await statusOf({ body: new Uint8Array([0x50, 0x4b, 3, 4, 0, 0xff]) })).toBe(400);
    expect(await statusOf({ body: 'x'.repeat(300_000) })).toBe(413);
    expect(await statusOf({ body: 'x', query: '?dry=perhaps' })).toBe(400);
    expect(await statusOf({ body: 'x', role: 'planner' })).toBe(403);
  });
});
