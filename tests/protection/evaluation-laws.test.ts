import { describe, expect, test } from 'vitest';
import { evaluation, evaluationFromReported } from '../../src/protection/evaluation';
import type { Evaluated } from '../../src/protection/evaluation';
import { phasor, rotate, scale } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { schemeAtTerminals } from '../../src/protection/scheme';
import type { Scheme } from '../../src/protection/scheme';
import { evaluated } from './evaluated';
import { adaptiveScheme, ALPHA_PLANE, PHASE_COMPARISON, scaledScheme, TWO_SLOPE } from './schemes';
import { seededCurrents } from './seeded-currents';

const CONDITIONS = { frequencyHz: 50 };
const ADAPTIVE = adaptiveScheme(6);
const sets = seededCurrents(200);
const ofTwo = sets.filter((currents) => currents.length === 2);

const keysOf = (currents: readonly Phasor[]) => currents.map((_, index) => `t${index}`);

const standing = (scheme: Scheme, currents: readonly Phasor[]): Evaluated =>
  evaluated(schemeAtTerminals(scheme, keysOf(currents)), currents);

function expectSame(actual: Evaluated, expected: Evaluated): void {
  expect(actual.differentialAmps).toBeCloseTo(expected.differentialAmps, 7);
  expect(actual.utilisation).toBeCloseTo(expected.utilisation, 9);
  if (expected.restraintAmps === undefined) expect(actual.restraintAmps).toBeUndefined();
  else expect(actual.restraintAmps).toBeCloseTo(expected.restraintAmps, 7);
}

describe.each([
  { name: 'two-slope', scheme: TWO_SLOPE, cases: sets },
  { name: 'adaptive', scheme: ADAPTIVE, cases: sets },
  { name: 'alpha plane', scheme: ALPHA_PLANE, cases: sets },
  { name: 'phase comparison', scheme: PHASE_COMPARISON, cases: ofTwo },
])('$name', ({ scheme, cases }) => {
  test('stands where it stood when every phasor is rotated', () => {
    for (const currents of cases) {
      const rotated = currents.map((current) => rotate(current, 2.345));
      expectSame(standing(scheme, rotated), standing(scheme, currents));
    }
  });

  test('stands where it stood when all currents reverse', () => {
    for (const currents of cases) {
      const reversed = currents.map((current) => scale(current, -1));
      expectSame(standing(scheme, reversed), standing(scheme, currents));
    }
  });

  test('keeps its utilisation when currents and settings scale together', () => {
    for (const currents of cases) {
      const found = standing(
        scaledScheme(scheme, 2.5),
        currents.map((current) => scale(current, 2.5)),
      );
      expect(found.utilisation).toBeCloseTo(standing(scheme, currents).utilisation, 9);
    }
  });

  test('stands where it stood when the terminals change places, each with its own errors', () => {
    for (const currents of cases) {
      const keys = keysOf(currents).toReversed();
      const reversed = evaluated(schemeAtTerminals(scheme, keys), currents.toReversed());
      expectSame(reversed, standing(scheme, currents));
    }
  });

  test('is refused without terminals and with a current that is not finite', () => {
    const at = (currents: readonly Phasor[]) => () =>
      evaluation(schemeAtTerminals(scheme, keysOf(currents)), currents, CONDITIONS);
    expect(at([])).toThrow(RangeError);
    expect(at([phasor(NaN, 0), phasor(1, 0)])).toThrow(RangeError);
    expect(at([phasor(1, 0), phasor(0, Infinity)])).toThrow(RangeError);
  });
});

