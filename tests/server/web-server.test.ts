import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request, type IncomingMessage, type Server } from 'node:http';
import { connect, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { attachLive, refuseUpgrade } from '../../src/server/live-upgrade';
import { BODY_BYTES_MOST } from '../../src/server/problems';
import { createWebServer } from '../../src/server/web-server';

const folder = mkdtempSync(join(tmpdir(), 'tareline-client-'));
const servers: Server[] = [];
const seen: IncomingMessage[] = [];
let port: number;
let portBehindProxy: number;

async function listening(trustProxy: 'yes' | 'no'): Promise<number> {
  const server = createWebServer(
    { PUBLIC_URL: 'https://tareline.example', TRUST_PROXY: trustProxy },
    {
      clientFolder: folder,
      pages: async (received, response) => {
        seen.push(received);
        response.end('page');
      },
    },
  );
  const stream = {
    handleUpgrade: (received: IncomingMessage, socket: { end(text: string): unknown }) => {
      if (received.url !== '/live') return false;
      socket.end('HTTP/1.1 101 Taken\r\n\r\n');
      return true;
    },
    close: () => undefined,
  };
  attachLive(server, { stream, others: refuseUpgrade });
  servers.push(server);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return (server.address() as AddressInfo).port;
}

beforeAll(async () => {
  mkdirSync(join(folder, '_astro'));
  writeFileSync(join(folder, '_astro', 'island.a1b2.js'), 'export {};');
  writeFileSync(join(folder, 'favicon.svg'), '<svg/>');
  port = await listening('no');
  portBehindProxy = await listening('yes');
});
afterAll(() => {
  for (const server of servers) server.close().closeAllConnections();
  rmSync(folder, { recursive: true });
});

/** Sends the bytes as they stand and gives the first line of the answer. */
const statusOf = (text: string): Promise<string> =>
  new Promise((resolve, reject) => {
    const socket = connect(port, '127.0.0.1', () => socket.write(text));
    socket.once('data', (data) => {
      resolve(data.toString().split('\r\n', 1)[0]!);
      socket.destroy();
    });
    socket.once('error', reject);
  });

async function headersSeen(at: number, headers: Record<string, string>) {
  await new Promise<void>((resolve, reject) => {
    const sending = request({ port: at, host: '127.0.0.1', path: '/', headers }, (response) => {
      response.resume().once('end', resolve);
    });
    sending.once('error', reject).end();
  });
  return seen.at(-1)!.headers;
}

describe('the HTTP server', () => {
  it('gives files whose name changes with their content for keeps, others to be asked for again', async () => {
    const island = await fetch(`http://127.0.0.1:${port}/_astro/island.a1b2.js`);
    expect(island.headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
    const icon = await fetch(`http://127.0.0.1:${port}/favicon.svg`);
    expect(icon.headers.get('cache-control')).toBe('no-cache');
    expect(icon.headers.get('x-content-type-options')).toBe('nosniff');
  });
  it('leaves what is no file to the pages', async () => {
    expect(await (await fetch(`http://127.0.0.1:${port}/lines/a`)).text()).toBe('page');
    expect(await (await fetch(`http://127.0.0.1:${port}/_astro/..%2f..%2fpackage.json`)).text()).toBe('page');
  });
  it('goes by its own name and origin, whatever a client writes', async () => {
    const headers = await headersSeen(port, {
      host: 'elsewhere.example',
      'x-forwarded-host': 'elsewhere.example',
      'x-forwarded-proto': 'http',
      'x-forwarded-port': '81',
      'x-forwarded-for': '203.0.113.9',
    });
    expect(headers.host).toBe('tareline.example');
    expect(headers['x-forwarded-proto']).toBe('https');
    expect(headers['x-forwarded-host']).toBeUndefined();
    expect(headers['x-forwarded-port']).toBeUndefined();
    expect(headers['x-forwarded-for']).toBe('127.0.0.1');
  });
  it('takes the client’s address from the proxy’s own hop where a proxy is trusted', async () => {
    const headers = await headersSeen(portBehindProxy, { 'x-forwarded-for': '10.9.9.9, 203.0.113.9' });
    expect(headers['x-forwarded-for']).toBe('203.0.113.9');
  });
  it('refuses a body beyond its limit before reading it', async () => {
    const post = 'POST /api/sign-in HTTP/1.1\r\nHost: x\r\n';
    expect(await statusOf(`${post}Content-Length: ${BODY_BYTES_MOST + 1}\r\n\r\n`)).toBe(
      'HTTP/1.1 413 Payload Too Large',
    );
    expect(await statusOf(`${post}Transfer-Encoding: chunked\r\n\r\n5\r\n`)).toBe(
      'HTTP/1.1 411 Length Required',
    );
  });
});

describe('an upgrade', () => {
  const upgrade = (path: string) =>
    statusOf(`GET ${path} HTTP/1.1\r\nHost: x\r\nConnection: Upgrade\r\nUpgrade: websocket\r\n\r\n`);

  it('to the live path goes to the stream', async () => {
    expect(await upgrade('/live')).toBe('HTTP/1.1 101 Taken');
  });
  it('to anywhere else is refused, even where the path is none', async () => {
    expect(await upgrade('/other')).toBe('HTTP/1.1 404 Not Found');
    expect(await upgrade('//')).toBe('HTTP/1.1 404 Not Found');
  });
});
