import { describe, expect, test } from 'vitest';
import { type Complex, complex, eachPhase, polar, type Three } from '../../simulator/plant/complex';
import { farSide } from '../../simulator/plant/transformer';
import { PHASES } from '../../src/protection/phase';
import type { PerPhase } from '../../src/protection/phase';
import { magnitude, phasor, rotate, subtract, sum } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { symmetricalComponents } from '../../src/protection/sequence';
import {
  isOnLineSide,
  throughMatrix,
  windingMatrix,
  windingProblems,
} from '../../src/protection/winding-compensation';
import type { WindingCompensation } from '../../src/protection/winding-compensation';
import { seededRandom } from './seeded-random';

const CLOCK_NUMBERS = Array.from({ length: 12 }, (_, index) => index);
const byPhase = ([a, b, c]: Three<Complex>): PerPhase<Phasor> => ({ a, b, c });
const random = seededRandom(60_076);
const randomPhasor = () => polar(900 * random(), 6.3 * random());

/** What leaves by the far winding when these currents enter the transformer, by the plant's own arithmetic. */
function farAmps(
  line: Three<Complex>,
  transformer: { ratio: number; clockNumber: number },
): PerPhase<Phasor> {
  const flows = eachPhase((phase) => ({ amps: line[phase], volts: complex(0, 0) }));
  return byPhase(eachPhase((phase) => farSide(flows, transformer)[phase].amps));
}

const compensated = (winding: WindingCompensation, currents: PerPhase<Phasor>) =>
  throughMatrix(windingMatrix(winding), currents);

function differentials(line: PerPhase<Phasor>, far: PerPhase<Phasor>): number[] {
  return PHASES.map((phase) => magnitude(subtract(line[phase], far[phase])));
}

// The law of IEC 60076-1: a clock number n has the far winding lag by n times 30°. The plant's transformer is built
// from that definition and from symmetrical components; nothing of it is the product's.
describe.each(CLOCK_NUMBERS)('clock number %d', (clockNumber) => {
  const ratio = 220 / 110;

  test.each(['kept', 'removed'] as const)(
    'a balanced through load leaves no differential, zero sequence %s',
    (zeroSequence) => {
      const load = eachPhase((phase) => polar(431, 0.6 - (phase * 2 * Math.PI) / 3));
      const far = compensated({ ratio, clockNumber, zeroSequence }, farAmps(load, { ratio, clockNumber }));
      for (const left of differentials(byPhase(load), far)) expect(left).toBeLessThan(1e-9);
    },
  );

  test('an unbalanced through load leaves none either once zero sequence is removed at both sides', () => {
    for (let index = 0; index < 50; index++) {
      const load = eachPhase(randomPhasor);
      const line = compensated({ ratio: 1, clockNumber: 0, zeroSequence: 'removed' }, byPhase(load));
      const far = compensated(
        { ratio, clockNumber, zeroSequence: 'removed' },
        farAmps(load, { ratio, clockNumber }),
      );
      for (const left of differentials(line, far)) expect(left).toBeLessThan(1e-9);
    }
  });

  test('zero sequence that ends in the star point shows in full unless it is removed at the line side', () => {
    const load = eachPhase(() => complex(300, 0));
    const far = compensated(
      { ratio, clockNumber, zeroSequence: 'removed' },
      farAmps(load, { ratio, clockNumber }),
    );
    const kept = compensated({ ratio: 1, clockNumber: 0, zeroSequence: 'kept' }, byPhase(load));
    const removed = compensated({ ratio: 1, clockNumber: 0, zeroSequence: 'removed' }, byPhase(load));
    for (const left of differentials(kept, far)) expect(left).toBeCloseTo(300, 9);
    for (const left of differentials(removed, far)) expect(left).toBeLessThan(1e-9);
  });

  test('removal takes the zero sequence out and leaves the others their size', () => {
    const before = symmetricalComponents(byPhase(eachPhase(randomPhasor)));
    const asPhases = {
      a: sum([before.zero, before.positive, before.negative]),
      b: sum([before.zero, rotate(before.positive, -THIRD), rotate(before.negative, THIRD)]),
      c: sum([before.zero, rotate(before.positive, THIRD), rotate(before.negative, -THIRD)]),
    };
    const after = symmetricalComponents(
      compensated({ ratio: 1, clockNumber, zeroSequence: 'removed' }, asPhases),
    );
    const shift = (clockNumber * Math.PI) / 6;
    expect(magnitude(after.zero)).toBeLessThan(1e-9);
    expect(magnitude(subtract(after.positive, rotate(before.positive, shift)))).toBeLessThan(1e-9);
    expect(magnitude(subtract(after.negative, rotate(before.negative, -shift)))).toBeLessThan(1e-9);
  });
});

