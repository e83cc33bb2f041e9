import { describe, test } from 'vitest';
import { composition } from '../../src/standing/composition';
import { addSnapshot, emptySums } from '../../src/standing/composition-sums';
import type { Estimate } from '../../src/standing/composition';
import { expectFigure, printed } from './tolerance';

// Six snapshots, one a day, made up for this check: V̄ in kV, the second terminal's current and D in A. The figures
// come from NumPy 2.4.6: numpy.linalg.lstsq for the coefficients, numpy.linalg.cond of the Gram matrix of unit columns
// for the condition, lstsq without each row in turn for the jackknife; Student's t from SciPy 1.17.1 (scipy.stats.t).
const VOLTAGE = [
  [66.1, 0],
  [50.79, 42.78],
  [-21.27, 62.27],
  [-66.23, 9.44],
  [23.99, -61.7],
  [-38.78, 53.28],
];
const CURRENT = [
  [-303.8, 61.6],
  [-388.5, -159.7],
  [49.6, -173.0],
  [466.8, -192.7],
  [7.6, 259.9],
  [196.9, -336.7],
];
const DIFFERENTIAL = [
  [-1.83, 11.8],
  [-10.31, 9.45],
  [-9.47, -4.29],
  [0.97, -14.84],
  [10.4, 5.24],
  [-8.63, -9.38],
];

const pair = ([re, im]: readonly number[]) => ({ re: re!, im: im! });

describe('complex least squares agrees with NumPy', () => {
  const days = VOLTAGE.map((voltage, day) => {
    const sums = emptySums({ terminalCount: 2, hasVoltage: true });
    addSnapshot(sums, {
      differentialAmps: pair(DIFFERENTIAL[day]!),
      voltageKv: pair(voltage),
      otherCurrentsAmps: [pair(CURRENT[day]!)],
      throughAmps: 300,
    });
    return sums;
  });
  const found = composition(days, { frequencyHz: 50, daysLeast: 6 });
  if (found.kind !== 'separated') throw new Error('These snapshots can be told apart.');

  test('on the coefficients, the residue and the condition', () => {
    expectFigure(found.coefficients[0]!.re, printed('0.00682281'));
    expectFigure(found.coefficients[0]!.im, printed('0.12761479'));
    expectFigure(found.coefficients[1]!.re, printed('0.00928394'));
    expectFigure(found.coefficients[1]!.im, printed('-0.00982526'));
    expectFigure(found.residualRmsAmps, printed('0.27143966'));
    expectFigure(found.condition, printed('39.577180'));
  });

  test('on the causes and their jackknife intervals', () => {
    const expectEstimate = (estimate: Estimate | undefined, value: string, half: string): void => {
      expectFigure(estimate?.value, printed(value));
      expectFigure(estimate && (estimate.high - estimate.low) / 2, printed(half));
    };
    expectEstimate(found.susceptanceMillisiemens, '0.1276148', '0.0102204');
    expectEstimate(found.conductanceMillisiemens, '0.0068228', '0.0157381');
    expectEstimate(found.mismatches[0]?.ratio, '0.00927168', '0.00279429');
    expectEstimate(found.mismatches[0]?.angleRad, '-0.01000928', '0.00216307');
  });
});
