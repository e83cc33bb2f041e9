import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { LIVE_LIMITS, type LiveFrame, liveFrameSchema } from '../../src/contract/live';
import { createLiveHub, type LiveHub } from '../../src/live/hub';
import { resultOf, warningOf } from './made-up-result';

const NOW_MS = Date.parse('2026-03-02T10:00:00.500Z');
let hub: LiveHub;
beforeEach(() => {
  vi.useFakeTimers();
  hub = createLiveHub(() => NOW_MS);
});
afterEach(() => {
  hub.close();
  vi.useRealTimers();
});

/** A browser that keeps every frame as it came; `waiting` is what its socket has not got rid of. */
function browser(lines?: readonly string[]) {
  const frames: string[] = [];
  const end = {
    frames,
    waiting: 0,
    ticks: (): Extract<LiveFrame, { kind: 'tick' }>[] =>
      frames.flatMap((text) => {
        const frame = liveFrameSchema.parse(JSON.parse(text));
        return frame.kind === 'tick' ? [frame] : [];
      }),
    leave: () => {},
  };
  end.leave = hub.listen({
    lines: lines && new Set(lines),
    waitingBytes: () => end.waiting,
    send: (frame) => frames.push(frame),
  });
  return end;
}
const tick = (times = 1) => vi.advanceTimersByTime(LIVE_LIMITS.tickMs * times);
/** Every line of a tick with the differential current of its phase a. */
const figures = (frame: Extract<LiveFrame, { kind: 'tick' }> | undefined) =>
  frame?.results.map(({ line, phases }) => `${line} ${phases.a.differentialAmps}`);

describe('a browser', () => {
  it('gets the newest of everything with the first tick', () => {
    hub.takeResult(resultOf('l1', 1));
    hub.takeResult(resultOf('l2', 2));
    hub.takeWarnings([warningOf(1, 'l1')]);
    const end = browser();
    expect(end.frames).toEqual([]);
    tick();
    expect(end.ticks()).toHaveLength(1);
    expect(figures(end.ticks()[0])).toEqual(['l1 1', 'l2 2']);
    expect(end.ticks()[0]).toMatchObject({ at: '2026-03-02T10:00:00.500Z', warnings: [{ id: 1 }] });
  });

  it('gets one frame a tick with the newest of each line that has changed', () => {
    const end = browser();
    hub.takeResult(resultOf('l1', 1));
    hub.takeResult(resultOf('l2', 2));
    tick();
    for (const amps of [3, 4, 5]) hub.takeResult(resultOf('l2', amps));
    tick();
    expect(end.ticks().map(figures)).toEqual([['l1 1', 'l2 2'], ['l2 5']]);
  });

  it('hears nothing while nothing changes', () => {
    const end = browser();
    hub.takeResult(resultOf('l1', 1));
    tick(20);
    expect(end.frames).toHaveLength(1);
  });

  it('that asked for some lines gets those alone', () => {
    const end = browser(['l2']);
    hub.takeResult(resultOf('l1', 1));
    hub.takeWarnings([warningOf(1, 'l1')]);
    tick();
    expect(end.frames).toEqual([]);
    hub.takeResult(resultOf('l2', 2));
    hub.takeWarnings([warningOf(2, 'l2'), warningOf(3, 'l3')]);
    tick();
    expect(figures(end.ticks()[0])).toEqual(['l2 2']);
    expect(end.ticks()[0]?.warnings.map(({ id }) => id)).toEqual([2]);
  });

  it('that leaves hears no more', () => {
    const [gone, there] = [browser(), browser()];
    expect(hub.listenerCount()).toBe(2);
    gone.leave();
    expect(hub.listenerCount()).toBe(1);
    hub.takeResult(resultOf('l1', 1));
    tick();
    expect([gone.frames.length, there.frames.length]).toEqual([0, 1]);
  });

  it('hears a heartbeat every ten seconds', () => {
    const end = browser();
    vi.advanceTimersByTime(30_000);
    expect(end.frames.map((frame) => JSON.parse(frame) as unknown)).toEqual(
      Array.from({ length: 3 }, () => ({ kind: 'heartbeat', at: '2026-03-02T10:00:00.500Z' })),
    );
  });
});

