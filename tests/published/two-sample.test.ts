import { describe, expect, test } from 'vitest';
import { mannWhitney } from '../../src/standing/mann-whitney';
import { studentTwoSided } from '../../src/standing/student-t';
import { expectFigure, printed } from './tolerance';

describe('the Mann–Whitney test', () => {
  // M. Hollander and D. A. Wolfe, "Nonparametric Statistical Methods", 1973, p. 69 f.: permeability constants of the
  // human chorioamnion at term and at 12 to 26 weeks (memory); U 35 of 50 and exact one-sided p 0.1272 recomputed with
  // scipy.stats.mannwhitneyu of SciPy 1.17.1, limits with the ordered differences by hand.
  const AT_TERM = [0.8, 0.83, 1.89, 1.04, 1.45, 1.38, 1.91, 1.64, 0.73, 1.46];
  const EARLIER = [1.15, 0.88, 0.9, 0.74, 1.21];

  test('agrees with Hollander and Wolfe', () => {
    const found = mannWhitney(EARLIER, AT_TERM);
    expect(found).toMatchObject({ u: 35, method: 'exact', countBefore: 5, countAfter: 10 });
    expectFigure(found?.pTwoSided, printed('0.254412'));
    expectFigure(found?.shift, printed('0.305000'));
    expectFigure(found?.limits?.low, printed('-0.150000'));
    expectFigure(found?.limits?.high, printed('0.760000'));
  });

  test('agrees with SciPy 1.17.1 on tied samples, normal approximation with continuity correction', () => {
    const found = mannWhitney([1, 2, 2, 3, 4, 4, 5, 7, 8], [3, 4, 5, 6, 6, 7, 8, 9, 9, 10]);
    expect(found).toMatchObject({ u: 72, method: 'normal', shift: 3 });
    expectFigure(found?.pTwoSided, printed('0.029687786'));
  });

  // Critical values of U, two-sided 5 %, as printed in most textbooks (memory): the greatest U that is significant.
  test.each([
    [5, 5, 2],
    [5, 8, 6],
    [8, 8, 13],
    [10, 10, 23],
    [12, 15, 49],
    [20, 20, 127],
  ])('of %i and %i values is significant at 5 %% up to U %i', (m, n, critical) => {
    expect(pOfU(m, n, critical)).toBeLessThanOrEqual(0.05);
    expect(pOfU(m, n, critical + 1)).toBeGreaterThan(0.05);
  });

  /** p of two samples without ties that have exactly this U: the values after move up past one before at a time. */
  function pOfU(m: number, n: number, u: number): number | undefined {
    const before = Array.from({ length: m }, (_, index) => 10 * (index + 1));
    const full = Math.floor(u / m);
    const after = Array.from({ length: n }, (_, index) => {
      const passed = index < full ? m : index === full ? u % m : 0;
      return 10 * passed + 1 + index / 100;
    });
    const found = mannWhitney(before, after);
    expect(found?.u).toBe(u);
    return found?.pTwoSided;
  }
});

describe('Student’s t', () => {
  // The usual table, here from scipy.stats.t.ppf of SciPy 1.17.1.
  test.each([
    [1, '12.706204736', '63.656741163'],
    [2, '4.302652730', '9.924843201'],
    [6, '2.446911851', '3.707428021'],
    [10, '2.228138852', '3.169272673'],
    [29, '2.045229642', '2.756385904'],
    [59, '2.000995378', '2.661758752'],
  ])('with %i degrees of freedom is %s for 95 %% and %s for 99 %%', (degrees, at95, at99) => {
    expectFigure(studentTwoSided(0.95, degrees), printed(at95));
    expectFigure(studentTwoSided(0.99, degrees), printed(at99));
  });
});
