import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { freePort } from '../simulator/ports';
import { hashPassword } from '../src/auth/passwords';
import type { Role } from '../src/contract/role';
import { createStore, type Store } from '../src/store/client';
import { migrateStore } from '../src/store/migrate';
import { insertUser } from '../src/store/people';
import { testDatabaseUrl } from './database';
import { until } from './until';

/** The two production entries over a database of their own, as an installation runs them. */
export interface RunningSite {
  readonly address: string;
  readonly store: Store;
  readonly databaseUrl: string;
  output(): string;
  close(): Promise<void>;
}

export const PASSWORD = 'a-password-for-tests';
export const emailOf = (role: Role): string => `${role}@site.example`;
export const nameOf = (role: Role): string => `The ${role}`;

const START_MS = 60_000;

export interface SiteParts {
  /** puts things into the store before the entries start */
  readonly filled?: (store: Store) => Promise<unknown>;
  /** without the worker, which would renew findings that a test has made up */
  readonly webOnly?: boolean;
}

export async function startSite(
  brokerUrl: string,
  login: { username: string; password: string }[] = [],
  { filled, webOnly = false }: SiteParts = {},
): Promise<RunningSite> {
  if (!existsSync('dist/server/entry.mjs'))
    throw new Error('The pages are not built; run "npm run build" before these tests.');
  const databaseUrl = await testDatabaseUrl();
  const store = createStore(databaseUrl);
  await migrateStore(store);
  await insertPeople(store);
  await filled?.(store);
  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const common = { DATABASE_URL: databaseUrl, BROKER_URL: brokerUrl };
  const [ingestLogin, webLogin] = [login[0], login[1]].map(loginEnvironment);
  let output = '';
  const hear = (child: ChildProcess) => {
    for (const stream of [child.stdout, child.stderr])
      stream?.on('data', (chunk: Buffer) => (output += chunk.toString()));
    return child;
  };
  const ingest = webOnly ? undefined : hear(entry('src/ingest/main.ts', { ...common, ...ingestLogin }));
  const web = hear(
    entry('src/server/main.ts', {
      ...common,
      ...webLogin,
      NODE_ENV: 'production',
      PORT: String(port),
      PUBLIC_URL: address,
      SITE_TIME_ZONE: 'Europe/Berlin',
    }),
  );
  await until(
    () => (webOnly || output.includes('listening to the feed')) && output.includes('Tareline answers'),
    START_MS,
    () => `running site: ${output}`,
  );
  return {
    address,
    store,
    databaseUrl,
    output: () => output,
    async close() {
      await Promise.all([ended(web), ingest && ended(ingest)]);
      await store.close();
    },
  };
}

async function insertPeople(store: Store): Promise<void> {
  const passwordHash = await hashPassword(PASSWORD);
  for (const role of ['operator', 'engineer', 'planner', 'admin'] as const)
    await insertUser(store, {
      email: emailOf(role),
      name: nameOf(role),
      role,
      passwordHash,
      createdAt: new Date(),
    });
}

const loginEnvironment = (login?: { username: string; password: string }): Record<string, string> =>
  login === undefined ? {} : { BROKER_USERNAME: login.username, BROKER_PASSWORD: login.password };

function entry(file: string, environment: Record<string, string>): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', file], {
    env: { PATH: process.env['PATH'], ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
}

async function ended(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const exit = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  child.kill('SIGTERM');
  await exit;
}

/** A signed-in caller of the API. */
export interface Caller {
  get(path: string): Promise<Response>;
  send(method: 'POST' | 'PATCH' | 'DELETE', path: string, body?: unknown): Promise<Response>;
  readonly cookie: string;
}

export async function signedIn(address: string, role: Role): Promise<Caller> {
  const response = await fetch(`${address}/api/sign-in`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ email: emailOf(role), password: PASSWORD }),
  });
  if (!response.ok)
    throw new Error(`Sign-in as ${role} answered ${response.status}: ${await response.text()}`);
  return caller(address, response.headers.get('set-cookie')!.split(';')[0]!);
}

export const caller = (address: string, cookie: string): Caller => ({
  cookie,
  get: (path) => fetch(address + path, { headers: { cookie }, redirect: 'manual' }),
  send: (method, path, body) =>
    fetch(address + path, {
      method,
      headers: { cookie, 'content-type': 'application/json' },
      ...(body !== undefined && { body: JSON.stringify(body) }),
      redirect: 'manual',
    }),
});
