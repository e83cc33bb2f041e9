import type { Browser } from 'playwright-core';
import { afterAll, beforeAll } from 'vitest';
import { type Broker, startBroker } from '../../simulator/broker';
import type { Store } from '../../src/store/client';
import { ACCOUNTS } from '../faults/site-under-test';
import { type RunningSite, startSite } from '../running-site';
import { startChromium } from './chromium';

/** A site with its broker and a browser to look at it; there once the tests of the file run. */
export interface BrowsedSite {
  broker(): Broker;
  site(): RunningSite;
  browser(): Browser;
}

/** Starts them ahead of a file's tests, with what the store is to hold, and ends them after. */
export function browsedSite(fill: (store: Store) => Promise<unknown>): BrowsedSite {
  let broker: Broker;
  let site: RunningSite;
  let browser: Browser;
  beforeAll(async () => {
    broker = await startBroker({ port: 0, accounts: ACCOUNTS });
    site = await startSite(broker.url, [
      { username: 'ingest', password: 'ingest-secret' },
      { username: 'web', password: 'web-secret' },
    ]);
    await fill(site.store);
    browser = await startChromium();
  });
  afterAll(async () => {
    await browser.close();
    await site.close();
    await broker.close();
  });
  return { broker: () => broker, site: () => site, browser: () => browser };
}