describe('swapping the ends of two terminals', () => {
  test.each([TWO_SLOPE, ALPHA_PLANE, PHASE_COMPARISON])(
    'leaves the utilisation of $characteristic.kind to the last digits',
    (scheme) => {
      for (const [one, other] of ofTwo) {
        const swapped = standing(scheme, [other!, one!]).utilisation;
        expect(swapped).toBeCloseTo(standing(scheme, [one!, other!]).utilisation, 13);
      }
    },
  );

  test('turns k of the alpha plane into 1/k', () => {
    for (const [one, other] of ofTwo) {
      const [there, back] = [standing(ALPHA_PLANE, [one!, other!]), standing(ALPHA_PLANE, [other!, one!])];
      if (there.region?.kind !== 'alpha-plane' || back.region?.kind !== 'alpha-plane') continue;
      expect(there.region.ratio * back.region.ratio).toBeCloseTo(1, 12);
      expect(there.region.angleRad).toBeCloseTo(-back.region.angleRad, 12);
    }
  });
});

describe('a terminal without current', () => {
  test('changes nothing in an alpha plane', () => {
    for (const currents of sets) {
      expectSame(standing(ALPHA_PLANE, [...currents, phasor(0, 0)]), standing(ALPHA_PLANE, currents));
    }
  });
});

describe('evaluation', () => {
  test('of an adaptive restraint has it as its threshold', () => {
    for (const currents of sets) {
      const found = standing(ADAPTIVE, currents);
      expect(found.thresholdAmps).toBe(found.restraintAmps);
      expect(found.utilisation).toBe(found.differentialAmps / found.thresholdAmps!);
    }
  });

  test('says which place a region scheme has', () => {
    const ends = [phasor(600, 0), phasor(0, -300)];
    expect(standing(ALPHA_PLANE, ends).region).toEqual({
      kind: 'alpha-plane',
      ratio: 0.5,
      angleRad: expect.closeTo(-Math.PI / 2, 12),
    });
    expect(standing(PHASE_COMPARISON, ends).region).toEqual({
      kind: 'phase-comparison',
      deviationRad: expect.closeTo(Math.PI / 2, 12),
    });
    expect(standing(ALPHA_PLANE, ends)).toMatchObject({
      restraintAmps: undefined,
      thresholdAmps: undefined,
    });
  });

  test.each([
    {
      scheme: PHASE_COMPARISON,
      count: 3,
      reason: 'A phase comparison weighs two terminals’ currents; 3 are there.',
    },
    {
      scheme: PHASE_COMPARISON,
      count: 1,
      reason: 'A phase comparison weighs two terminals’ currents; 1 is there.',
    },
    {
      scheme: ALPHA_PLANE,
      count: 1,
      reason: 'The alpha plane sets at least two terminals’ currents in relation; one is there.',
    },
    {
      scheme: adaptiveScheme(2),
      count: 3,
      reason: 'This snapshot has 3 terminals, and the settings state transformer errors for 2 of them.',
    },
    {
      scheme: { ...TWO_SLOPE, restraint: { kind: 'error-sum' as const } },
      count: 2,
      reason: 'A two-slope characteristic goes with the scaled sum or the greatest magnitude as restraint.',
    },
    {
      scheme: { ...adaptiveScheme(2), restraint: { kind: 'maximum' as const } },
      count: 2,
      reason: 'An adaptive characteristic goes with its own restraint, the sum of errors.',
    },
  ])('of $scheme.characteristic.kind with $count terminals: $reason', ({ scheme, count, reason }) => {
    const currents = Array.from({ length: count }, () => phasor(100, 0));
    expect(evaluation(scheme, currents, CONDITIONS)).toEqual({ notComputable: reason });
  });
});

describe('evaluation from reported magnitudes', () => {
  const reported = { differentialAmps: 90, restraintAmps: 400 };

  test('takes the threshold of a curve', () => {
    expect(evaluationFromReported(TWO_SLOPE, reported)).toMatchObject({
      thresholdAmps: 150,
      utilisation: 0.6,
    });
    expect(evaluationFromReported(ADAPTIVE, reported)).toMatchObject({ utilisation: 90 / 400 });
  });

  test('can’t be told of a scheme that needs phasors', () => {
    for (const scheme of [ALPHA_PLANE, PHASE_COMPARISON]) {
      expect(evaluationFromReported(scheme, reported)).toEqual({
        notComputable:
          'This scheme weighs phasors against each other, and this line’s feed holds magnitudes alone.',
      });
    }
  });
});
