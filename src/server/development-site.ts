import type { Server } from 'node:http';
import { webSettings } from '../settings';
import { attachLive } from './live-upgrade';
import { openWebSite } from './open-site';

/** For `astro dev`: opens the site from the environment and leaves every upgrade but the stream's to Vite. */
export function openDevelopmentSite(server: Server | null): void {
  const log = (line: string) => console.log(line);
  const { stream, close } = openWebSite(webSettings(), { now: () => Date.now(), log });
  if (server === null) return;
  attachLive(server, { stream, others: () => undefined });
  server.once('close', () => {
    stream.close();
    void close();
  });
}
