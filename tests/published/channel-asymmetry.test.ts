import { describe, test } from 'vitest';
import {
  apparentDifferentialFactor,
  channelTimeErrorMs,
  timeErrorAngleRad,
} from '../../src/protection/channel';
import { expectFigure, printed } from './tolerance';

// 2·sin(θ/2) with θ = 180°·f·Δt, computed outside the project; Δt is the difference of the two ways.
const ASYMMETRIES = [
  { asymmetryMs: 0.1, frequencyHz: 50, factor: '0.01571' },
  { asymmetryMs: 0.1, frequencyHz: 60, factor: '0.01885' },
  { asymmetryMs: 1, frequencyHz: 50, factor: '0.15692' },
  { asymmetryMs: 1, frequencyHz: 60, factor: '0.18822' },
  { asymmetryMs: 2, frequencyHz: 50, factor: '0.31287' },
  { asymmetryMs: 2, frequencyHz: 60, factor: '0.37476' },
  { asymmetryMs: 5, frequencyHz: 50, factor: '0.76537' },
  { asymmetryMs: 5, frequencyHz: 60, factor: '0.90798' },
] as const;

describe('channel asymmetry', () => {
  test.each(ASYMMETRIES)('$asymmetryMs ms at $frequencyHz Hz shows $factor of the load', (row) => {
    const timeErrorMs = channelTimeErrorMs(4 + row.asymmetryMs, 4);
    const angleRad = timeErrorAngleRad(timeErrorMs, row.frequencyHz);
    expectFigure(apparentDifferentialFactor(angleRad), printed(row.factor));
  });
});

describe('IEEE C37.118.1a-2014, §4.3', () => {
  test.each([
    { frequencyHz: 50, degrees: '0.018' },
    { frequencyHz: 60, degrees: '0.022' },
  ])('a time error of 1 µs is $degrees° at $frequencyHz Hz', ({ frequencyHz, degrees }) => {
    expectFigure((timeErrorAngleRad(0.001, frequencyHz) * 180) / Math.PI, printed(degrees));
  });
});
