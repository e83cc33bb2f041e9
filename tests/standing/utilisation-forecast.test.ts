import { expect, test } from 'vitest';
import type { Complex } from '../../src/standing/complex';
import { modulus } from '../../src/standing/complex';
import { compositionFit } from '../../src/standing/composition-fit';
import { totalOf } from '../../src/standing/composition-sums';
import { predictedDifferentialAmps, twoTerminalPoint } from '../../src/standing/operating-point';
import { dailyUtilisation, watchedUtilisation } from '../../src/standing/utilisation-forecast';
import { dayOf, sumsOf } from './made-up-phase';

const days = Array.from({ length: 90 }, (_, day) => ({
  day,
  sums: sumsOf(
    dayOf({ susceptanceMillisiemens: 0.1, mismatches: [{ re: 0.01 + 0.0002 * day, im: 0 }] }, day),
  ),
}));
const fit = compositionFit(totalOf(days.map(({ sums }) => sums))!)!;
const points = [-0.3, 0, 0.3].map((powerFactorAngleRad) =>
  twoTerminalPoint({ voltageKv: 63.5, throughAmps: 900, powerFactorAngleRad }),
);
// a straight 60 A threshold stands for the scheme
const utilisationOf = (coefficients: readonly Complex[]) =>
  Math.max(
    ...points.map(
      (point) => modulus(predictedDifferentialAmps({ shape: fit.shape, coefficients }, point)) / 60,
    ),
  );

test('utilisation at emergency rating follows a mismatch that creeps, and is forecast to its marks', () => {
  const series = dailyUtilisation(days, { fit, utilisationOf });
  expect(series).toHaveLength(90);
  expect(series[89]!.utilisation - series[0]!.utilisation).toBeGreaterThan(0.2);
  const { verdict } = watchedUtilisation(series, { nearRatio: 0.7, horizonDays: 365, markDays: [] });
  if (verdict.kind !== 'creep') throw new Error(verdict.kind);
  // |D| = 0.7 × 60 A at 900 A is a mismatch of about 4.7 %: some 180 days from the start
  expect(verdict.near.likelyDay).toBeGreaterThan(150);
  expect(verdict.near.likelyDay).toBeLessThan(220);
  expect(verdict.pickup.likelyDay).toBeGreaterThan(verdict.near.likelyDay!);
});

test('days for which the scheme can’t tell are left out', () => {
  expect(dailyUtilisation(days, { fit, utilisationOf: () => undefined })).toEqual([]);
});
