import { describe, expect, test } from 'vitest';
import { CT_CLASSES, CT_CLASS_NAMES, pairBudget, transformerAtLimit } from '../../src/protection/ct-class';
import { scale } from '../../src/protection/phasor';
import { differentialAmps } from '../../src/protection/terminal-currents';
import { expectFigure, printed } from './tolerance';

const MINUTES_PER_RAD = (180 * 60) / Math.PI;

// IEC 61869-2:2012, tables 205 and 206, from memory.
const TABLE = [
  { name: '5P', ratioPercent: 1, minutes: 60, compositePercent: 5 },
  { name: '10P', ratioPercent: 3, minutes: undefined, compositePercent: 10 },
  { name: '5PR', ratioPercent: 1, minutes: 60, compositePercent: 5, remanencePercent: 10 },
  { name: 'PX', ratioPercent: 0.25, minutes: undefined },
  { name: 'TPX', ratioPercent: 0.5, minutes: 30 },
  { name: 'TPY', ratioPercent: 1, minutes: 60 },
  { name: 'TPZ', ratioPercent: 1, minutes: 18, aroundMinutes: 180 },
] as const;

const percent = (ratio: number | undefined): number | undefined =>
  ratio === undefined ? undefined : ratio * 100;

describe('IEC 61869-2:2012, tables 205 and 206', () => {
  test('holds these classes and no other', () => {
    expect(CT_CLASS_NAMES).toEqual(TABLE.map(({ name }) => name));
  });

  test.each(TABLE)('class $name has its limits', (row) => {
    const found = CT_CLASSES[row.name];
    expect(percent(found.ratioError)).toBeCloseTo(row.ratioPercent, 12);
    if (row.minutes === undefined) expect(found.displacementLimitRad).toBeUndefined();
    else expect(found.displacementLimitRad! * MINUTES_PER_RAD).toBeCloseTo(row.minutes, 9);
    const around = 'aroundMinutes' in row ? row.aroundMinutes : 0;
    expect(found.displacementRad * MINUTES_PER_RAD).toBeCloseTo(around, 9);
    expect(percent(found.compositeError)).toBe('compositePercent' in row ? row.compositePercent : undefined);
    expect(percent(found.remanenceMost)).toBe('remanencePercent' in row ? row.remanencePercent : undefined);
  });
});

// Computed outside the project.
describe('two ends of class 5P', () => {
  test('at opposite limits leave 0.04023 of the load', () => {
    expectFigure(pairBudget(CT_CLASSES['5P'], CT_CLASSES['5P']).differentialRatio, printed('0.04023'));
  });

  test('leave as much as the currents of their limits do', () => {
    const first = transformerAtLimit(CT_CLASSES['5P'], { ratioSign: 1, displacementSign: 1 });
    const second = transformerAtLimit(CT_CLASSES['5P'], { ratioSign: -1, displacementSign: -1 });
    expectFigure(differentialAmps([first, scale(second, -1)]), printed('0.04023'));
  });
});
