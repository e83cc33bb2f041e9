import { describe, expect, it } from 'vitest';
import { ownerOf } from '../../src/ingest/ownership';
import { roster } from '../../src/ingest/roster';
import { registeredLine } from './made-up-feed';

const KEYS = Array.from({ length: 2_000 }, (_, index) => `line-${index}`);

describe('the owner of a line', () => {
  it('is one of the workers, and the same one every time', () => {
    for (const workers of [1, 2, 3, 7]) {
      const owners = KEYS.map((key) => ownerOf(key, workers));
      expect(owners.every((owner) => Number.isInteger(owner) && owner >= 0 && owner < workers)).toBe(true);
      expect(KEYS.map((key) => ownerOf(key, workers))).toEqual(owners);
    }
  });

  it('moves, when a worker is added, only to the new one', () => {
    for (let workers = 1; workers < 8; workers += 1) {
      const moved = KEYS.filter((key) => ownerOf(key, workers) !== ownerOf(key, workers + 1));
      expect(moved.every((key) => ownerOf(key, workers + 1) === workers)).toBe(true);
      // a fair share of 1 in n + 1, give or take five standard deviations
      const share = 1 / (workers + 1);
      const tolerance = 5 * Math.sqrt((share * (1 - share)) / KEYS.length);
      expect(Math.abs(moved.length / KEYS.length - share)).toBeLessThan(tolerance);
    }
  });

  it('falls roughly evenly on the workers', () => {
    const counts = [0, 0, 0, 0, 0];
    for (const key of KEYS) counts[ownerOf(key, counts.length)]! += 1;
    for (const count of counts) expect(Math.abs(count - 400)).toBeLessThan(100);
  });

  it('is exactly one worker’s roster', () => {
    const register = KEYS.slice(0, 60).map((key, id) => registeredLine({ id, key }));
    const keys = [0, 1, 2].flatMap((workerIndex) => [
      ...roster(register, { workerIndex, workerCount: 3, frequencyHz: 50 }).keys(),
    ]);
    expect(keys.sort()).toEqual(KEYS.slice(0, 60).sort());
  });
});
