import { readSite, type Site } from './site';

/** What a process of the stand-in site has open. */
export type Running = { readonly ready: object; close(): Promise<void> };

/**
 * Runs one process of the site: started with the path of the site's file, it tells its parent `{ ready: true }`
 * once it is up, and closes on SIGTERM or when the parent is gone. Ctrl-C reaches every process of a terminal at
 * once; a child leaves it to its parent, which stops all in order.
 */
export async function runSiteProcess(start: (site: Site) => Promise<Running>): Promise<void> {
  const state: { running?: Running } = {};
  let closing = false;
  const close = async (): Promise<void> => {
    if (closing) return;
    closing = true;
    await state.running?.close();
    process.exit(0);
  };
  process.on('SIGTERM', () => void close());
  process.on('SIGINT', () => {
    if (process.send === undefined) void close();
  });
  process.on('disconnect', () => void close());
  state.running = await start(await siteFromArguments());
  process.send?.({ ready: true, ...state.running.ready });
}

async function siteFromArguments(): Promise<Site> {
  const file = process.argv[2];
  if (file === undefined) throw new Error('Start this process with the path of the site’s file.');
  const site = await readSite(file);
  if (site === undefined) throw new Error(`There is no site in ${file}; npm start makes one.`);
  return site;
}
