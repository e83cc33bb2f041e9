import { describe, expect, it } from 'vitest';
import { newSettingsVersionSchema } from '../../src/contract/register';
import { ctField, schemeTyped } from '../../src/view/register-scheme-typed';
import { settingsFromTyped } from '../../src/view/register-typed';

const PLACE = { timeZone: 'Europe/Berlin', terminals: ['arden', 'birk'], capacitanceNfPerKm: 8.9 };
const common = { validFrom: '2026-03-01T10:00', note: 'As commissioned.' };
const errors = (terminal: string) => ({
  [ctField('errorBelow', terminal)]: '1',
  [ctField('errorAbove', terminal)]: '29',
  [ctField('limitAmps', terminal)]: '2400',
});
const twoSlope = {
  ...{ kind: 'two-slope', pickupAmps: '120', slope1: '30', kneeAmps: '1500', slope2: '60' },
  ...{ slopeStart: 'from-zero', restraint: 'maximum' },
};
const adaptive = {
  ...{ kind: 'adaptive', pickupAmps: '80', timeErrorMs: '0.2' },
  ...errors('arden'),
  ...errors('birk'),
};
const alphaPlane = { kind: 'alpha-plane', pickupAmps: '100', radius: '6', angleDeg: '195' };
const comparison = { kind: 'phase-comparison', toleranceDeg: '60', releaseAmps: '120' };

const problemsOf = (typed: Record<string, string>, place = PLACE) =>
  settingsFromTyped({ ...common, ...typed }, place).problems.map(
    ({ field, problem }) => `${field}: ${problem}`,
  );

describe('a scheme as typed', () => {
  it.each([
    [twoSlope, { kind: 'maximum' }],
    [adaptive, { kind: 'error-sum' }],
    [alphaPlane, { kind: 'none' }],
    [comparison, { kind: 'none' }],
  ])('of each kind has the restraint that goes with it: %o', (typed, restraint) => {
    const { value, problems } = settingsFromTyped({ ...common, ...typed }, PLACE);
    expect(problems).toEqual([]);
    const version = newSettingsVersionSchema.parse(value);
    expect(version.restraint).toEqual(restraint);
    expect(schemeTyped(version)).toMatchObject(typed);
  });

  it('holds transformer errors in per cent and stores them as ratios', () => {
    const { value } = settingsFromTyped({ ...common, ...adaptive }, PLACE);
    expect(newSettingsVersionSchema.parse(value).characteristic).toMatchObject({
      ctErrors: [
        { terminal: 'arden', errorBelow: 0.01, errorAbove: 0.29, limitAmps: 2400 },
        { terminal: 'birk', errorBelow: 0.01, errorAbove: 0.29, limitAmps: 2400 },
      ],
    });
  });

  it('asks for the fields of its own kind and no others', () => {
    expect(problemsOf({ kind: 'alpha-plane', slope1: 'x' }).map((text) => text.split(':')[0])).toEqual([
      'pickupAmps',
      'radius',
      'angleDeg',
    ]);
    expect(problemsOf({ ...comparison, pickupAmps: '-7' })).toEqual([]);
    expect(problemsOf({ ...alphaPlane, restraint: 'scaled-sum', factor: '' })).toEqual([]);
  });

  it.each([
    [{ ...twoSlope, pickupAmps: '-5' }, 'pickupAmps: The pickup must be a number of amperes above 0.'],
    [{ ...twoSlope, kneeAmps: '100' }, 'kneeAmps: The knee must be at or beyond 400 A'],
    [{ ...twoSlope, slope2: '201' }, 'slope2: A slope is 0 to 200 %.'],
    [{ ...twoSlope, restraint: 'scaled-sum', factor: '1.5' }, 'factor: The restraint factor must be'],
    [{ ...alphaPlane, radius: '1' }, 'radius: The radius must be a ratio above 1'],
    [
      { ...alphaPlane, angleDeg: '361' },
      'angleDeg: The angle must be a number of degrees above 0, up to 360.',
    ],
    [{ ...alphaPlane, angleDeg: '-10' }, 'angleDeg: The angle must be'],
    [{ ...comparison, toleranceDeg: '181' }, 'toleranceDeg: The tolerance angle must be'],
    [{ ...comparison, releaseAmps: '0' }, 'releaseAmps: The release current must be'],
    [{ ...adaptive, timeErrorMs: '9' }, 'timeErrorMs: The residual time error must be'],
    [{ ...adaptive, [ctField('errorAbove', 'birk')]: '150' }, 'errorAbove:birk: An error is 0 to 100 %.'],
    [{ ...adaptive, [ctField('limitAmps', 'birk')]: '0' }, 'limitAmps:birk: The limit current must be'],
  ])('that no scheme can have is refused beside its field: %o', (typed, problem) => {
    const problems = problemsOf(typed);
    expect(problems).toHaveLength(1);
    expect(problems[0]).toContain(problem);
  });

  it('is refused where the line lacks what it needs', () => {
    const three = { ...PLACE, terminals: ['arden', 'birk', 'corl'] };
    expect(problemsOf(comparison, three)).toEqual([
      'kind: A phase comparison weighs two terminals against each other; this line has 3.',
    ]);
    expect(problemsOf(alphaPlane, three)).toEqual([]);
    const bare = { ...PLACE, capacitanceNfPerKm: null } as unknown as typeof PLACE;
    expect(problemsOf({ ...twoSlope, chargingCompensation: 'yes' }, bare)).toEqual([
      'chargingCompensation: The charging current can be compensated only when the line’s capacitance is recorded, which it is not.',
    ]);
  });
});
