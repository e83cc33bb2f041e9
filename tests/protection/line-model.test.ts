import { describe, expect, test } from 'vitest';
import { CT_CLASSES, pairBudget } from '../../src/protection/ct-class';
import {
  actingMismatch,
  classLimitModel,
  measuredModel,
  predictedCurrents,
} from '../../src/protection/line-model';
import {
  magnitude,
  multiply,
  phasor,
  phasorFromPolar,
  scale,
  subtract,
  sum,
} from '../../src/protection/phasor';
import { differentialAmps } from '../../src/protection/terminal-currents';

const LINE = { terminalCount: 2, voltageKv: 220, compensatedMillisiemens: 0 };
const PHASE_KV = 220 / Math.sqrt(3);

describe('predicted currents', () => {
  test('of a line without errors are the through current and half the charging at each end', () => {
    const model = measuredModel(LINE, { admittanceMillisiemens: phasor(0, 1), mismatches: [phasor(0, 0)] });
    const [first, second] = predictedCurrents(model, model.mismatchSets[0]!, {
      throughAmps: 600,
      lagRad: 0.4,
    });
    const half = phasor(0, PHASE_KV / 2);
    const through = phasorFromPolar(600, -0.4);
    expect(magnitude(subtract(first!, sum([through, half])))).toBeLessThan(1e-9);
    expect(magnitude(subtract(second!, subtract(half, through)))).toBeLessThan(1e-9);
  });

  test('add up to Y·V̄ + Σ E·I of the composition', () => {
    const mismatches = [phasor(0.004, -0.01), phasor(-0.012, 0.002)];
    const admittanceMillisiemens = phasor(0.02, 1.4);
    const model = measuredModel(
      { ...LINE, terminalCount: 3, shares: [0.7, 0.3] },
      { admittanceMillisiemens, mismatches },
    );
    const currents = predictedCurrents(model, mismatches, { throughAmps: 800, lagRad: -0.2 });
    const [, second, third] = currents;
    const expected = sum([
      scale(admittanceMillisiemens, PHASE_KV),
      multiply(mismatches[0]!, second!),
      multiply(mismatches[1]!, third!),
    ]);
    expect(magnitude(subtract(sum(currents), expected))).toBeLessThan(1e-9);
  });

  test('turn round with half a turn of lag', () => {
    const model = measuredModel(LINE, {
      admittanceMillisiemens: phasor(0, 0),
      mismatches: [phasor(0.01, 0)],
    });
    const one = predictedCurrents(model, [phasor(0.01, 0)], { throughAmps: 500, lagRad: 0.3 });
    const other = predictedCurrents(model, [phasor(0.01, 0)], { throughAmps: 500, lagRad: 0.3 + Math.PI });
    one.forEach((current, index) => expect(magnitude(sum([current, other[index]!]))).toBeLessThan(1e-9));
  });
});

describe('a mismatch as it acts on the measured current', () => {
  test('of a terminal that measures more by a twentieth is a twenty-first', () => {
    const acting = actingMismatch(phasor(0.05, 0));
    expect(acting.re).toBeCloseTo(1 / 21, 12);
    expect(acting.im).toBe(0);
  });

  test('leaves a differential of what the terminal measures too much, whatever its ratio and angle', () => {
    const through = phasorFromPolar(700, -0.3);
    const e = phasor(-0.012, 0.02);
    const measured = scale(multiply(sum([phasor(1, 0), e]), through), -1);
    const left = multiply(actingMismatch(e), measured);
    expect(magnitude(subtract(left, sum([through, measured])))).toBeLessThan(1e-9);
  });
});

describe('model from class limits', () => {
  const classes = [CT_CLASSES['5P'], CT_CLASSES.TPX];

  test('leaves the budget of its two ends at the worst of its corners', () => {
    const model = classLimitModel(LINE, { susceptanceMillisiemens: 0, classes });
    const left = model.mismatchSets.map((set) =>
      differentialAmps(predictedCurrents(model, set, { throughAmps: 1000, lagRad: 0 })),
    );
    expect(model.mismatchSets).toHaveLength(4);
    // The budget is per ampere of true current, the model's through current is as the second end shows it.
    expect(Math.max(...left) / 1000).toBeCloseTo(pairBudget(classes[0]!, classes[1]!).differentialRatio, 3);
  });

  test('has the charging of the line constants, less what the scheme compensates', () => {
    const whole = classLimitModel(LINE, { susceptanceMillisiemens: 2, classes });
    expect(whole.admittanceMillisiemens).toEqual(phasor(0, 2));
    const compensated = { ...LINE, compensatedMillisiemens: 2 };
    expect(
      classLimitModel(compensated, { susceptanceMillisiemens: 2, classes }).admittanceMillisiemens,
    ).toEqual(phasor(0, 0));
    expect(whole.basis).toBe('class limits');
  });
});

describe('model', () => {
  test('of a line with as many mismatches as it has terminals is refused', () => {
    const mismatches = [phasor(0, 0), phasor(0, 0)];
    const admittanceMillisiemens = phasor(0, 1);
    expect(() => measuredModel(LINE, { admittanceMillisiemens, mismatches })).toThrow(RangeError);
    expect(() =>
      measuredModel({ ...LINE, terminalCount: 1 }, { admittanceMillisiemens, mismatches: [] }),
    ).toThrow(RangeError);
    expect(() => classLimitModel(LINE, { susceptanceMillisiemens: 1, classes: [] })).toThrow(RangeError);
  });
});
