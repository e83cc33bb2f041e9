import { describe, expect, test } from 'vitest';
import { forecastDates } from '../../src/standing/forecast';

const NOT_WITHIN_FIVE_YEARS = { earliestDay: undefined, likelyDay: undefined, latestDay: undefined };
const FROM = { lastDay: 1000, levelNowAmps: 60, targetAmps: 70 };

function drift(low: number, likely: number, high: number) {
  return { slopeLowAmpsPerDay: low, slopeAmpsPerDay: likely, slopeHighAmpsPerDay: high };
}

describe('forecast', () => {
  test('reaches the target by the upper limit, the slope and the lower limit', () => {
    expect(forecastDates(drift(0.05, 0.1, 0.2), FROM)).toEqual({
      earliestDay: 1050,
      likelyDay: 1100,
      latestDay: 1200,
    });
  });

  test('names the first whole day on which the target is reached', () => {
    expect(forecastDates(drift(0.03, 0.03, 0.03), FROM).likelyDay).toBe(1334);
  });

  test('has no latest date when the drift may be none at all', () => {
    expect(forecastDates(drift(-0.01, 0.1, 0.2), FROM)).toMatchObject({
      likelyDay: 1100,
      latestDay: undefined,
    });
  });

  test('does not reach the target from a level that falls or stays', () => {
    expect(forecastDates(drift(-0.3, -0.2, -0.1), FROM)).toEqual(NOT_WITHIN_FIVE_YEARS);
    expect(forecastDates(drift(0, 0, 0), FROM)).toEqual(NOT_WITHIN_FIVE_YEARS);
  });

  test('ends after five years', () => {
    expect(forecastDates(drift(10 / 1830, 10 / 1827, 10 / 1826), FROM)).toEqual({
      earliestDay: 2826,
      likelyDay: undefined,
      latestDay: undefined,
    });
  });

  test('has already reached a target at or below the level of today', () => {
    for (const targetAmps of [60, 40]) {
      expect(forecastDates(drift(-0.2, -0.1, 0.1), { ...FROM, targetAmps })).toEqual({
        earliestDay: 1000,
        likelyDay: 1000,
        latestDay: 1000,
      });
    }
  });
});
