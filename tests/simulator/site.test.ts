import { mkdtemp, readFile, rm, stat, writeFile } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createConnection } from 'mysql2/promise';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { startDatabase } from '../../simulator/database';
import { demoPeople } from '../../simulator/demo-people';
import { freePort, freePortFrom } from '../../simulator/ports';
import { openSite, processAccount, siteFile } from '../../simulator/site';
import { ROLES } from '../../src/contract/role';

let dir: string;
beforeAll(async () => {
  dir = await mkdtemp(join(tmpdir(), 'tareline-site-'));
});
afterAll(() => rm(dir, { recursive: true, force: true }));

describe('the private database', () => {
  test('keeps its data over an orderly stop and over being killed, and lets its user make test databases', async () => {
    const first = await startDatabase({ dir: join(dir, 'db'), port: 0 });
    const connection = await createConnection(first.url);
    await connection.query('CREATE DATABASE tareline_test');
    await connection.query('CREATE TABLE tareline_test.kept (value INT)');
    await connection.query('INSERT INTO tareline_test.kept VALUES (41)');
    await connection.end();
    await first.killHard();
    const second = await startDatabase({ dir: join(dir, 'db'), port: first.port });
    expect(second.url).toBe(first.url);
    const again = await createConnection(second.url);
    expect((await again.query('SELECT value FROM tareline_test.kept'))[0]).toEqual([{ value: 41 }]);
    await again.end();
    await second.stop();
    await expect(createConnection(second.url)).rejects.toThrow();
  }, 60_000);
});

describe('the site’s file', () => {
  test('is made once, for its owner’s eyes, and found again', async () => {
    const made = await openSite(join(dir, 'site'), { nowMs: 1_000 });
    expect(await openSite(join(dir, 'site'), { nowMs: 2_000 })).toEqual(made);
    expect(made.epochMs).toBe(1_000);
    expect((await stat(siteFile(join(dir, 'site')))).mode & 0o777).toBe(0o600);
    expect(processAccount(made, 'ingest').kind).toBe('ingest');
    const other = await openSite(join(dir, 'other'), { nowMs: 1_000 });
    expect(other.databasePasswords).not.toEqual(made.databasePasswords);
  });

  test('is refused in a sentence when it holds something else', async () => {
    const file = siteFile(join(dir, 'site'));
    const good = await readFile(file, 'utf8');
    await writeFile(file, '{"seed": "x"}');
    await expect(openSite(join(dir, 'site'), { nowMs: 0 })).rejects.toThrow(/does not hold a site/);
    await writeFile(file, good);
  });
});

describe('ports', () => {
  test('taken or promised ones are passed over', async () => {
    const preferred = await freePort();
    const server = createServer();
    await new Promise<void>((resolve) => server.listen(preferred, '127.0.0.1', resolve));
    const next = await freePortFrom(preferred);
    expect(next).toBeGreaterThan(preferred);
    expect(await freePortFrom(preferred, [next])).toBeGreaterThan(next);
    await new Promise((resolve) => server.close(resolve));
  });
});

test('there is one demo person for each role', () => {
  expect(demoPeople.map((person) => person.role)).toEqual(ROLES);
  for (const person of demoPeople) expect(person.email).toMatch(/\.example$/);
});
