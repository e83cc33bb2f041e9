import { describe, expect, test } from 'vitest';
import { perPhase } from '../../src/protection/phase';
import type { PerPhase } from '../../src/protection/phase';
import { phasor, phasorFromPolar, scale } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { sequenceDifferentials } from '../../src/protection/sequence-differential';
import { adaptiveScheme, ALPHA_PLANE, TWO_SLOPE } from './schemes';

const FIFTY = { frequencyHz: 50 };
const DEGREES = { a: 0, b: -120, c: 120 };
const load = perPhase((phase) => phasorFromPolar(600, (DEGREES[phase] * Math.PI) / 180));
const leaving = perPhase((phase) => scale(load[phase], -1));
const with30More = (currents: PerPhase<Phasor>) => ({
  ...currents,
  a: phasor(currents.a.re + 30, currents.a.im),
});

describe('sequence differential', () => {
  test('of a balanced through load is none, and restrains in the positive sequence alone', () => {
    const found = sequenceDifferentials(TWO_SLOPE, [load, leaving], FIFTY);
    for (const sequence of [found.zero, found.positive, found.negative]) {
      expect(sequence.differentialAmps).toBeCloseTo(0, 9);
    }
    expect(found.positive.restraintAmps).toBeCloseTo(600, 9);
    expect(found.zero.restraintAmps).toBeCloseTo(0, 9);
    expect(found.negative.restraintAmps).toBeCloseTo(0, 9);
  });

  test('of a differential in one phase is a third of it in each sequence', () => {
    const found = sequenceDifferentials(TWO_SLOPE, [with30More(load), leaving], FIFTY);
    for (const sequence of [found.zero, found.positive, found.negative]) {
      expect(sequence.differentialAmps).toBeCloseTo(10, 9);
      expect(sequence.differential.re).toBeCloseTo(10, 9);
    }
    expect(found.zero.restraintAmps).toBeCloseTo(5, 9);
    expect(found.positive.restraintAmps).toBeCloseTo(605, 9);
  });

  test('is restrained by the scheme’s own convention, or not at all', () => {
    const adaptive = sequenceDifferentials(adaptiveScheme(2), [load, leaving], FIFTY);
    expect(adaptive.zero.restraintAmps).toBeCloseTo(120, 9);
    expect(adaptive.positive.restraintAmps).toBeGreaterThan(120);
    expect(sequenceDifferentials(ALPHA_PLANE, [load, leaving], FIFTY).zero.restraintAmps).toBeUndefined();
  });

  test('of no terminal is refused', () => {
    expect(() => sequenceDifferentials(TWO_SLOPE, [], FIFTY)).toThrow(RangeError);
  });
});
