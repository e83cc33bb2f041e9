import type { IncomingMessage, Server } from 'node:http';
import type { Duplex } from 'node:stream';
import type { LiveStream } from '../live/stream';

/** The hook-up of the live stream. What becomes of upgrades that are not its own, the server's owner says. */
export function attachLive(
  server: Pick<Server, 'on'>,
  live: { stream: LiveStream; others: (request: IncomingMessage, socket: Duplex) => void },
): void {
  server.on('upgrade', (request, socket, head) => {
    // an exception in here would end the process, and anybody can send a path that is none
    const isPath = URL.canParse(request.url ?? '', 'http://site.invalid');
    if (!isPath || !live.stream.handleUpgrade(request, socket, head)) live.others(request, socket);
  });
}

export function refuseUpgrade(_request: IncomingMessage, socket: Duplex): void {
  socket.on('error', () => socket.destroy());
  socket.end('HTTP/1.1 404 Not Found\r\nConnection: close\r\nContent-Length: 0\r\n\r\n');
}
