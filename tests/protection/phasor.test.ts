import { describe, expect, test } from 'vitest';
import {
  angleRad,
  conjugate,
  magnitude,
  multiply,
  phasor,
  phasorFromPolar,
  quotient,
  rotate,
  scale,
  subtract,
  sum,
} from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';

function expectPhasor(actual: Phasor, expected: Phasor): void {
  expect(actual.re).toBeCloseTo(expected.re, 10);
  expect(actual.im).toBeCloseTo(expected.im, 10);
}

describe('phasor', () => {
  const p = phasor(3, 4);
  const q = phasorFromPolar(2, -1.25);

  test('a phasor from polar form has that magnitude and angle', () => {
    expect(magnitude(q)).toBeCloseTo(2, 12);
    expect(angleRad(q)).toBeCloseTo(-1.25, 12);
  });

  test('the magnitude of 3 + j4 is 5', () => {
    expect(magnitude(p)).toBe(5);
  });

  test('the sum of none is zero, and the sum of one is that one', () => {
    expect(sum([])).toEqual({ re: 0, im: 0 });
    expect(sum([p])).toEqual(p);
  });

  test('subtracting what was added gives back the first', () => {
    expectPhasor(subtract(sum([p, q]), q), p);
  });

  test('a product multiplies magnitudes and adds angles', () => {
    expect(magnitude(multiply(p, q))).toBeCloseTo(10, 10);
    expect(angleRad(multiply(p, q))).toBeCloseTo(angleRad(p) - 1.25, 10);
  });

  test('a phasor times its conjugate is its squared magnitude', () => {
    expectPhasor(multiply(p, conjugate(p)), phasor(25, 0));
  });

  test('a quotient undoes a product, and is not finite over the zero phasor', () => {
    expectPhasor(quotient(multiply(p, q), q), p);
    expect(magnitude(quotient(p, phasor(0, 0)))).toBeNaN();
  });

  test('scaling by a negative factor turns it round', () => {
    expectPhasor(scale(p, -2), rotate(scale(p, 2), Math.PI));
  });

  test('rotating leaves the magnitude and advances the angle', () => {
    expect(magnitude(rotate(q, 0.5))).toBeCloseTo(2, 12);
    expect(angleRad(rotate(q, 0.5))).toBeCloseTo(-0.75, 12);
  });
});
