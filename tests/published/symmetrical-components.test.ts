import { describe, test } from 'vitest';
import { phasor, phasorFromPolar } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { symmetricalComponents } from '../../src/protection/sequence';
import { expectFigure, printed } from './tolerance';

function expectPhasor(actual: Phasor, re: string, im: string): void {
  expectFigure(actual.re, printed(re));
  expectFigure(actual.im, printed(im));
}

describe('J. B. Gupta, A Course in Power Systems, example 3.3.1', () => {
  const found = symmetricalComponents({ a: phasor(12, 24), b: phasor(16, -2), c: phasor(-4, -6) });

  test('zero sequence is 8 + j5.3333', () => expectPhasor(found.zero, '8.0000', '5.3333'));
  test('positive sequence is 0.8453 + j15.1068', () => expectPhasor(found.positive, '0.8453', '15.1068'));
  test('negative sequence is 3.1547 + j3.5598', () => expectPhasor(found.negative, '3.1547', '3.5598'));
});

describe('Grainger and Stevenson, Power System Analysis, example 11.1', () => {
  const found = symmetricalComponents({ a: phasor(10, 0), b: phasor(-10, 0), c: phasor(0, 0) });
  const expected = (magnitude: number, degrees: number) =>
    phasorFromPolar(magnitude, (degrees * Math.PI) / 180);

  test.each([
    { name: 'zero', value: expected(0, 0) },
    { name: 'positive', value: expected(5.7735, -30) },
    { name: 'negative', value: expected(5.7735, 30) },
  ] as const)('the $name sequence of a line with phase c open is as printed', ({ name, value }) => {
    expectFigure(found[name].re, { value: value.re, tolerance: 0.00005 });
    expectFigure(found[name].im, { value: value.im, tolerance: 0.00005 });
  });
});
