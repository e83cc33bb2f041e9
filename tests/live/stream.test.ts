import { createServer, type IncomingMessage } from 'node:http';
import { connect as connectSocket, type AddressInfo, type Socket } from 'node:net';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { WebSocket } from 'ws';
import { LIVE_LIMITS } from '../../src/contract/live';
import { createLiveHub, type Listener, type LiveHub } from '../../src/live/hub';
import { createLiveStream, type LiveStream } from '../../src/live/stream';
import { attachLive, refuseUpgrade } from '../../src/server/live-upgrade';
import { until } from '../until';
import { resultOf, warningOf } from './made-up-result';

const ORIGIN = 'https://tareline.example';
const SIGNED_IN = { cookie: 'session=mira' };

/** Who is signed in, by cookie; a test may take somebody out, or take the database away. */
let people: Map<string, { name: string }>;
let databaseAway: boolean;
const personOf = (request: IncomingMessage): Promise<unknown> =>
  databaseAway
    ? Promise.reject(new Error('The database is away.'))
    : Promise.resolve(people.get(request.headers.cookie ?? ''));

let hub: LiveHub;
let stream: LiveStream;
let server: ReturnType<typeof createServer>;
/** the server's ends of all streams */
let ends: Listener[];
const opened: (WebSocket | Socket)[] = [];

beforeEach(async () => {
  // only what ticks is ours to wind on; sockets and their timeouts stay real
  vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
  people = new Map([[SIGNED_IN.cookie, { name: 'Mira Holt' }]]);
  databaseAway = false;
  ends = [];
  const innermost = createLiveHub(Date.now);
  hub = {
    ...innermost,
    listen(listener) {
      ends.push(listener);
      return innermost.listen(listener);
    },
  };
  stream = createLiveStream({ hub, personOf, allowedOrigin: ORIGIN });
  server = createServer((_request, response) => response.writeHead(404).end());
  attachLive(server, { stream, others: refuseUpgrade });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
});
afterEach(async () => {
  for (const client of opened.splice(0)) {
    if (client instanceof WebSocket) client.terminate();
    else client.destroy();
  }
  hub.close();
  stream.close();
  vi.useRealTimers();
  await new Promise((resolve) => server.close(resolve));
});

const port = () => (server.address() as AddressInfo).port;
const address = (path: string) => `ws://127.0.0.1:${port()}${path}`;

/** Asks for the stream; the status that the server answers with, or 101 and the open socket. */
function asked(
  path: string,
  headers: Record<string, string>,
): Promise<{ status: number; client: WebSocket }> {
  const client = new WebSocket(address(path), { headers });
  opened.push(client);
  return new Promise((resolve, reject) => {
    client.once('open', () => resolve({ status: 101, client }));
    client.once('unexpected-response', (request, response) => {
      resolve({ status: response.statusCode ?? 0, client });
      request.destroy();
    });
    client.once('error', reject);
  });
}

/** A signed-in browser with all the frames that it has got. */
async function browser(path = '/live') {
  const { client } = await asked(path, { ...SIGNED_IN, origin: ORIGIN });
  const frames: { kind: string; results?: { line: string }[]; warnings?: { id: number }[] }[] = [];
  client.on('message', (data: Buffer, isBinary) => {
    if (!isBinary) frames.push(JSON.parse(data.toString()) as (typeof frames)[number]);
  });
  const closed = new Promise<number>((resolve) => client.once('close', resolve));
  return { client, frames, closed };
}
const tick = () => vi.advanceTimersByTime(LIVE_LIMITS.tickMs);
const linesOf = (frames: Awaited<ReturnType<typeof browser>>['frames']) =>
  frames.map(({ results }) => results?.map(({ line }) => line));

describe('whoever asks for the stream', () => {
  it.each([
    ['without a session', '/live', {}, 401],
    ['with a session that nobody has', '/live', { cookie: 'session=guess' }, 401],
    [
      'from a foreign page, though signed in',
      '/live',
      { ...SIGNED_IN, origin: 'https://elsewhere.example' },
      403,
    ],
    [
      'from a page of the same host under another scheme',
      '/live',
      { ...SIGNED_IN, origin: 'http://tareline.example' },
      403,
    ],
    ['from a page without an origin', '/live', { ...SIGNED_IN, origin: 'null' }, 403],
    ['for a line whose key is none', '/live?lines=l1,L2', SIGNED_IN, 400],
    ['for no line by name', '/live?lines=', SIGNED_IN, 400],
    ['for more lines than there may be', `/live?lines=${'l,'.repeat(2_000)}l`, SIGNED_IN, 400],
    ['under another address', '/live/more', SIGNED_IN, 404],
    ['signed in, from a page of the site', '/live', { ...SIGNED_IN, origin: ORIGIN }, 101],
    ['signed in, from a script', '/live', SIGNED_IN, 101],
    ['for some lines', '/live?lines=l1,l2', SIGNED_IN, 101],
  ])('%s is answered as is due', async (_, path, headers, status) => {
    expect((await asked(path, headers)).status).toBe(status);
    expect(hub.listenerCount()).toBe(status === 101 ? 1 : 0);
  });

  it('while nobody can tell whose session it is, is asked to come back later', async () => {
    databaseAway = true;
    expect((await asked('/live', SIGNED_IN)).status).toBe(503);
  });
});

