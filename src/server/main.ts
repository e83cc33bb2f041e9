import { existsSync } from 'node:fs';
import type { Server } from 'node:http';
import { setTimeout } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { SettingsError, webSettings, type WebSettings } from '../settings';
import { attachLive, refuseUpgrade } from './live-upgrade';
import { openWebSite, type OpenedSite } from './open-site';
import { createWebServer, type PageHandler } from './web-server';

const BUILD = new URL('../../dist/', import.meta.url);
const SHUTDOWN_MS_MOST = 3_000;

/** A fault that whoever started the process can mend. */
class StartError extends Error {}

async function pageHandler(): Promise<PageHandler> {
  const entry = new URL('server/entry.mjs', BUILD);
  if (!existsSync(entry))
    throw new StartError('The pages are not built yet: dist/ is missing. Run "npm run build" first.');
  return ((await import(entry.href)) as { handler: PageHandler }).handler;
}

function listening(server: Server, { HOST, PORT }: WebSettings): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('listening', resolve);
    server.once('error', (error: NodeJS.ErrnoException) => {
      const reason = {
        EADDRINUSE: `Port ${PORT} on ${HOST} is taken; set PORT to a free one.`,
        EACCES: `This user may not listen on port ${PORT}; set PORT to 1024 or higher.`,
        EADDRNOTAVAIL: `${HOST} is not an address of this machine; set HOST to one that is.`,
      }[error.code ?? ''];
      reject(reason === undefined ? error : new StartError(reason));
    });
    server.listen(PORT, HOST);
  });
}

async function shutDown(server: Server, opened: OpenedSite): Promise<void> {
  const closed = new Promise((resolve) => server.close(resolve));
  server.closeIdleConnections();
  opened.stream.close();
  // requests under way get their answer and browsers say goodbye, within reason
  await Promise.race([closed, setTimeout(SHUTDOWN_MS_MOST)]);
  server.closeAllConnections();
  await opened.close();
}

function untilStopped(): Promise<void> {
  return new Promise((resolve) => {
    let asked = false;
    const stop = () => {
      if (asked) process.exit(1);
      asked = true;
      resolve();
    };
    process.on('SIGTERM', stop);
    process.on('SIGINT', stop);
  });
}

async function run(): Promise<void> {
  const settings = webSettings();
  const pages = await pageHandler();
  const log = (line: string) => console.log(line);
  const opened = openWebSite(settings, { now: () => Date.now(), log });
  const server = createWebServer(settings, { clientFolder: fileURLToPath(new URL('client/', BUILD)), pages });
  attachLive(server, { stream: opened.stream, others: refuseUpgrade });
  const stopped = untilStopped();
  await listening(server, settings);
  console.log(`Tareline answers at ${settings.PUBLIC_URL} (listening on ${settings.HOST}:${settings.PORT}).`);
  await stopped;
  await shutDown(server, opened);
}

try {
  await run();
  process.exit(0);
} catch (error) {
  const foreseen = error instanceof SettingsError || error instanceof StartError;
  console.error(foreseen ? error.message : error);
  process.exit(1);
}
