import { describe, expect, test } from 'vitest';
import { magnitude, phasor, rotate, subtract, sum } from '../../src/protection/phasor';
import { symmetricalComponents } from '../../src/protection/sequence';

const THIRD_RAD = (2 * Math.PI) / 3;

describe('symmetrical components', () => {
  const a = phasor(400, 30);

  test('of a balanced system that rotates a, b, c are positive sequence alone', () => {
    const found = symmetricalComponents({ a, b: rotate(a, -THIRD_RAD), c: rotate(a, THIRD_RAD) });
    expect(magnitude(found.zero)).toBeCloseTo(0, 10);
    expect(magnitude(subtract(found.positive, a))).toBeCloseTo(0, 10);
    expect(magnitude(found.negative)).toBeCloseTo(0, 10);
  });

  test('of two swapped phases are negative sequence alone', () => {
    const found = symmetricalComponents({ a, b: rotate(a, THIRD_RAD), c: rotate(a, -THIRD_RAD) });
    expect(magnitude(found.positive)).toBeCloseTo(0, 10);
    expect(magnitude(subtract(found.negative, a))).toBeCloseTo(0, 10);
  });

  test('of three equal phasors are zero sequence alone', () => {
    const found = symmetricalComponents({ a, b: a, c: a });
    expect(magnitude(subtract(found.zero, a))).toBeCloseTo(0, 10);
    expect(magnitude(found.positive)).toBeCloseTo(0, 10);
  });

  test('add up to phase a', () => {
    const found = symmetricalComponents({ a, b: phasor(-12, 7), c: phasor(3, -250) });
    const total = sum([found.zero, found.positive, found.negative]);
    expect(magnitude(subtract(total, a))).toBeCloseTo(0, 10);
  });
});
