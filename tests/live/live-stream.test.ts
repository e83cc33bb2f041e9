import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { LiveFrame } from '../../src/contract/live';
import {
  createLiveStream,
  liveUrl,
  reconnectPauseMs,
  STREAM_LIMITS,
  type LiveStream,
} from '../../src/live/live-stream';

/** A socket whose far end is the test. */
class FarEnd extends EventTarget {
  closed = false;
  close(): void {
    this.closed = true;
  }
  says(data: unknown): void {
    this.dispatchEvent(
      new MessageEvent('message', { data: typeof data === 'string' ? data : JSON.stringify(data) }),
    );
  }
  breaks(): void {
    this.dispatchEvent(new Event('close'));
  }
}

let sockets: FarEnd[];
let stream: LiveStream;
/** the site's clock runs an hour ahead of the browser's */
const AHEAD_MS = 3_600_000;
const heartbeat = (): LiveFrame => ({ kind: 'heartbeat', at: new Date(Date.now() + AHEAD_MS).toISOString() });
const newest = () => sockets[sockets.length - 1]!;

beforeEach(() => {
  vi.useFakeTimers({ now: Date.parse('2026-12-01T13:00:00.000Z') });
  sockets = [];
  stream = createLiveStream({
    url: 'ws://site/live',
    open: () => {
      const socket = new FarEnd();
      sockets.push(socket);
      return socket as unknown as WebSocket;
    },
    now: () => Date.now(),
    random: () => 1,
  });
});
afterEach(() => {
  stream.close();
  vi.useRealTimers();
});

describe('the browser’s end of the stream', () => {
  it('is live from its first frame and tells the time of the site', () => {
    expect(stream.state().status).toBe('connecting');
    newest().says(heartbeat());
    vi.advanceTimersByTime(2_000);
    expect(stream.state()).toMatchObject({ status: 'live', nowMs: Date.now() + AHEAD_MS });
  });

  it('is lost after 25 s without any frame, and leaves the silent socket for a new one', () => {
    newest().says(heartbeat());
    const silent = newest();
    vi.advanceTimersByTime(25_000);
    expect(stream.state().status).toBe('live');
    vi.advanceTimersByTime(2_000);
    expect(stream.state().status).toBe('lost');
    expect(silent.closed).toBe(true);
    expect(sockets.length).toBe(2);
  });

  it('is lost when nothing ever answers', () => {
    vi.advanceTimersByTime(27_000);
    expect(stream.state().status).toBe('lost');
  });

  it('mends a short break without a word, and counts that it came back', () => {
    newest().says(heartbeat());
    newest().breaks();
    expect(stream.state().status).toBe('connecting');
    vi.advanceTimersByTime(600);
    newest().says(heartbeat());
    expect(stream.state()).toMatchObject({ status: 'live', returnCount: 1 });
  });

  it('says that it is lost when a break lasts, with growing pauses between its attempts', () => {
    newest().says(heartbeat());
    const attempts: number[] = [];
    newest().breaks();
    for (let count = 0; count < 8; count += 1) {
      const before = Date.now();
      vi.advanceTimersToNextTimer();
      while (sockets.length === count + 1) vi.advanceTimersToNextTimer();
      attempts.push(Date.now() - before);
      newest().breaks();
    }
    expect(attempts).toEqual([500, 1_000, 2_000, 4_000, 8_000, 15_000, 15_000, 15_000]);
    expect(stream.state().status).toBe('lost');
  });

  it('overlooks what is not a frame of the contract', () => {
    newest().says('{');
    newest().says({ kind: 'tick', at: 'yesterday', results: [{}], warnings: [] });
    expect(stream.state()).toMatchObject({ status: 'connecting', returnCount: 0 });
  });

  it('tells its listeners each second, and nobody once they have left', () => {
    const told = vi.fn();
    const leave = stream.subscribe(told);
    vi.advanceTimersByTime(3_000);
    leave();
    vi.advanceTimersByTime(3_000);
    expect(told).toHaveBeenCalledTimes(3);
  });
});

it('a pause lies between half and all of its length, and never beyond the longest', () => {
  expect(reconnectPauseMs(0, 0)).toBe(STREAM_LIMITS.firstPauseMs / 2);
  expect(reconnectPauseMs(0, 1)).toBe(STREAM_LIMITS.firstPauseMs);
  expect(reconnectPauseMs(60, 1)).toBe(STREAM_LIMITS.longestPauseMs);
});

it('the stream has the host of the page, and its encryption', () => {
  expect(liveUrl({ protocol: 'https:', host: 'site.example' })).toBe('wss://site.example/live');
  expect(liveUrl({ protocol: 'http:', host: 'site:8720' }, ['a', 'b'])).toBe('ws://site:8720/live?lines=a,b');
});