describe('an open stream', () => {
  it('brings results and warnings as they change', async () => {
    const { frames } = await browser();
    hub.takeResult(resultOf('l1', 1));
    tick();
    hub.takeResult(resultOf('l2', 2));
    hub.takeWarnings([warningOf(5, 'l2')]);
    tick();
    await until(() => frames.length === 2, 2_000);
    expect(linesOf(frames)).toEqual([['l1'], ['l2']]);
    expect(frames[1]?.warnings).toMatchObject([{ id: 5 }]);
  });

  it('brings the lines that were asked for, and no others', async () => {
    const [narrow, all] = [await browser('/live?lines=l2'), await browser()];
    for (const line of ['l1', 'l2', 'l3']) hub.takeResult(resultOf(line, 1));
    tick();
    await until(() => narrow.frames.length > 0 && all.frames.length > 0, 2_000);
    expect(linesOf(narrow.frames)).toEqual([['l2']]);
    expect(linesOf(all.frames)).toEqual([['l1', 'l2', 'l3']]);
  });

  it('brings a heartbeat every ten seconds', async () => {
    const { frames } = await browser();
    vi.advanceTimersByTime(LIVE_LIMITS.heartbeatMs);
    await until(() => frames.length > 0, 2_000);
    expect(frames.map(({ kind }) => kind)).toEqual(['heartbeat']);
  });

  it('takes no notice of what the browser sends', async () => {
    const { client, frames } = await browser();
    for (const sent of ['{"kind":"tick"}', 'acknowledge 5', Buffer.from([0, 1, 2])]) client.send(sent);
    await new Promise<void>((resolve) => {
      client.once('pong', () => resolve());
      client.ping();
    });
    hub.takeResult(resultOf('l1', 1));
    tick();
    await until(() => frames.length > 0, 2_000);
    expect(linesOf(frames)).toEqual([['l1']]);
  });

  it('is cut when the browser sends more than any has to say, and others go on', async () => {
    const [loud, quiet] = [await browser(), await browser()];
    loud.client.send('x'.repeat(2_000));
    expect(await loud.closed).toBe(1009);
    await until(() => hub.listenerCount() === 1, 2_000);
    hub.takeResult(resultOf('l1', 1));
    tick();
    await until(() => quiet.frames.length > 0, 2_000);
  });

  it('is forgotten when the browser goes', async () => {
    const { client } = await browser();
    client.terminate();
    await until(() => hub.listenerCount() === 0, 2_000);
  });

  it('is closed as going away when the server stops', async () => {
    const { closed } = await browser();
    stream.close();
    expect(await closed).toBe(1001);
  });
});

describe('a session that ends', () => {
  it('closes its stream within ten seconds, and leaves those of others', async () => {
    const { closed } = await browser();
    people.set('session=jon', { name: 'Jon Aske' });
    const other = await asked('/live', { cookie: 'session=jon' });
    people.delete(SIGNED_IN.cookie);
    expect(LIVE_LIMITS.sessionCheckMs).toBeLessThan(10_000);
    vi.advanceTimersByTime(LIVE_LIMITS.sessionCheckMs);
    expect(await closed).toBe(1008);
    expect(other.client.readyState).toBe(WebSocket.OPEN);
    await until(() => hub.listenerCount() === 1, 2_000);
  });

  it('is not what a database that is away says: the stream stays', async () => {
    const { client, frames } = await browser();
    databaseAway = true;
    vi.advanceTimersByTime(LIVE_LIMITS.sessionCheckMs);
    hub.takeResult(resultOf('l1', 1));
    tick();
    await until(() => linesOf(frames).length > 0, 2_000);
    expect(client.readyState).toBe(WebSocket.OPEN);
  });
});

describe('a browser that does not read', () => {
  const BIG = 100_000;
  /** A result of 100 kB: a line with more to say than any has. */
  const bigResult = (amps: number) => ({ ...resultOf('l1', amps), reason: 'x'.repeat(BIG) });

  it('holds no more of the server’s memory than the bound, and gets the newest when it reads again', async () => {
    const socket = connectSocket(port(), '127.0.0.1');
    opened.push(socket);
    socket.pause();
    socket.write(
      `GET /live HTTP/1.1\r\nHost: x\r\nConnection: Upgrade\r\nUpgrade: websocket\r\nCookie: ${SIGNED_IN.cookie}\r\n` +
        'Sec-WebSocket-Version: 13\r\nSec-WebSocket-Key: dGhlIHNhbXBsZSBub25jZQ==\r\n\r\n',
    );
    const [end] = await until(() => (ends.length > 0 ? ends : undefined), 2_000);
    let waitingMost = 0;
    for (let amps = 1; amps <= 400; amps += 1) {
      hub.takeResult(bigResult(amps));
      tick();
      waitingMost = Math.max(waitingMost, end!.waitingBytes());
      // lets what the system's own buffers still take go out
      if (amps % 20 === 0) await new Promise((resolve) => setImmediate(resolve));
    }
    expect(waitingMost).toBeGreaterThan(LIVE_LIMITS.waitingBytes);
    expect(waitingMost).toBeLessThan(LIVE_LIMITS.waitingBytes + 2 * BIG);
    let newest = '';
    socket.on('data', (chunk: Buffer) => (newest = (newest + chunk.toString('latin1')).slice(-BIG * 2)));
    socket.resume();
    await until(() => end!.waitingBytes() === 0, 5_000);
    tick();
    await until(() => newest.includes('"differentialAmps":400,"restraintAmps"'), 5_000);
  });
});
