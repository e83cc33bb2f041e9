import { createSessions } from '../auth/sessions';
import { followResults } from '../live/feed-of-results';
import { createLiveHub } from '../live/hub';
import { createLiveStream, type LiveStream } from '../live/stream';
import type { WebSettings } from '../settings';
import { createStore } from '../store/client';
import { openSite, type Site } from './site';

export interface OpenedSite {
  readonly site: Site;
  /** closed by whoever attached it, before its server and the rest */
  readonly stream: LiveStream;
  close(): Promise<void>;
}

/** Opens what the web process needs beside its HTTP server: the store, the hub, the results and the live stream. */
export function openWebSite(
  settings: WebSettings,
  { now, log }: { now: () => number; log: (line: string) => void },
): OpenedSite {
  const store = createStore(settings.DATABASE_URL);
  const live = createLiveHub(now);
  const site: Site = { settings, store, live, now };
  openSite(site);
  const results = followResults({ settings, hub: live, store, now, log });
  const sessions = createSessions({ store, publicUrl: settings.PUBLIC_URL });
  const stream = createLiveStream({
    hub: live,
    personOf: (request) => sessions.personOfCookie(request.headers.cookie, now()),
    allowedOrigin: new URL(settings.PUBLIC_URL).origin,
  });
  return {
    site,
    stream,
    async close() {
      await results.close();
      live.close();
      await store.close();
    },
  };
}
