import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { z } from 'zod';
import { type BrokerAccount, brokerAccountSchema, newDemoAccounts, newPassword } from './broker-account';

const port = z.int().min(1).max(65_535);

/** What the stand-in site remembers between starts: its seed, when it first came up, its ports and its secrets. */
export const siteSchema = z.object({
  seed: z.int(),
  epochMs: z.int(),
  ports: z.object({ database: port, broker: port, web: port }),
  databasePasswords: z.object({ user: z.string().min(1), admin: z.string().min(1) }),
  accounts: z.array(brokerAccountSchema),
});
export type Site = z.infer<typeof siteSchema>;

export const PREFERRED_PORTS: Site['ports'] = { database: 8733, broker: 8718, web: 8720 };
const DEFAULT_SEED = 1;

export const siteFile = (dir: string): string => join(dir, 'site.json');

/** The site kept in a folder; a new one, with passwords of its own, where there is none yet. */
export async function openSite(dir: string, now: { readonly nowMs: number }): Promise<Site> {
  const kept = await readSite(siteFile(dir));
  if (kept !== undefined) return kept;
  const site: Site = {
    seed: DEFAULT_SEED,
    epochMs: now.nowMs,
    ports: PREFERRED_PORTS,
    databasePasswords: { user: newPassword(), admin: newPassword() },
    accounts: newDemoAccounts(),
  };
  await saveSite(dir, site);
  return site;
}

/** Replaces the site's file in one step, readable by its owner alone. */
export async function saveSite(dir: string, site: Site): Promise<void> {
  const file = siteFile(dir);
  await mkdir(dirname(file), { recursive: true });
  await writeFile(`${file}.new`, `${JSON.stringify(site, null, 2)}\n`, { mode: 0o600 });
  await rename(`${file}.new`, file);
}

/** The site in a file, or undefined where there is none; a file that is not a site's is an error. */
export async function readSite(file: string): Promise<Site | undefined> {
  let text: string;
  try {
    text = await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
  try {
    return siteSchema.parse(JSON.parse(text));
  } catch (error) {
    throw new Error(`${file} does not hold a site; remove its folder to begin anew.`, { cause: error });
  }
}

/** The account of one of Tareline's own two processes. */
export function processAccount(site: Site, kind: 'ingest' | 'web'): BrokerAccount {
  const account = site.accounts.find((each) => each.kind === kind);
  if (account === undefined) throw new Error(`The site has no broker account for ${kind}.`);
  return account;
}
