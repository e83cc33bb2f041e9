import { describe, expect, it } from 'vitest';
import type { ReplaySettings } from '../../src/contract/replay';
import type { ReplayLine } from '../../src/view/replay-problems';
import { problemsByField, settingsFromTyped, typedSettings } from '../../src/view/replay-typed';

const line: ReplayLine = {
  key: 'arden-birk',
  name: 'Arden – Birk',
  goesBy: 'phasors',
  capacitanceNfPerKm: 9,
  terminals: [
    { key: 'arden', substationName: 'Arden' },
    { key: 'birk', substationName: 'Birk' },
  ],
};

const twoSlope: ReplaySettings = {
  characteristic: {
    kind: 'two-slope',
    pickupAmps: 120,
    slope1: 0.3,
    kneeAmps: 1500,
    slope2: 0.6,
    slopeStart: 'from-pickup',
  },
  restraint: { kind: 'scaled-sum', factor: 0.5 },
  chargingCompensation: true,
};
const EACH: ReplaySettings[] = [
  twoSlope,
  { ...twoSlope, restraint: { kind: 'maximum' }, chargingCompensation: false },
  {
    characteristic: {
      kind: 'adaptive',
      pickupAmps: 90,
      timeErrorMs: 0.1,
      ctErrors: [
        { terminal: 'arden', errorBelow: 0.03, errorAbove: 0.1, limitAmps: 4000 },
        { terminal: 'birk', errorBelow: 0.011, errorAbove: 0.07, limitAmps: 3000 },
      ],
    },
    restraint: { kind: 'error-sum' },
    chargingCompensation: false,
  },
  {
    characteristic: { kind: 'alpha-plane', pickupAmps: 150, radius: 4, angleDeg: 170 },
    restraint: { kind: 'none' },
    chargingCompensation: false,
  },
  {
    characteristic: { kind: 'phase-comparison', toleranceDeg: 55, releaseAmps: 200 },
    restraint: { kind: 'none' },
    chargingCompensation: false,
  },
];

describe('the form of a replay', () => {
  it.each(EACH)('gives back the settings it was filled from: %o', (settings) => {
    expect(settingsFromTyped(typedSettings(settings, line), line)).toEqual({ settings, problems: {} });
  });

  it('shows ratios in per cent and takes a comma for a point', () => {
    const typed = typedSettings(twoSlope, line);
    expect(typed).toMatchObject({ slope1: '30', slope2: '60' });
    const { settings } = settingsFromTyped({ ...typed, slope1: ' 27,5 ' }, line);
    expect(settings?.characteristic).toMatchObject({ slope1: 0.275 });
  });

  it('names every figure that is missing, and no other', () => {
    const { settings, problems } = settingsFromTyped({ kind: 'alpha-plane', pickupAmps: '100' }, line);
    expect(settings).toBeUndefined();
    expect(Object.keys(problems)).toEqual(['radius', 'angleDeg']);
  });

  it.each([
    [{ slope1: '250' }, 'slope1', 'A slope is 0 to 200 %.'],
    [{ pickupAmps: '-1' }, 'pickupAmps', /above 0/],
    [{ kneeAmps: '-5' }, 'kneeAmps', /0 or above/],
    [{ factor: '1.5' }, 'factor', /up to 1/],
  ])('says beside the field what is allowed: %o', (change, field, sentence) => {
    const { problems } = settingsFromTyped({ ...typedSettings(twoSlope, line), ...change }, line);
    expect(problems[field]).toMatch(sentence);
  });

  it('refuses compensation without the line’s capacitance, and a region where the feed has no phasors', () => {
    const without = settingsFromTyped(typedSettings(twoSlope, line), { ...line, capacitanceNfPerKm: null });
    expect(Object.keys(without.problems)).toEqual(['chargingCompensation']);
    const reported = settingsFromTyped(typedSettings(EACH[3], line), { ...line, goesBy: 'reported' });
    expect(Object.keys(reported.problems)).toEqual(['kind']);
  });

  it('refuses a comparison of two terminals on a line of three', () => {
    const three = { ...line, terminals: [...line.terminals, { key: 'corl', substationName: 'Corl' }] };
    const { problems } = settingsFromTyped(typedSettings(EACH[4], three), three);
    expect(problems.kind).toMatch(/two terminals/);
  });
});

describe('problems of the settings’ own paths', () => {
  it('go to the form’s fields, the first of each', () => {
    const found = [
      {
        field: 'settings.characteristic.ctErrors.1.errorBelow',
        problem: 'The error must be a ratio from 0 to 1.',
      },
      { field: 'settings.restraint.kind', problem: 'No.' },
      { field: 'settings.restraint.kind', problem: 'Later.' },
      { field: 'to', problem: 'The period begins before it ends.' },
    ];
    expect(problemsByField(found)).toEqual({
      'ctErrors.1.errorBelow': 'An error is 0 to 100 %.',
      restraintKind: 'No.',
      to: 'The period begins before it ends.',
    });
  });
});