const THIRD = (2 * Math.PI) / 3;
const R = 1 / Math.sqrt(3);

// Written out by hand from the connections: what each phase of the line side is made of on the far side.
describe('winding matrix', () => {
  test.each([
    { clockNumber: 0, zeroSequence: 'kept', firstRow: [1, 0, 0] },
    { clockNumber: 1, zeroSequence: 'removed', firstRow: [R, -R, 0] },
    { clockNumber: 2, zeroSequence: 'kept', firstRow: [0, -1, 0] },
    { clockNumber: 4, zeroSequence: 'kept', firstRow: [0, 0, 1] },
    { clockNumber: 5, zeroSequence: 'removed', firstRow: [-R, 0, R] },
    { clockNumber: 6, zeroSequence: 'kept', firstRow: [-1, 0, 0] },
    { clockNumber: 8, zeroSequence: 'kept', firstRow: [0, 1, 0] },
    { clockNumber: 10, zeroSequence: 'kept', firstRow: [0, 0, -1] },
    { clockNumber: 11, zeroSequence: 'removed', firstRow: [R, 0, -R] },
    { clockNumber: 0, zeroSequence: 'removed', firstRow: [2 / 3, -1 / 3, -1 / 3] },
  ] as const)('of clock number $clockNumber, zero sequence $zeroSequence', (row) => {
    const [first, second, third] = windingMatrix({ ratio: 1, ...row });
    row.firstRow.forEach((entry, index) => expect(first[index]).toBeCloseTo(entry, 12));
    // Each next phase is the one before, turned round by one place.
    expect(second).toEqual([first[2], first[0], first[1]]);
    expect(third).toEqual([first[1], first[2], first[0]]);
  });

  test('divides by the ratio', () => {
    expect(windingMatrix({ ratio: 4, clockNumber: 0, zeroSequence: 'kept' })).toEqual([
      [0.25, 0, 0],
      [0, 0.25, 0],
      [0, 0, 0.25],
    ]);
  });

  test.each([12, -5, 1.5, NaN])('is refused for clock number %d', (clockNumber) => {
    expect(() => windingMatrix({ ratio: 1, clockNumber, zeroSequence: 'removed' })).toThrow(RangeError);
  });

  test('keeps nothing of the zero sequence at an odd clock number', () => {
    const kept = windingMatrix({ ratio: 2, clockNumber: 7, zeroSequence: 'kept' });
    expect(kept).toEqual(windingMatrix({ ratio: 2, clockNumber: 7, zeroSequence: 'removed' }));
  });
});

describe('winding', () => {
  test('is the line itself at ratio 1 and clock number 0', () => {
    expect(isOnLineSide({ ratio: 1, clockNumber: 0, zeroSequence: 'removed' })).toBe(true);
    expect(isOnLineSide({ ratio: 2, clockNumber: 0, zeroSequence: 'removed' })).toBe(false);
    expect(isOnLineSide({ ratio: 1, clockNumber: 6, zeroSequence: 'removed' })).toBe(false);
  });

  test('problems come all at once', () => {
    const fields = (ratio: number, clockNumber: number) =>
      windingProblems({ ratio, clockNumber, zeroSequence: 'kept' }).map(({ field }) => field);
    expect(fields(2, 11)).toEqual([]);
    expect(fields(0, 12)).toEqual(['ratio', 'clockNumber']);
    expect(fields(NaN, 0.5)).toEqual(['ratio', 'clockNumber']);
    expect(fields(1, -1)).toEqual(['clockNumber']);
  });

  test('brings a phase without current to the mean of what the others carry', () => {
    const found = compensated(
      { ratio: 1, clockNumber: 0, zeroSequence: 'removed' },
      { a: phasor(0, 0), b: phasor(300, 0), c: phasor(0, 0) },
    );
    expect(found.a.re).toBeCloseTo(-100, 9);
  });
});
