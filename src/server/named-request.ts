import type { IncomingMessage } from 'node:http';
import { clientAddress } from '../auth/client-address';
import { BODY_BYTES_MOST } from './problems';

/**
 * Gives a request the one name and origin of this site and the client's address by our own rule, whatever the
 * client wrote: Astro builds its request from these headers and would otherwise take a client's word for them.
 */
export function nameRequest(
  request: IncomingMessage,
  site: { publicUrl: string; trustProxy: boolean },
): void {
  const { headers } = request;
  const { host, protocol } = new URL(site.publicUrl);
  const address = clientAddress({
    socketAddress: request.socket.remoteAddress,
    forwardedFor: headers['x-forwarded-for'],
    trustProxy: site.trustProxy,
  });
  for (const name of Object.keys(headers))
    if (name.startsWith('x-forwarded-')) Reflect.deleteProperty(headers, name);
  headers.host = host;
  headers['x-forwarded-proto'] = protocol.slice(0, -1);
  headers['x-forwarded-for'] = address;
}

/** Why a body is not taken in, before any of it is read, with the status to answer; undefined when it is. */
export function bodyRefusal(request: IncomingMessage): { status: number; problem: string } | undefined {
  if (request.headers['transfer-encoding'] !== undefined)
    return { status: 411, problem: 'Say how long the body is (Content-Length).' };
  if (Number(request.headers['content-length'] ?? 0) > BODY_BYTES_MOST)
    return { status: 413, problem: `A body has at most ${BODY_BYTES_MOST / 1024} KB.` };
  return undefined;
}
