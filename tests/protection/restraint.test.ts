import { describe, expect, test } from 'vitest';
import { phasor } from '../../src/protection/phasor';
import { restraintAmps, restraintConvention, restraintProblems } from '../../src/protection/restraint';
import type { MagnitudeRestraint } from '../../src/protection/restraint';

const CURRENTS = [phasor(300, 400), phasor(-300, 0), phasor(0, -100)];
const MAXIMUM: MagnitudeRestraint = { kind: 'maximum' };
const scaledSum = (factor: number): MagnitudeRestraint => ({ kind: 'scaled-sum', factor });

describe('restraint current', () => {
  test('is the scaled sum of all magnitudes', () => {
    expect(restraintAmps(scaledSum(0.5), CURRENTS)).toBe(450);
    expect(restraintAmps(scaledSum(1), CURRENTS)).toBe(900);
  });

  test('is the greatest of all magnitudes', () => {
    expect(restraintAmps(MAXIMUM, CURRENTS)).toBe(500);
  });

  test.each([scaledSum(0.5), MAXIMUM])('of no terminals is refused ($kind)', (restraint) => {
    expect(() => restraintAmps(restraint, [])).toThrow(RangeError);
  });
});

describe('restraint convention', () => {
  test.each([
    { restraint: scaledSum(0.5), words: '½ sum of magnitudes' },
    { restraint: scaledSum(1), words: 'sum of magnitudes' },
    { restraint: scaledSum(0.4), words: '0.4 × sum of magnitudes' },
    { restraint: MAXIMUM, words: 'greatest magnitude' },
  ])('reads “$words”', ({ restraint, words }) => {
    expect(restraintConvention(restraint)).toBe(words);
  });
});

describe('restraint problems', () => {
  test.each([scaledSum(0.5), scaledSum(1), MAXIMUM])('are none for %o', (restraint) => {
    expect(restraintProblems(restraint)).toEqual([]);
  });

  test.each([0, -0.5, 1.01, NaN, Infinity])('name the factor when it is %d', (factor) => {
    expect(restraintProblems(scaledSum(factor))).toEqual([
      { field: 'factor', problem: 'The restraint factor must be a number above 0, up to 1.' },
    ]);
  });
});
