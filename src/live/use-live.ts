import { useSyncExternalStore } from 'react';
import { createLiveStream, IDLE_STATE, liveUrl, type LiveState, type LiveStream } from './live-stream';

export interface LiveOptions {
  /** site instant at which the page was made: the hook's now until the stream ticks, on the server and in the browser */
  readonly startAt: string;
  /** narrows the stream to these lines; without it, all lines, over the one socket the page's islands share */
  readonly lines?: readonly string[];
}

export type LiveView = LiveState & {
  /** site time, ms, moving on each second */
  readonly nowMs: number;
  /** age of the newest frame; undefined before the first */
  readonly ageMs: number | undefined;
};

// The islands of a page are separate React trees in one module world: this is how they share a socket.
const streams = new Map<string, { stream: LiveStream; users: number }>();

function listen(url: string, listener: () => void): () => void {
  const shared = streams.get(url) ?? {
    stream: createLiveStream({
      url,
      open: (to) => new WebSocket(to),
      now: () => Date.now(),
      random: () => Math.random(),
    }),
    users: 0,
  };
  streams.set(url, shared);
  shared.users += 1;
  const unsubscribe = shared.stream.subscribe(listener);
  listener();
  return () => {
    unsubscribe();
    shared.users -= 1;
    if (shared.users > 0) return;
    shared.stream.close();
    streams.delete(url);
  };
}

const subscriptions = new Map<string, (listener: () => void) => () => void>();

/** One function for each address, because React subscribes anew whenever it is handed another. */
function subscriptionTo(lines: readonly string[] | undefined): (listener: () => void) => () => void {
  const key = lines?.join(',') ?? '';
  const known = subscriptions.get(key) ?? ((listener) => listen(liveUrl(window.location, lines), listener));
  subscriptions.set(key, known);
  return known;
}

/** What the live stream says now; renders anew with each frame and each second. */
export function useLive({ startAt, lines }: LiveOptions): LiveView {
  const state = useSyncExternalStore(
    subscriptionTo(lines),
    () => streams.get(liveUrl(window.location, lines))?.stream.state() ?? IDLE_STATE,
    () => IDLE_STATE,
  );
  const nowMs = state.nowMs ?? Date.parse(startAt);
  const ageMs = state.lastFrameAtMs === undefined ? undefined : nowMs - state.lastFrameAtMs;
  return { ...state, nowMs, ageMs };
}
