import type { IncomingMessage } from 'node:http';
import type { Duplex } from 'node:stream';
import { type WebSocket, WebSocketServer } from 'ws';
import { keySchema } from '../contract/key';
import { LIVE_LIMITS, LIVE_PATH } from '../contract/live';
import type { LiveHub } from './hub';

/** Close codes of RFC 6455: a policy that no longer holds, and a server that goes away. */
const CLOSE = { sessionEnded: 1008, goingAway: 1001 } as const;
const MOST_LINES = 2_000;

export interface LiveStreamParts {
  readonly hub: LiveHub;
  /** who a request's session belongs to; asked again for as long as the stream lasts */
  personOf(request: IncomingMessage): Promise<unknown>;
  /** the origin that pages of this site have */
  readonly allowedOrigin: string;
}

export interface LiveStream {
  /** Takes an upgrade to the live path; false when the path is another's. */
  handleUpgrade(request: IncomingMessage, socket: Duplex, head: Buffer): boolean;
  close(): void;
}

/** The server's end of GET /live: server to client only. */
export function createLiveStream({ hub, personOf, allowedOrigin }: LiveStreamParts): LiveStream {
  const server = new WebSocketServer({ noServer: true, perMessageDeflate: false, maxPayload: 1024 });

  const open = async (request: IncomingMessage, socket: Duplex, head: Buffer) => {
    // a browser always says its origin; a script without one still needs the session cookie
    const { origin } = request.headers;
    if (origin !== undefined && origin !== allowedOrigin) return refuse(socket, 403, 'Forbidden');
    const lines = linesAskedFor(request);
    if (lines === 'invalid') return refuse(socket, 400, 'Bad Request');
    const person = await personOf(request).catch(() => 'unknown' as const);
    if (person === 'unknown') return refuse(socket, 503, 'Service Unavailable');
    if (person === undefined || person === null) return refuse(socket, 401, 'Unauthorized');
    server.handleUpgrade(request, socket, head, (client) => serve(client, request, lines));
  };

  const serve = (client: WebSocket, request: IncomingMessage, lines: ReadonlySet<string> | undefined) => {
    const leave = hub.listen({
      lines,
      waitingBytes: () => client.bufferedAmount,
      send: (frame) => client.send(frame),
    });
    const check = setInterval(() => {
      // a database that is away ends no session: only a clear "no" does
      personOf(request).then(
        (person) => {
          if (person === undefined || person === null)
            client.close(CLOSE.sessionEnded, 'The session has ended.');
        },
        () => undefined,
      );
    }, LIVE_LIMITS.sessionCheckMs);
    client.on('close', () => {
      leave();
      clearInterval(check);
    });
    client.on('error', () => client.terminate());
  };

  return {
    handleUpgrade(request, socket, head) {
      if (pathOf(request) !== LIVE_PATH) return false;
      socket.on('error', () => socket.destroy());
      void open(request, socket, head);
      return true;
    },
    close() {
      for (const client of server.clients) client.close(CLOSE.goingAway, 'The server is stopping.');
      server.close();
    },
  };
}

const addressOf = (request: IncomingMessage): URL => new URL(request.url ?? '/', 'http://site.invalid');
const pathOf = (request: IncomingMessage): string => addressOf(request).pathname;

function linesAskedFor(request: IncomingMessage): ReadonlySet<string> | undefined | 'invalid' {
  const asked = addressOf(request).searchParams.get('lines');
  if (asked === null) return undefined;
  const keys = asked.split(',');
  if (keys.length > MOST_LINES || keys.some((key) => !keySchema.safeParse(key).success)) return 'invalid';
  return new Set(keys);
}

function refuse(socket: Duplex, status: number, words: string): void {
  socket.end(`HTTP/1.1 ${status} ${words}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`);
}
