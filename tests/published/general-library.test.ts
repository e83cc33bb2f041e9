import { add, complex, conj, matrix, multiply as product, subtract as difference } from 'mathjs';
import type { Complex, Matrix } from 'mathjs';
import { describe, expect, test } from 'vitest';
import { generalisedEquivalent } from '../../src/protection/generalised-equivalent';
import { PHASES } from '../../src/protection/phase';
import type { PerPhase } from '../../src/protection/phase';
import {
  angleRad,
  conjugate,
  magnitude,
  multiply,
  phasor,
  phasorFromPolar,
  rotate,
  scale,
  subtract,
  sum,
} from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { symmetricalComponents } from '../../src/protection/sequence';
import { throughMatrix, windingMatrix } from '../../src/protection/winding-compensation';
import { seededRandom } from '../protection/seeded-random';

/** A general-purpose library, mathjs, as reference: the same operations on a thousand seeded cases each. */
const CASES = 1000;

const random = seededRandom(1869);
const amount = () => 4000 * random() - 2000;
const randomPhasor = (): Phasor => phasor(amount(), amount());
const theirs = ({ re, im }: Phasor): Complex => complex(re, im);

const pairs = Array.from({ length: CASES }, () => ({
  p: randomPhasor(),
  q: randomPhasor(),
  turn: 7 * random() - 3.5,
}));
const threes = Array.from({ length: CASES }, (_, index) => ({
  currents: { a: randomPhasor(), b: randomPhasor(), c: randomPhasor() },
  winding: {
    ratio: 0.2 + 4 * random(),
    clockNumber: index % 12,
    zeroSequence: index % 24 < 12 ? ('removed' as const) : ('kept' as const),
  },
}));

/** Both in amperes of up to some thousands: equal to a billionth of them. */
function expectSame(actual: Phasor, expected: Complex, size = 1): void {
  expect(Math.abs(actual.re - expected.re) / size).toBeLessThan(1e-6);
  expect(Math.abs(actual.im - expected.im) / size).toBeLessThan(1e-6);
}

describe('phasor algebra', () => {
  test('sums, differences and conjugates are those of the library', () => {
    for (const { p, q } of pairs) {
      expectSame(sum([p, q]), add(theirs(p), theirs(q)) as Complex);
      expectSame(subtract(p, q), difference(theirs(p), theirs(q)) as Complex);
      expectSame(conjugate(p), conj(theirs(p)));
    }
  });

  test('products, turns and scaled phasors are those of the library', () => {
    for (const { p, q, turn } of pairs) {
      expectSame(multiply(p, q), product(theirs(p), theirs(q)) as Complex, 1e3);
      expectSame(rotate(p, turn), product(theirs(p), complex({ r: 1, phi: turn })) as Complex);
      expectSame(scale(p, turn), product(theirs(p), turn) as Complex);
    }
  });

  test('magnitudes and angles are those of the library, there and back', () => {
    for (const { p } of pairs) {
      const polar = theirs(p).toPolar();
      expect(magnitude(p)).toBeCloseTo(polar.r, 8);
      expect(angleRad(p)).toBeCloseTo(polar.phi, 12);
      expectSame(phasorFromPolar(polar.r, polar.phi), complex(polar));
    }
  });
});

const ADVANCE = complex({ r: 1, phi: (2 * Math.PI) / 3 });
const DELAY = conj(ADVANCE);
/** Phases from sequences (zero, positive, negative). */
const FROM_SEQUENCES = matrix<number | Complex>([
  [1, 1, 1],
  [1, DELAY, ADVANCE],
  [1, ADVANCE, DELAY],
]);
const TO_SEQUENCES = product(
  1 / 3,
  matrix<number | Complex>([
    [1, 1, 1],
    [1, ADVANCE, DELAY],
    [1, DELAY, ADVANCE],
  ]),
) as Matrix;

const column = (currents: PerPhase<Phasor>): Matrix =>
  matrix(PHASES.map((phase) => theirs(currents[phase]))) as unknown as Matrix;
const entries = (result: Matrix): Complex[] => result.toArray() as unknown as Complex[];

describe('matrices', () => {
  test('symmetrical components are those of the library’s matrix product', () => {
    for (const { currents } of threes) {
      const [zero, positive, negative] = entries(product(TO_SEQUENCES, column(currents)));
      const found = symmetricalComponents(currents);
      expectSame(found.zero, zero!);
      expectSame(found.positive, positive!);
      expectSame(found.negative, negative!);
    }
  });

  test('a winding is what turning its sequences by the clock number makes of it', () => {
    for (const { currents, winding } of threes) {
      const angle = (winding.clockNumber * Math.PI) / 6;
      // An odd clock number has nothing to keep; an even one passes zero sequence on with the windings' sign.
      const zero = winding.zeroSequence === 'kept' ? Math.round(Math.cos(3 * angle)) : 0;
      const turned = matrix<number | Complex>([
        [zero, 0, 0],
        [0, complex({ r: 1, phi: angle }), 0],
        [0, 0, complex({ r: 1, phi: -angle })],
      ]);
      const whole = product(product(FROM_SEQUENCES, turned), TO_SEQUENCES);
      const expected = entries(product(product(1 / winding.ratio, whole), column(currents)) as Matrix);
      const found = throughMatrix(windingMatrix(winding), currents);
      PHASES.forEach((phase, index) => expectSame(found[phase], expected[index]!));
    }
  });
});

describe('generalised two-terminal equivalent', () => {
  test('has the sum and the sum of magnitudes of all terminals, as the library adds them up', () => {
    for (let index = 0; index < CASES; index++) {
      const currents = Array.from({ length: 3 + (index % 4) }, randomPhasor);
      const { local, remote } = generalisedEquivalent(currents);
      const total = currents.map(theirs).reduce((one, other) => add(one, other) as Complex);
      expectSame(sum([local, remote]), total, 10);
      const magnitudes = currents.reduce((soFar, current) => soFar + theirs(current).toPolar().r, 0);
      expect((magnitude(local) + magnitude(remote)) / magnitudes).toBeCloseTo(1, 9);
    }
  });
});
