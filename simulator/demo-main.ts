import { rm, writeFile } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import { parseArgs } from 'node:util';
import { createStore } from '../src/store/client';
import { migrateStore } from '../src/store/migrate';
import { newTerminalAccounts } from './broker-account';
import { databasePid, startDatabase } from './database';
import { emptyDatabase } from './empty-database';
import { loadDemo } from './load-demo';
import { demoLines, demoTruths } from './network/demo-lines';
import { freePortFrom } from './ports';
import { createProgress } from './progress';
import { openSite, saveSite, type Site } from './site';
import { storyLines, storyTruths } from './stories/story-lines';
import { toldTruths } from './stories/told-truth';

/** npm run demo -- --months 24: loads the stand-in site anew, with months of history and the story lines. */

const DIR = resolve('.tareline');
const LOADED = join(DIR, 'demo-loaded');
const TRUTH = join(DIR, 'truth.json');
const MONTH_DAYS = 365.25 / 12;
const MONTHS = { usual: 24, most: 60 } as const;

const stopped = new AbortController();
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => stopped.abort());

async function run(): Promise<void> {
  const months = askedMonths(process.argv.slice(2));
  const running = databasePid(join(DIR, 'db'));
  if (running !== undefined)
    throw new Error(
      `The demo site is running, or left its database behind (process ${running}). Stop it first: its history is loaded anew.`,
    );
  const begunMs = Date.now();
  const known = await openSite(DIR, { nowMs: begunMs });
  const newLines = storyLines.filter(
    ({ key }) => !known.accounts.some(({ username }) => username.startsWith(`${key}/`)),
  );
  const site: Site = {
    ...known,
    // the stories are told around the moment at which they are loaded
    epochMs: begunMs,
    accounts: [...known.accounts, ...newTerminalAccounts(newLines)],
  };
  await load(site, months);
  await saveSite(DIR, site);
  const truths = toldTruths([...demoTruths, ...storyTruths], site.epochMs);
  const truth = { seed: site.seed, epoch: new Date(site.epochMs).toISOString(), truths };
  await writeFile(TRUTH, `${JSON.stringify(truth, null, 2)}\n`);
  await writeFile(LOADED, `${new Date().toISOString()}\n`);
  const minutes = ((Date.now() - begunMs) / 60_000).toFixed(1);
  console.log(
    `Loaded in ${minutes} minutes. What is so on each line stands in ${TRUTH}; npm start shows it.`,
  );
}

function askedMonths(args: readonly string[]): number {
  const { values } = parseArgs({ args: [...args], options: { months: { type: 'string' } } });
  const months = Number(values.months ?? MONTHS.usual);
  if (!Number.isInteger(months) || months < 1 || months > MONTHS.most)
    throw new Error(`--months is a whole number from 1 to ${MONTHS.most}.`);
  return months;
}

/** Until all is in, the site's mark of a loaded demo is away: the next start of a load broken off loads anew. */
async function load(site: Site, months: number): Promise<void> {
  await rm(LOADED, { force: true });
  const database = await startDatabase({
    dir: join(DIR, 'db'),
    port: await freePortFrom(site.ports.database),
    passwords: site.databasePasswords,
  });
  try {
    await emptyDatabase(database.adminUrl);
    const store = createStore(database.url);
    const show = createProgress(`Demo network: loading ${months} months of history`, process.stdout);
    const progress = (share: number): void => {
      stopped.signal.throwIfAborted();
      show(share);
    };
    try {
      await migrateStore(store);
      const days = Math.round(months * MONTH_DAYS);
      await loadDemo(store, site, { progress, days, lines: [...demoLines, ...storyLines] });
    } finally {
      await store.close();
    }
  } finally {
    await database.stop();
  }
}

try {
  await run();
} catch (error) {
  console.error(
    stopped.signal.aborted ? '\nBroken off; the next start loads anew.' : (error as Error).message,
  );
  process.exitCode = 1;
}
