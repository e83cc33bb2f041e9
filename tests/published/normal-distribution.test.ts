import { describe, test } from 'vitest';
import { normalCdf, normalQuantile } from '../../src/standing/normal';
import { expectFigure, printed } from './tolerance';

// Abramowitz and Stegun, Handbook of Mathematical Functions, tables 26.1 and 26.5. From memory; recomputed with
// SciPy, which agrees to every digit given here.
describe('normal distribution', () => {
  test.each([
    { x: 0.5, probability: printed('0.69146246127401') },
    { x: 1, probability: printed('0.84134474606854') },
    { x: 1.96, probability: printed('0.97500210485178') },
    { x: -3, probability: printed('0.00134989803163') },
    { x: -5, probability: { value: 2.866515718791933e-7, tolerance: 1e-18 } },
    { x: -8, probability: { value: 6.22096057427174e-16, tolerance: 1e-26 } },
  ])('lies below $x with this probability', ({ x, probability }) => {
    expectFigure(normalCdf(x), probability);
  });

  test.each([
    { p: 0.9, quantile: '1.281551565545' },
    { p: 0.975, quantile: '1.959963984540' },
    { p: 0.99, quantile: '2.326347874041' },
    { p: 0.995, quantile: '2.575829303549' },
    { p: 0.0005, quantile: '-3.290526731492' },
    { p: 1e-10, quantile: '-6.361340902404' },
  ])('has its $p quantile at $quantile', ({ p, quantile }) => {
    expectFigure(normalQuantile(p), printed(quantile));
  });
});
