import { describe, expect, test } from 'vitest';
import { compositionStep } from '../../src/standing/composition-step';
import { addSnapshot, emptySums } from '../../src/standing/composition-sums';
import { stepVerdict } from '../../src/standing/step';
import { seededRandom } from '../protection/seeded-random';
import { dayOf, sumsOf } from './made-up-phase';
import type { PhaseTruth } from './made-up-phase';

const HOURS = 432;

function series(change: (hour: number) => number, seed = 7): { hour: number; value: number }[] {
  const random = seededRandom(seed);
  return Array.from({ length: HOURS }, (_, index) => ({
    hour: 1000 + index,
    value: 20 + random() - 0.5 + change(index),
  }));
}

describe('a step in hourly levels', () => {
  test('is found with its hour and its size, up and down', () => {
    for (const size of [5, -5]) {
      const found = stepVerdict(series((index) => (index >= 400 ? size : 0)));
      if (found.kind !== 'step') throw new Error(found.kind);
      expect(Math.abs(found.atHour - 1400)).toBeLessThan(0.2);
      expect(found.size).toBeCloseTo(size, 0);
      expect(found.hoursAfter).toBeGreaterThanOrEqual(31);
    }
  });

  test('in the middle of an hour is found there', () => {
    const found = stepVerdict(series((index) => (index > 400 ? 6 : index === 400 ? 2 : 0)));
    if (found.kind !== 'step') throw new Error(found.kind);
    expect(Math.abs(found.atHour - (1400 + 2 / 3))).toBeLessThan(0.2);
  });

  test('is not told before twelve hours confirm it', () => {
    expect(stepVerdict(series((index) => (index >= HOURS - 8 ? 6 : 0))).kind).toBe('no step');
    expect(stepVerdict(series((index) => (index >= HOURS - 15 ? 6 : 0))).kind).toBe('step');
  });

  test('is not seen in noise, in one odd hour or in a straight drift', () => {
    expect(stepVerdict(series(() => 0)).kind).toBe('no step');
    expect(stepVerdict(series((index) => (index === 400 ? 8 : 0))).kind).toBe('no step');
    expect(stepVerdict(series((index) => index / 20)).kind).toBe('no step');
  });

  test('says of no step whether something alarmed the sums', () => {
    const quiet = { kind: 'no step', alarmed: false };
    expect(stepVerdict(series(() => 0))).toEqual(quiet);
    const tooNew = series((index) => (index >= HOURS - 8 ? 6 : 0));
    expect(stepVerdict(tooNew)).toEqual({ ...quiet, alarmed: true });
  });

  test('does not depend on the unit of the values, nor on their level', () => {
    const steps = series((index) => (index >= 400 ? 5 : 0));
    const scaled = steps.map(({ hour, value }) => ({ hour, value: 1000 * value - 77 }));
    const [one, other] = [stepVerdict(steps), stepVerdict(scaled)];
    if (one.kind !== 'step' || other.kind !== 'step') throw new Error('Both series have a step.');
    expect(other.atHour).toBeCloseTo(one.atHour, 6);
    expect(other.size / one.size).toBeCloseTo(1000, 3);
  });

  test('can’t be told from too few hours, and a series that never changes has none', () => {
    expect(stepVerdict([])).toEqual({ kind: 'too few hours', hours: 0, hoursNeeded: 120 });
    expect(stepVerdict(series(() => 0).slice(0, 150)).kind).toBe('too few hours');
    expect(stepVerdict(series(() => 0).map(({ hour }) => ({ hour, value: 3 }))).kind).toBe('no step');
  });

  test('throws for hours out of order', () => {
    expect(() => stepVerdict([...series(() => 0)].reverse())).toThrow(RangeError);
  });
});

