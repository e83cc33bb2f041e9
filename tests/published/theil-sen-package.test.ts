import { TheilSenRegression } from 'ml-regression-theil-sen';
import { describe, expect, test } from 'vitest';
import { senSlope } from '../../src/standing/sen-slope';
import { seededRandom } from '../protection/seeded-random';
import { atSteps, BY_HAND, FROST_DAYS, NILE } from './trend-series';

// An independent implementation of the slope. Its intercept follows a convention of its own and is left out. Where
// the number of pairs is even it takes the lower of the two middle slopes and not their mean, so the series here
// have an odd number of pairs, or (the Nile) two equal slopes in the middle.
function expectSameSlope(times: number[], values: number[]): void {
  const series = values.map((value, index) => ({ time: times[index] ?? NaN, value }));
  expect(senSlope(series)?.slope).toBeCloseTo(new TheilSenRegression(times, values).slope, 10);
}

describe('ml-regression-theil-sen finds the same slope', () => {
  test.each([
    { name: 'the series worked by hand', values: BY_HAND },
    { name: 'the frost days but the last', values: FROST_DAYS.slice(0, -1) },
    { name: 'the Nile', values: NILE },
  ])('for $name', ({ values }) => {
    expectSameSlope(
      atSteps(values).map((point) => point.time),
      values,
    );
  });

  test('for daily levels with gaps', () => {
    const random = seededRandom(7);
    let day = 20_000;
    const days = Array.from({ length: 59 }, () => (day += 1 + Math.floor(3 * random())));
    expectSameSlope(
      days,
      days.map((each) => 40 + 0.05 * (each - 20_000) + 6 * random()),
    );
  });
});
