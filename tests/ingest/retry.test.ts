import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { rootReason, untilDone } from '../../src/ingest/retry';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

/** Work that fails so many times before it succeeds, and the instants at which it was tried. */
function failing(times: number, error: Error = new Error('The database is away.')) {
  const begunMs = Date.now();
  const triedAtMs: number[] = [];
  const work = () => {
    triedAtMs.push(Date.now() - begunMs);
    return triedAtMs.length <= times ? Promise.reject(error) : Promise.resolve('done');
  };
  return { work, triedAtMs };
}
function retrying() {
  const said: string[] = [];
  const stop = new AbortController();
  return {
    said,
    stop,
    with: { what: 'Database', log: (words: string) => said.push(words), signal: stop.signal },
  };
}

describe('work that may fail', () => {
  it('is done at once when it succeeds, and nothing is said', async () => {
    const { said, with: how } = retrying();
    expect(await untilDone(failing(0).work, how)).toBe('done');
    expect(said).toEqual([]);
  });

  it('is tried again with growing pauses up to ten seconds, and that is said once on each side', async () => {
    const { said, with: how } = retrying();
    const { work, triedAtMs } = failing(9);
    const done = untilDone(work, how);
    await vi.advanceTimersByTimeAsync(60_000);
    expect(await done).toBe('done');
    const pauses = triedAtMs.slice(1).map((atMs, index) => atMs - triedAtMs[index]!);
    expect(pauses).toEqual([250, 500, 1_000, 2_000, 4_000, 8_000, 10_000, 10_000, 10_000]);
    expect(said).toEqual([
      'Database: waiting and trying again (The database is away.).',
      'Database: going on after 9 failed tries.',
    ]);
  });

  it('that succeeds the second time is said to have failed once', async () => {
    const { said, with: how } = retrying();
    const done = untilDone(failing(1).work, how);
    await vi.advanceTimersByTimeAsync(250);
    await done;
    expect(said.at(-1)).toBe('Database: going on after 1 failed try.');
  });

  it('is given up, in the midst of a pause, when the worker is stopped', async () => {
    const { stop, with: how } = retrying();
    const { work, triedAtMs } = failing(Infinity);
    const done = untilDone(work, how).catch((error: Error) => error.message);
    await vi.advanceTimersByTimeAsync(1_000);
    stop.abort();
    expect(await done).toBe('The database is away.');
    const tries = triedAtMs.length;
    await vi.advanceTimersByTimeAsync(60_000);
    expect(triedAtMs).toHaveLength(tries);
  });
});

describe('the reason of a failure', () => {
  const refused = Object.assign(new Error('connect ECONNREFUSED'), { code: 'ECONNREFUSED' });
  it.each([
    ['a plain one', new Error('Out of paper.'), 'Out of paper.'],
    ['one with a code', refused, 'ECONNREFUSED: connect ECONNREFUSED'],
    [
      'one wrapped twice',
      new Error('Failed query', { cause: new Error('x', { cause: refused }) }),
      'ECONNREFUSED: connect ECONNREFUSED',
    ],
    ['one that has a code alone', Object.assign(new Error(''), { code: 'EPIPE' }), 'EPIPE'],
    ['something thrown that is no error', 'paper jam', 'paper jam'],
  ])('is that at its root: %s', (_, error, reason) => {
    expect(rootReason(error)).toBe(reason);
  });
});
