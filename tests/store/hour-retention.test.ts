import { expect, it } from 'vitest';
import { dropHourLevelsBefore, type LevelRow, readLevels, writeLevels } from '../../src/store/levels';
import { testStore } from '../database';
import { levelRow } from './made-up-levels';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const FIRST_MS = Date.UTC(2016, 0, 1);
const PHASES = ['a', 'b', 'c'] as const;

const store = await testStore();

const rowAt = (lineId: number, phase: (typeof PHASES)[number], atMs: number): LevelRow =>
  levelRow({ lineId, phase, start: new Date(atMs) }, 2);

const countedHours = async (lineId: number): Promise<number[]> => {
  const rows = await readLevels(store, 'hour', {
    lineIds: [lineId],
    from: new Date(FIRST_MS),
    to: new Date(FIRST_MS + 30 * DAY_MS),
  });
  return PHASES.map((phase) => rows.filter((row) => row.phase === phase).length);
};

it('hour rows beyond their reach go, except those of a day that no day row holds', async () => {
  const hours = Array.from({ length: 10 * 24 }, (_, hour) => FIRST_MS + hour * HOUR_MS);
  const days = Array.from({ length: 10 }, (_, day) => FIRST_MS + day * DAY_MS);
  for (const lineId of [1, 2]) {
    const ofPhases = (times: readonly number[]) =>
      PHASES.flatMap((phase) => times.map((atMs) => rowAt(lineId, phase, atMs)));
    await writeLevels(store, 'hour', ofPhases(hours));
    // the second line’s third day has no day row
    await writeLevels(store, 'day', ofPhases(days.filter((_, day) => lineId === 1 || day !== 2)));
  }
  await dropHourLevelsBefore(store, new Date(FIRST_MS + 6 * DAY_MS));
  expect(await countedHours(1)).toEqual([96, 96, 96]);
  expect(await countedHours(2)).toEqual([120, 120, 120]);
});
