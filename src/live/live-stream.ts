import type { Result } from '../contract/result';
import { LIVE_LIMITS, LIVE_PATH, liveFrameSchema, type LiveFrame } from '../contract/live';
import type { Warning } from '../contract/warning';

/** The browser's end of the live stream: one socket, kept open, and what it has said so far. */

export const STREAM_LIMITS = {
  /** two and a half heartbeats without any frame */
  silenceMs: 2.5 * LIVE_LIMITS.heartbeatMs,
  /** a short break is mended before anybody is told */
  breakMs: 3_000,
  firstPauseMs: 500,
  longestPauseMs: 15_000,
} as const;

export type LiveStatus = 'live' | 'connecting' | 'lost';

/** Replaced, never changed in place: its parts keep their identity while they say the same. */
export interface LiveState {
  readonly results: ReadonlyMap<string, Result>;
  /** newest of each warning that changed since the page opened, by id */
  readonly warnings: ReadonlyMap<number, Warning>;
  readonly status: LiveStatus;
  /** site time, ms: the server's clock as far as its frames tell; undefined before the first tick */
  readonly nowMs: number | undefined;
  /** site time of the newest frame, ms */
  readonly lastFrameAtMs: number | undefined;
  /** how often the stream came back: whoever sees it grow fills the gap from the API */
  readonly returnCount: number;
}

export const IDLE_STATE: LiveState = {
  results: new Map(),
  warnings: new Map(),
  status: 'connecting',
  nowMs: undefined,
  lastFrameAtMs: undefined,
  returnCount: 0,
};

/** What the stream takes from the browser, handed in so that a test can stand in for it. */
export interface StreamSurroundings {
  readonly url: string;
  open(url: string): WebSocket;
  now(): number;
  random(): number;
}

export interface LiveStream {
  state(): LiveState;
  subscribe(listener: () => void): () => void;
  close(): void;
}

/** The pause before attempt n (from 0): doubling, capped, between half and all of it so that browsers do not come back in step. */
export function reconnectPauseMs(attempt: number, random: number): number {
  const full = Math.min(STREAM_LIMITS.firstPauseMs * 2 ** attempt, STREAM_LIMITS.longestPauseMs);
  return full * (0.5 + random / 2);
}

/** The newest of what is known and what a frame brings; the same map when it brings nothing new. */
export function withResults(
  known: ReadonlyMap<string, Result>,
  brought: readonly Result[],
): ReadonlyMap<string, Result> {
  if (brought.length === 0) return known;
  const next = new Map(known);
  for (const result of brought) next.set(result.line, result);
  return next;
}

export function withWarnings(
  known: ReadonlyMap<number, Warning>,
  brought: readonly Warning[],
): ReadonlyMap<number, Warning> {
  if (brought.length === 0) return known;
  const next = new Map(known);
  for (const warning of brought) {
    const before = next.get(warning.id);
    if (before === undefined || Date.parse(before.changedAt) <= Date.parse(warning.changedAt))
      next.set(warning.id, warning);
  }
  return next;
}

function parseFrame(data: unknown): LiveFrame | undefined {
  if (typeof data !== 'string') return undefined;
  try {
    const parsed = liveFrameSchema.safeParse(JSON.parse(data));
    return parsed.success ? parsed.data : undefined;
  } catch {
    return undefined;
  }
}

export const liveUrl = (page: Pick<Location, 'protocol' | 'host'>, lines?: readonly string[]): string =>
  `${page.protocol === 'https:' ? 'wss:' : 'ws:'}//${page.host}${LIVE_PATH}` +
  (lines === undefined ? '' : `?lines=${lines.map(encodeURIComponent).join(',')}`);

/** Opens the stream and keeps it open until closed. */
export function createLiveStream(surroundings: StreamSurroundings): LiveStream {
  const connection = new StreamConnection(surroundings);
  return {
    state: () => connection.state,
    subscribe: (listener) => connection.subscribe(listener),
    close: () => connection.close(),
  };
}

class StreamConnection {
  state: LiveState = IDLE_STATE;
  private readonly listeners = new Set<() => void>();
  private socket: WebSocket | undefined;
  private attempt = 0;
  private closed = false;
  private hasBeenLive = false;
  /** local instant since which no frame has come */
  private silentSinceMs: number;
  private socketSinceMs = 0;
  private brokenSinceMs: number | undefined;
  /** site clock less browser clock, as the newest frame told */
  private offsetMs = 0;
  private pause: ReturnType<typeof setTimeout> | undefined;
  private readonly ticking: ReturnType<typeof setInterval>;

  constructor(private readonly surroundings: StreamSurroundings) {
    this.silentSinceMs = surroundings.now();
    this.ticking = setInterval(() => this.tick(), 1_000);
    this.connect();
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  close(): void {
    this.closed = true;
    clearInterval(this.ticking);
    clearTimeout(this.pause);
    this.socket?.close();
  }

  private connect(): void {
    const socket = this.surroundings.open(this.surroundings.url);
    this.socket = socket;
    this.socketSinceMs = this.surroundings.now();
    socket.addEventListener('message', (event) => {
      if (socket === this.socket) this.take(parseFrame(event.data));
    });
    socket.addEventListener('close', () => {
      if (socket !== this.socket) return;
      this.comeBack();
      this.tick();
    });
  }

  private comeBack(): void {
    this.socket = undefined;
    if (this.closed) return;
    this.brokenSinceMs ??= this.surroundings.now();
    this.pause = setTimeout(() => this.connect(), reconnectPauseMs(this.attempt, this.surroundings.random()));
    this.attempt += 1;
  }

  private take(frame: LiveFrame | undefined): void {
    if (frame === undefined) return;
    const nowMs = Date.parse(frame.at);
    const localMs = this.surroundings.now();
    const returned = this.hasBeenLive && this.state.status !== 'live';
    this.offsetMs = nowMs - localMs;
    this.silentSinceMs = localMs;
    this.brokenSinceMs = undefined;
    this.attempt = 0;
    this.hasBeenLive = true;
    this.become({
      results: withResults(this.state.results, frame.kind === 'tick' ? frame.results : []),
      warnings: withWarnings(this.state.warnings, frame.kind === 'tick' ? frame.warnings : []),
      status: 'live',
      nowMs,
      lastFrameAtMs: nowMs,
      returnCount: this.state.returnCount + (returned ? 1 : 0),
    });
  }

  private tick(): void {
    const localMs = this.surroundings.now();
    this.leaveDeadSocket(localMs);
    const silent = localMs - this.silentSinceMs > STREAM_LIMITS.silenceMs;
    const broken = this.brokenSinceMs !== undefined && localMs - this.brokenSinceMs > STREAM_LIMITS.breakMs;
    const status =
      silent || broken ? 'lost' : this.brokenSinceMs === undefined ? this.state.status : 'connecting';
    this.become({ ...this.state, status, nowMs: localMs + this.offsetMs });
  }

  /** A socket that stays silent may be a connection that nobody told us is gone; its close can take minutes, so it is left. */
  private leaveDeadSocket(localMs: number): void {
    const dead = this.socket;
    const sinceMs = Math.max(this.socketSinceMs, this.silentSinceMs);
    if (dead === undefined || localMs - sinceMs <= STREAM_LIMITS.silenceMs) return;
    this.comeBack();
    dead.close();
  }

  private become(next: LiveState): void {
    this.state = next;
    for (const listener of this.listeners) listener();
  }
}