describe('browsers that want everything and are up to date', () => {
  it('share one string, and one that came later gets its own first', () => {
    const [first, second] = [browser(), browser()];
    hub.takeResult(resultOf('l1', 1));
    hub.takeResult(resultOf('l2', 2));
    tick();
    const late = browser();
    hub.takeResult(resultOf('l1', 3));
    tick();
    expect(second.frames).toEqual(first.frames);
    expect(figures(first.ticks()[1])).toEqual(['l1 3']);
    expect(figures(late.ticks()[0])).toEqual(['l1 3', 'l2 2']);
  });

  it('agree in the end with one that was asked for line by line', () => {
    const all = browser();
    const narrow = browser(['l1', 'l2', 'l3']);
    for (let round = 0; round < 30; round += 1) {
      hub.takeResult(resultOf(`l${1 + (round % 3)}`, round));
      if (round % 4 === 0) tick();
    }
    tick();
    const newest = (end: ReturnType<typeof browser>) =>
      new Map(end.ticks().flatMap(({ results }) => results.map((result) => [result.line, result])));
    expect(newest(narrow)).toEqual(newest(all));
    expect(newest(all)).toEqual(new Map(hub.results()));
  });
});

describe('a browser that reads slowly', () => {
  it('is passed over while much waits in its socket, and then gets the newest state in one frame', () => {
    const [slow, quick] = [browser(), browser()];
    hub.takeResult(resultOf('l1', 1));
    tick();
    slow.waiting = LIVE_LIMITS.waitingBytes + 1;
    for (let amps = 2; amps <= 50; amps += 1) {
      hub.takeResult(resultOf('l1', amps));
      if (amps === 20) hub.takeResult(resultOf('l2', 20));
      tick();
    }
    vi.advanceTimersByTime(30_000);
    expect(slow.frames).toHaveLength(1);
    expect(quick.ticks()).toHaveLength(50);
    slow.waiting = 0;
    tick();
    expect(slow.ticks().map(figures)).toEqual([['l1 1'], ['l1 50', 'l2 20']]);
  });

  it('gets what it missed also when nothing has changed since it drained', () => {
    const slow = browser();
    slow.waiting = LIVE_LIMITS.waitingBytes + 1;
    hub.takeResult(resultOf('l1', 1));
    tick(10);
    slow.waiting = LIVE_LIMITS.waitingBytes;
    tick();
    expect(slow.ticks().map(figures)).toEqual([['l1 1']]);
  });
});

describe('a change of a warning', () => {
  const states = (end: ReturnType<typeof browser>) =>
    end.ticks().flatMap(({ warnings }) => warnings.map(({ id, state }) => `${id} ${state}`));

  it('is pushed when it opens, is acknowledged and returns', () => {
    const end = browser();
    for (const state of ['unacknowledged', 'acknowledged', 'normal'] as const) {
      hub.takeWarnings([warningOf(1, 'l1', { state })]);
      tick();
    }
    expect(states(end)).toEqual(['1 unacknowledged', '1 acknowledged', '1 normal']);
  });

  it('is pushed once, however often the same is read from the database', () => {
    const end = browser();
    for (let look = 0; look < 25; look += 1) {
      hub.takeWarnings([warningOf(1, 'l1'), warningOf(2, 'l1')]);
      tick();
    }
    expect(states(end)).toEqual(['1 unacknowledged', '2 unacknowledged']);
  });

  it('is forgotten when two thousand newer ones are held', () => {
    hub.takeWarnings(Array.from({ length: 2_010 }, (_, id) => warningOf(id, 'l1')));
    const end = browser();
    tick();
    const [frame] = end.ticks();
    expect(frame?.warnings).toHaveLength(2_000);
    expect(frame?.warnings[0]?.id).toBe(10);
  });
});
