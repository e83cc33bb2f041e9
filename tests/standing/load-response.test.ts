import { describe, expect, test } from 'vitest';
import { hoursAtLoad, levelsAtLoad, loadResponse } from '../../src/standing/load-response';
import type { HourlyLevel } from '../../src/standing/load-response';

const MONDAY = 2_857 * 168;

/** Charging 3 A and a mismatch of 1.5 % at an angle to it, with a load that goes with day, weekday and season. */
function madeUpHours(
  days: number,
  levelAmps: (throughAmps: number, hour: number) => number = levelOf,
): HourlyLevel[] {
  return Array.from({ length: 24 * days }, (_, hour) => {
    const throughAmps =
      (200 + hour / 24) *
      (1 + 0.3 * Math.sin(hour / 3.8)) *
      (1 + 0.1 * Math.sin(Math.floor(hour / 24) * 2.3));
    return { hour: MONDAY + hour, throughAmps, levelAmps: levelAmps(throughAmps, hour) };
  });
}

const levelOf = (throughAmps: number): number => Math.hypot(3 + 0.005 * throughAmps, 0.015 * throughAmps);

describe('the load response', () => {
  test('brings levels to one load, though they are not straight in it', () => {
    const hours = madeUpHours(60);
    const response = loadResponse(hours)!;
    const levels = levelsAtLoad(hours, response);
    expect(levels).toHaveLength(60);
    for (const { levelAmps } of levels) expect(levelAmps).toBeCloseTo(levelOf(response.referenceAmps), 8);
  });

  test('brings every hour to one load', () => {
    const hours = madeUpHours(60);
    const response = loadResponse(hours)!;
    const values = hoursAtLoad(hours, response);
    expect(values.map(({ hour }) => hour)).toEqual(hours.map(({ hour }) => hour));
    for (const { value } of values) expect(value).toBeCloseTo(levelOf(response.referenceAmps), 8);
  });

  test('leaves a drift in them', () => {
    const hours = madeUpHours(60, (throughAmps, hour) => levelOf(throughAmps) + hour / 24 / 30);
    const levels = levelsAtLoad(hours, loadResponse(hours)!);
    expect(levels[59]!.levelAmps - levels[0]!.levelAmps).toBeCloseTo(59 / 30, 0);
  });

  test('does not take for load what follows the hour of the day', () => {
    const hours = madeUpHours(60, (throughAmps, hour) => Math.sqrt(levelOf(throughAmps) ** 2 + (hour % 24)));
    const plain = loadResponse(madeUpHours(60))!;
    const found = loadResponse(hours)!;
    expect(found.linearSquareAmps).toBeCloseTo(plain.linearSquareAmps, 8);
    expect(found.quadraticSquareAmps).toBeCloseTo(plain.quadraticSquareAmps, 8);
  });

  test('goes by weeks that are over: days of the running one change nothing', () => {
    const hours = madeUpHours(42);
    expect(loadResponse(hours.slice(0, 24 * 35 + 1))).toEqual(loadResponse(hours.slice(0, 24 * 41)));
    expect(loadResponse(hours)!.weeks).toBe(6);
  });

  test('stays near with hours missing, and a day of fewer than three hours has no level', () => {
    const hours = madeUpHours(60).filter(
      ({ hour }) => hour % 7 !== 3 && !(hour > MONDAY + 26 && hour < MONDAY + 48),
    );
    const response = loadResponse(hours)!;
    const levels = levelsAtLoad(hours, response);
    expect(levels.map(({ day }) => day - MONDAY / 24).slice(0, 3)).toEqual([0, 2, 3]);
    for (const { levelAmps } of levels) expect(levelAmps).toBeCloseTo(levelOf(response.referenceAmps), 8);
  });

  test('is not known of fewer than four whole weeks, nor of a load that hardly varies', () => {
    expect(loadResponse(madeUpHours(27))).toBeUndefined();
    expect(loadResponse([])).toBeUndefined();
    expect(loadResponse(madeUpHours(60).map((each) => ({ ...each, throughAmps: 200 })))).toBeUndefined();
    const alike = madeUpHours(60).map((each) => ({
      ...each,
      throughAmps: 200 + 50 * Math.sin((2 * Math.PI * each.hour) / 24) + 2 * Math.sin(each.hour / 5),
    }));
    expect(loadResponse(alike)).toBeUndefined();
  });

  test('refuses hours out of order', () => {
    expect(() => loadResponse(madeUpHours(60).reverse())).toThrow(RangeError);
  });
});

test('a level below what load explains is 0, not imaginary', () => {
  const response = {
    referenceAmps: 100,
    linearSquareAmps: 0,
    quadraticSquareAmps: 50,
    loadSpread: 0.1,
    weeks: 4,
  };
  const hours = [0, 1, 2].map((hour) => ({ hour, levelAmps: 2, throughAmps: 200 }));
  expect(levelsAtLoad(hours, response)).toEqual([{ day: 0, levelAmps: 0 }]);
});
