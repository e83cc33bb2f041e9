import type { Browser } from 'playwright-core';
import { afterAll, beforeAll } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import type { Store } from '../../src/store/client';
import { ACCOUNTS } from '../faults/site-under-test';
import { type RunningSite, type SiteParts, startSite } from '../running-site';
import { startChromium } from './chromium';

/** years of a line are computed in some tests, on cores that others use as well */
const FILL_MS = 180_000;

/** A site with its broker and a browser to look at it; there once the tests of the file run. */
export interface BrowsedSite {
  broker(): Broker;
  site(): RunningSite;
  browser(): Browser;
}

/** Starts them ahead of a file's tests, with what the store is to hold, and ends them after. */
export function browsedSite(
  fill: (store: Store) => Promise<unknown>,
  parts: Pick<SiteParts, 'webOnly'> = {},
): BrowsedSite {
  let broker: Broker;
  let site: RunningSite;
  let browser: Browser;
  beforeAll(async () => {
    broker = await startBroker({ port: 0, accounts: ACCOUNTS });
    const logins = [
      { username: 'ingest', password: 'ingest-secret' },
      { username: 'web', password: 'web-secret' },
    ];
    site = await startSite(broker.url, logins, parts);
    await fill(site.store);
    browser = await startChromium();
  }, FILL_MS);
  afterAll(async () => {
    await browser.close();
    await site.close();
    await broker.close();
  });
  return { broker: () => broker, site: () => site, browser: () => browser };
}
