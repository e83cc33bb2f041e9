import type { LiveHub } from '../live/hub';
import type { WebSettings } from '../settings';
import type { Store } from '../store/client';

/** What the web process has open: built once by its entry, handed to every page through the middleware. */
export interface Site {
  readonly settings: WebSettings;
  readonly store: Store;
  readonly live: LiveHub;
  now(): number;
}

// The entry and the built routes are separate bundles of one process; the global object is all they share.
const holder = globalThis as { tarelineSite?: Site };

export function openSite(site: Site): void {
  holder.tarelineSite = site;
}

export function currentSite(): Site {
  if (holder.tarelineSite === undefined)
    throw new Error('The web process has not opened its site yet; start it through src/server/main.ts.');
  return holder.tarelineSite;
}
