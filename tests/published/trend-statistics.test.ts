import { describe, expect, test } from 'vitest';
import { hamedRao } from '../../src/standing/hamed-rao';
import { mannKendall } from '../../src/standing/mann-kendall';
import { senSlope } from '../../src/standing/sen-slope';
import { expectFigure, printed } from './tolerance';
import { atSteps, BY_HAND, FROST_DAYS, NILE } from './trend-series';

// Figures computed outside the project by independent implementations of the published methods:
// Mann–Kendall and Theil–Sen after Gilbert 1987, chapter 16; the correction after Hamed and Rao, J. Hydrol. 204,
// 1998, 182–196. The sources of the series are named with them.
const SERIES = [
  {
    name: 'the series worked by hand',
    values: BY_HAND,
    s: 54,
    varianceS: '332.6667',
    z: '2.905837',
    p: printed('0.003663'),
    slope: exactly('0.566667'),
    low: exactly('0.3250'),
    high: exactly('0.866667'),
    // The reference 0.820400 and 3.208178 ranks two equal residuals apart, by the rounding of its subtraction. In
    // exact fractions they tie, and the ratio is 0.820003: hence the tolerances.
    hamedRao: {
      varianceRatio: { value: 0.8204, tolerance: 0.0004 },
      z: { value: 3.208178, tolerance: 0.0008 },
    },
  },
  {
    name: 'frost days',
    values: FROST_DAYS,
    s: -7,
    varianceS: '207.0000',
    z: '-0.417029',
    p: printed('0.676657'),
    slope: exactly('-0.174242'),
    low: exactly('-1.142857'),
    high: exactly('0.625'),
    hamedRao: { varianceRatio: exactly('1'), z: printed('-0.417029') },
  },
  {
    name: 'the Nile',
    values: NILE,
    s: -1387,
    varianceS: '112728.3333',
    z: '-4.128067',
    p: { value: 3.658263e-5, tolerance: 0.5e-11 },
    slope: exactly('-2.6'),
    low: exactly('-3.627907'),
    high: exactly('-1.428571'),
    hamedRao: { varianceRatio: printed('2.142898'), z: printed('-2.819979') },
  },
] as const;

describe.each(SERIES)('$name', (series) => {
  test('has this Mann–Kendall test', () => {
    const found = mannKendall(series.values);
    expect(found?.count).toBe(series.values.length);
    expect(found?.s).toBe(series.s);
    expectFigure(found?.varianceS, printed(series.varianceS));
    expectFigure(found?.z, printed(series.z));
    expectFigure(found?.pTwoSided, series.p);
  });

  test('has this Sen slope with these 95 % limits', () => {
    const found = senSlope(atSteps(series.values));
    expectFigure(found?.slope, series.slope);
    expectFigure(found?.limits?.low, series.low);
    expectFigure(found?.limits?.high, series.high);
  });

  test('has this correction for autocorrelation', () => {
    const found = hamedRao(atSteps(series.values));
    expectFigure(found?.varianceRatio, series.hamedRao.varianceRatio);
    expectFigure(found?.z, series.hamedRao.z);
  });
});

/** Slopes are printed to six decimals, without trailing zeros. */
function exactly(digits: string) {
  return { value: Number(digits), tolerance: 0.5e-6 };
}
