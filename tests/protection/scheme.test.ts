import { describe, expect, test } from 'vitest';
import { pickupAmps } from '../../src/protection/characteristic';
import { phasor } from '../../src/protection/phasor';
import { schemeAtTerminals, schemeProblems, schemeRestraintAmps } from '../../src/protection/scheme';
import type { Scheme } from '../../src/protection/scheme';
import { adaptiveScheme, ALPHA_PLANE, PHASE_COMPARISON, TWO_SLOPE } from './schemes';

const TWO = { terminals: ['t0', 't1'] };
const THREE = { terminals: ['t0', 't1', 't2'] };

describe('scheme problems', () => {
  test.each([TWO_SLOPE, adaptiveScheme(2), ALPHA_PLANE, PHASE_COMPARISON])(
    'are none for $characteristic.kind on two terminals',
    (scheme) => {
      expect(schemeProblems(scheme, TWO)).toEqual([]);
    },
  );

  test('refuse phase comparison on more than two terminals, with the reason', () => {
    expect(schemeProblems(PHASE_COMPARISON, THREE)).toEqual([
      {
        field: 'characteristic.kind',
        problem: 'A phase comparison weighs two terminals against each other; this line has 3.',
      },
    ]);
    for (const scheme of [TWO_SLOPE, adaptiveScheme(3), ALPHA_PLANE]) {
      expect(schemeProblems(scheme, THREE)).toEqual([]);
    }
  });

  test('ask for the errors of every terminal, and of no other', () => {
    expect(schemeProblems(adaptiveScheme(2), { terminals: ['t1', 'mill'] })).toEqual([
      { field: 'characteristic.ctErrors', problem: 'State the transformer errors of mill.' },
      { field: 'characteristic.ctErrors.0.terminal', problem: 'This line has no terminal t0.' },
    ]);
  });

  test.each([
    { characteristic: TWO_SLOPE.characteristic, restraint: { kind: 'error-sum' } },
    { characteristic: TWO_SLOPE.characteristic, restraint: { kind: 'none' } },
    { characteristic: adaptiveScheme(2).characteristic, restraint: { kind: 'maximum' } },
    { characteristic: ALPHA_PLANE.characteristic, restraint: { kind: 'scaled-sum', factor: 0.5 } },
    { characteristic: PHASE_COMPARISON.characteristic, restraint: { kind: 'error-sum' } },
  ] satisfies Scheme[])('refuse $characteristic.kind with $restraint.kind', (scheme) => {
    expect(schemeProblems(scheme, TWO).map(({ field }) => field)).toEqual(['restraint.kind']);
  });

  test('come all at once, each beside its field', () => {
    const scheme: Scheme = {
      characteristic: { kind: 'phase-comparison', toleranceDeg: 0, releaseAmps: 0 },
      restraint: { kind: 'scaled-sum', factor: 3 },
    };
    expect(schemeProblems(scheme, THREE).map(({ field }) => field)).toEqual([
      'characteristic.toleranceDeg',
      'characteristic.releaseAmps',
      'characteristic.kind',
      'restraint.factor',
      'restraint.kind',
    ]);
  });
});

describe('scheme at terminals', () => {
  const errorsOf = ({ characteristic }: Scheme) =>
    characteristic.kind === 'adaptive' ? characteristic.ctErrors.map(({ terminal }) => terminal) : [];

  test('has the errors of the terminals in service, in their order', () => {
    expect(errorsOf(schemeAtTerminals(adaptiveScheme(4), ['t3', 't0']))).toEqual(['t3', 't0']);
  });

  test('has the first errors where a terminal’s are stated twice', () => {
    const { characteristic, restraint } = adaptiveScheme(2);
    if (characteristic.kind !== 'adaptive') throw new Error('This scheme is adaptive.');
    const [first] = characteristic.ctErrors;
    const twice = { ...characteristic, ctErrors: [first!, { ...first!, errorBelow: 0.5 }] };
    expect(schemeAtTerminals({ characteristic: twice, restraint }, ['t0'])).toEqual({
      characteristic: { ...characteristic, ctErrors: [first] },
      restraint,
    });
  });

  test('leaves a gap for a terminal that it does not know', () => {
    expect(errorsOf(schemeAtTerminals(adaptiveScheme(2), ['t1', 'mill']))).toEqual(['t1']);
  });

  test('is the scheme itself where nothing is by terminal', () => {
    expect(schemeAtTerminals(ALPHA_PLANE, ['t0'])).toBe(ALPHA_PLANE);
  });
});

describe('restraint by the scheme’s own convention', () => {
  const ends = [phasor(300, 400), phasor(-500, 0)];
  const restraint = (scheme: Scheme) => schemeRestraintAmps(scheme, ends, { frequencyHz: 50 });

  test('is formed where the scheme forms one', () => {
    expect(restraint(TWO_SLOPE)).toBe(500);
    expect(restraint(adaptiveScheme(2))).toBeGreaterThan(120);
    expect(restraint(ALPHA_PLANE)).toBeUndefined();
    expect(restraint(PHASE_COMPARISON)).toBeUndefined();
  });

  test('is not formed by a restraint that does not go with the characteristic', () => {
    expect(restraint({ ...TWO_SLOPE, restraint: { kind: 'none' } })).toBeUndefined();
    expect(restraint({ ...adaptiveScheme(2), restraint: { kind: 'maximum' } })).toBeUndefined();
  });
});

describe('pickup', () => {
  test('is the least differential current, which a phase comparison does not have', () => {
    expect(pickupAmps(TWO_SLOPE.characteristic)).toBe(150);
    expect(pickupAmps(adaptiveScheme(2).characteristic)).toBe(120);
    expect(pickupAmps(ALPHA_PLANE.characteristic)).toBe(150);
    expect(pickupAmps(PHASE_COMPARISON.characteristic)).toBeUndefined();
  });
});
