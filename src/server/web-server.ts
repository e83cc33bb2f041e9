import {
  createServer,
  type IncomingMessage,
  type RequestListener,
  type Server,
  type ServerResponse,
} from 'node:http';
import sirv from 'sirv';
import type { WebSettings } from '../settings';
import { bodyRefusal, nameRequest } from './named-request';

export type PageHandler = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

/** The HTTP server: files of the build first, then the pages and endpoints. */
export function createWebServer(
  settings: Pick<WebSettings, 'PUBLIC_URL' | 'TRUST_PROXY'>,
  { clientFolder, pages }: { clientFolder: string; pages: PageHandler },
): Server {
  const files = buildFiles(clientFolder);
  const site = { publicUrl: settings.PUBLIC_URL, trustProxy: settings.TRUST_PROXY === 'yes' };
  const answer: RequestListener = (request, response) => {
    const refused = bodyRefusal(request);
    if (refused !== undefined) return refuseBody(response, refused);
    nameRequest(request, site);
    files(request, response, () => void pages(request, response));
  };
  return createServer(answer);
}

function buildFiles(folder: string) {
  return sirv(folder, {
    etag: true,
    setHeaders(response, pathname) {
      // names under _astro/ change with their content
      const lasting = pathname.startsWith('/_astro/');
      response.setHeader('Cache-Control', lasting ? 'public, max-age=31536000, immutable' : 'no-cache');
      response.setHeader('X-Content-Type-Options', 'nosniff');
      response.setHeader('Cross-Origin-Resource-Policy', 'same-origin');
    },
  });
}

function refuseBody(
  response: ServerResponse,
  { status, problem }: { status: number; problem: string },
): void {
  response.writeHead(status, { 'Content-Type': 'application/json', Connection: 'close' });
  response.end(JSON.stringify({ problem, fields: [] }));
}
