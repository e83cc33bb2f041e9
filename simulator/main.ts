import { existsSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import { createStore } from '../src/store/client';
import { migrateStore } from '../src/store/migrate';
import { buildWhenNeeded } from './build';
import { type Child, startChild } from './child';
import { type PrivateDatabase, startDatabase } from './database';
import { demoPeople } from './demo-people';
import { emptyDatabase } from './empty-database';
import { loadDemo } from './load-demo';
import { freePortFrom } from './ports';
import { createProgress } from './progress';
import { openSite, processAccount, saveSite, type Site, siteFile } from './site';

/** npm start: brings the whole stand-in site up on this machine, and stops it in order. */

const DIR = resolve('.tareline');
const LOADED = join(DIR, 'demo-loaded');
const WEB_PATIENCE_MS = 60_000;
const development = process.argv.includes('--dev');
const say = (sentence: string) => console.log(sentence);

const stopped = new AbortController();
const children: Child[] = [];
let database: PrivateDatabase | undefined;

for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => stopped.abort());

async function run(): Promise<void> {
  const site = await withFreePorts(await openSite(DIR, { nowMs: Date.now() }));
  say(`Database: starting on port ${site.ports.database}.`);
  database = await startDatabase({
    dir: join(DIR, 'db'),
    port: site.ports.database,
    passwords: site.databasePasswords,
  });
  const built = development ? undefined : buildInBackground();
  await fillDatabase(database, site);
  await built?.finished();
  stopped.signal.throwIfAborted();
  await startProcesses(site, database.url);
  announce(site);
  await untilStopped();
}

/** The ports of the last time where they are free, else the next ones that are. */
async function withFreePorts(site: Site): Promise<Site> {
  const databasePort = await freePortFrom(site.ports.database);
  const brokerPort = await freePortFrom(site.ports.broker, [databasePort]);
  const webPort = await freePortFrom(site.ports.web, [databasePort, brokerPort]);
  const ports = { database: databasePort, broker: brokerPort, web: webPort };
  const moved = (Object.keys(ports) as (keyof typeof ports)[]).filter(
    (name) => ports[name] !== site.ports[name],
  );
  for (const name of moved)
    say(`Port ${site.ports[name]} is taken; the ${name} takes ${ports[name]} instead.`);
  const settled = { ...site, ports };
  await saveSite(DIR, settled);
  return settled;
}

function buildInBackground(): { finished(): Promise<void> } {
  const begunMs = Date.now();
  const built = buildWhenNeeded();
  // looked at when it is waited for; until then a failure must not end the process
  built.catch(() => undefined);
  return {
    async finished() {
      await built;
      const seconds = (Date.now() - begunMs) / 1000;
      if (seconds > 1) say(`Pages: built.`);
    },
  };
}

async function fillDatabase({ url, adminUrl }: PrivateDatabase, site: Site): Promise<void> {
  // a load that was broken off begins anew
  if (!existsSync(LOADED)) await emptyDatabase(adminUrl);
  const store = createStore(url);
  try {
    await migrateStore(store);
    if (existsSync(LOADED)) return;
    await loadDemo(store, site, {
      progress: createProgress('Demo network: loading two months of history', process.stdout),
    });
    await writeFile(LOADED, `${new Date().toISOString()}\n`);
  } finally {
    await store.close();
  }
}

async function startProcesses(site: Site, databaseUrl: string): Promise<void> {
  const brokerUrl = `mqtt://127.0.0.1:${site.ports.broker}`;
  const common = { DATABASE_URL: databaseUrl, BROKER_URL: brokerUrl };
  const tsx = ['--import', 'tsx'];
  const start = async (program: Parameters<typeof startChild>[0]) => {
    stopped.signal.throwIfAborted();
    children.push(await startChild(program));
  };
  const broker = {
    name: 'broker',
    arguments: [...tsx, 'simulator/broker-main.ts', siteFile(DIR)],
    tellsReady: true,
  };
  await start(broker);
  await start({
    name: 'ingest worker',
    arguments: [...tsx, 'simulator/entry-under-parent.ts', resolve('src/ingest/main.ts')],
    environment: { ...common, ...brokerLogin(site, 'ingest') },
    tellsReady: false,
  });
  await start({
    name: 'web',
    arguments: development
      ? ['node_modules/astro/astro.js', 'dev', '--port', String(site.ports.web), '--host', '127.0.0.1']
      : [...tsx, 'simulator/entry-under-parent.ts', resolve('src/server/main.ts')],
    environment: { ...common, ...brokerLogin(site, 'web'), ...webEnvironment(site) },
    tellsReady: false,
  });
  const terminals = [...tsx, 'simulator/terminals-main.ts', siteFile(DIR)];
  await start({ name: 'terminals', arguments: terminals, tellsReady: true });
  await untilAnswered(addressOf(site));
}

function brokerLogin(site: Site, kind: 'ingest' | 'web'): Record<string, string> {
  const { username, password } = processAccount(site, kind);
  return { BROKER_USERNAME: username, BROKER_PASSWORD: password };
}

const addressOf = ({ ports }: Site): string => `http://127.0.0.1:${ports.web}`;

const webEnvironment = (site: Site): Record<string, string> => ({
  HOST: '127.0.0.1',
  PORT: String(site.ports.web),
  PUBLIC_URL: addressOf(site),
  NODE_ENV: development ? 'development' : 'production',
  SITE_TIME_ZONE: 'Europe/Berlin',
});

async function untilAnswered(address: string): Promise<void> {
  const deadlineMs = Date.now() + WEB_PATIENCE_MS;
  while (!stopped.signal.aborted) {
    const answered = await fetch(`${address}/sign-in`).then(
      ({ ok }) => ok,
      () => false,
    );
    if (answered) return;
    const gone = await Promise.race([Promise.race(children.map(({ ended }) => ended)), pause()]);
    if (gone !== undefined || Date.now() > deadlineMs)
      throw new Error('The web process does not answer; what it said stands above.');
  }
}

const pause = (): Promise<undefined> => new Promise((done) => setTimeout(done, 100, undefined));

function announce(site: Site): void {
  say(`\nTareline is up:  ${addressOf(site)}\n`);
  say('Demo sign-ins (this machine only):');
  for (const { role, email, password } of demoPeople)
    say(`  ${role.padEnd(9)} ${email.padEnd(30)} ${password}`);
  say('\nCtrl-C stops everything; the data stay in .tareline and are there at the next start.');
}

/** Waits for Ctrl-C; a process that ends of itself ends the whole site. */
async function untilStopped(): Promise<void> {
  const asked = new Promise<undefined>((done) => {
    if (stopped.signal.aborted) done(undefined);
    stopped.signal.addEventListener('abort', () => done(undefined), { once: true });
  });
  const ends = children.map(async ({ name, ended }) => `The ${name} has ended of itself (${await ended}).`);
  const reason = await Promise.race([asked, ...ends]);
  if (reason !== undefined) throw new Error(`${reason} Everything else is stopped.`);
}

async function stopAll(): Promise<void> {
  if (children.length > 0 || database !== undefined) say('\nStopping.');
  // the feed first, so that what it sent last is still stored; then what reads it; the database last
  const order = ['terminals', 'web', 'ingest worker', 'broker'];
  const inOrder = children.toSorted((one, other) => order.indexOf(one.name) - order.indexOf(other.name));
  for (const child of inOrder) await child.stop();
  await database?.stop();
}

try {
  await run();
} catch (error) {
  if (!stopped.signal.aborted) console.error((error as Error).message);
  process.exitCode = stopped.signal.aborted ? 0 : 1;
}
await stopAll();
process.exit();