describe('a step of the composition', () => {
  const random = seededRandom(12);
  const before: PhaseTruth = { susceptanceMillisiemens: 0.15, mismatches: [{ re: 0.01, im: 0.01 }] };

  /** Hour rows of 18 days with a little noise, another truth from hour 400 on. */
  function hoursOf(after: PhaseTruth) {
    return Array.from({ length: HOURS }, (_, hour) => {
      const snapshot = dayOf(hour >= 400 ? after : before, Math.floor(hour / 24))[hour % 24]!;
      const noise = { re: 0.2 * (random() - 0.5), im: 0.2 * (random() - 0.5) };
      const { re, im } = snapshot.differentialAmps;
      const sums = emptySums({ terminalCount: 2, hasVoltage: true });
      addSnapshot(sums, { ...snapshot, differentialAmps: { re: re + noise.re, im: im + noise.im } });
      return { hour, sums };
    });
  }

  test.each([
    ['ratio', { ...before, mismatches: [{ re: 0.03, im: 0.01 }] }, 0.02],
    ['angle', { ...before, mismatches: [{ re: 0.01, im: -0.01 }] }, -0.02],
    ['charging', { ...before, susceptanceMillisiemens: 0.2 }, 0.05],
    ['leakage', { ...before, conductanceMillisiemens: 0.05 }, 0.05],
  ])('says that it was the %s', (term, after, change) => {
    const found = compositionStep(hoursOf(after), { pathChangeHours: [400.2] });
    if (found.kind !== 'step') throw new Error(found.kind);
    expect(Math.abs(found.atHour - 400)).toBeLessThan(0.5);
    expect(found.moved?.term).toBe(term);
    expect(found.moved!.change / change).toBeCloseTo(1, 1);
    expect(found.pointsToChannel).toBe(term === 'angle');
  });

  test('of ratio and angle at once, as when a transformer is replaced, is told by the greater one', () => {
    const found = compositionStep(hoursOf({ ...before, mismatches: [{ re: -0.02, im: 0.03 }] }));
    expect(found).toMatchObject({ moved: { term: 'ratio', terminal: 1 } });
  });

  test.each([
    ['the first', 0, [-0.02, -0.02]],
    ['the third', 2, [0, 0.02]],
  ] as const)('of the ratio of %s of three terminals names that terminal', (_, terminal, changes) => {
    const three = {
      ...before,
      mismatches: [
        { re: 0.01, im: 0.01 },
        { re: 0.0, im: -0.01 },
      ],
    };
    const after = {
      ...three,
      mismatches: three.mismatches.map(({ re, im }, index) => ({ re: re + changes[index]!, im })),
    };
    const hours = Array.from({ length: HOURS }, (_unused, hour) => ({
      hour,
      sums: sumsOf([dayOf(hour >= 400 ? after : three, Math.floor(hour / 24))[hour % 24]!]),
    }));
    expect(compositionStep(hours)).toMatchObject({ kind: 'step', moved: { term: 'ratio', terminal } });
  });

  test('of angle without a path change does not point to the channel', () => {
    const after = { ...before, mismatches: [{ re: 0.01, im: -0.01 }] };
    const found = compositionStep(hoursOf(after), { pathChangeHours: [300] });
    expect(found).toMatchObject({ kind: 'step', pointsToChannel: false });
  });

  test('is not seen on a settled phase, and not told from nothing', () => {
    expect(compositionStep(hoursOf(before)).kind).toBe('no step');
    expect(compositionStep([]).kind).toBe('too few hours');
  });

  test('is found on a line without voltages too', () => {
    const hours = Array.from({ length: HOURS }, (_, hour) => {
      const truth = hour >= 400 ? { ...before, mismatches: [{ re: 0.05, im: 0.01 }] } : before;
      const snapshot = dayOf(truth, Math.floor(hour / 24))[hour % 24]!;
      return { hour, sums: sumsOf([snapshot], { hasVoltage: false }) };
    });
    expect(compositionStep(hours)).toMatchObject({ kind: 'step', moved: { term: 'ratio', terminal: 1 } });
  });
});
