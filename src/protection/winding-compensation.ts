/**
 * Bringing the currents measured behind a transformer in the zone to the line's side, by ratio and clock number
 * (IEC 60076-1).
 *
 * With clock number n the far winding's positive sequence lags the line side by n·30° and its negative sequence
 * leads by as much. Three phase currents are brought back by one real matrix: it advances the positive sequence
 * by n·30°, delays the negative by n·30°, and divides by the ratio. What it does with the zero sequence is a
 * setting of each winding. Removed is right wherever the transformer does not pass zero sequence on, at both of
 * its sides, or an earth fault outside the zone shows as a differential current. Kept is right where it passes
 * through unhindered, as in a star-star transformer earthed at both sides: then it comes back with the sign
 * that the windings give it, + for clock numbers 0, 4, 8 and − for 2, 6, 10. An odd clock number has a winding in
 * delta or zigzag, which no zero sequence passes: nothing can be kept there.
 */
import type { PerPhase } from './phase';
import type { Phasor } from './phasor';
import type { SettingProblem } from './setting-problem';

/** How one terminal's currents are brought to the line's side. */
export interface WindingCompensation {
  /** rated voltage of the line side over that of this winding, as a ratio; 1 on the line itself */
  readonly ratio: number;
  /** whole number from 0 to 11: by how many times 30° this winding lags the line side */
  readonly clockNumber: number;
  readonly zeroSequence: 'kept' | 'removed';
}

type Row = readonly [number, number, number];
/** A real matrix on the currents of phases a, b, c. */
export type PhaseMatrix = readonly [Row, Row, Row];

const CLOCK_NUMBERS = 12;
const HALF_ROOT_3 = Math.sqrt(3) / 2;
/** cos(n·30°), exact where it is 0, ½ or 1, so that a matrix of whole numbers comes out as one */
const CLOCK_COSINES = [
  1,
  HALF_ROOT_3,
  0.5,
  0,
  -0.5,
  -HALF_ROOT_3,
  -1,
  -HALF_ROOT_3,
  -0.5,
  0,
  0.5,
  HALF_ROOT_3,
];

/**
 * The matrix that brings a winding's three phase currents to the line's side. Throws for a clock number that is
 * not a whole number from 0 to 11.
 */
export function windingMatrix({ ratio, clockNumber, zeroSequence }: WindingCompensation): PhaseMatrix {
  if (!isClockNumber(clockNumber)) throw new RangeError(`There is no clock number ${clockNumber}.`);
  const zero = zeroSequence === 'kept' ? zeroSequenceSign(clockNumber) : 0;
  // A matrix whose rows repeat turned by one phase has the three sequences as eigenvectors; from its first row
  // (m₀, m₁, m₂) follow the eigenvalues zero, 1∠θ and 1∠−θ, and from those, the other way round, this row.
  const entry = (turnedBy: number) => (zero + 2 * clockCosine(clockNumber + turnedBy)) / (3 * ratio);
  const [own, next, last] = [entry(0), entry(4), entry(-4)];
  return [
    [own, next, last],
    [last, own, next],
    [next, last, own],
  ];
}

/** Three phase currents taken through a matrix, in their own unit. */
export function throughMatrix([rowA, rowB, rowC]: PhaseMatrix, currents: PerPhase<Phasor>): PerPhase<Phasor> {
  return { a: rowTimes(rowA, currents), b: rowTimes(rowB, currents), c: rowTimes(rowC, currents) };
}

/** Whether a terminal's winding is the line itself, so that its voltage is the line's and its current as measured. */
export function isOnLineSide({ ratio, clockNumber }: WindingCompensation): boolean {
  return ratio === 1 && clockNumber === 0;
}

/** Everything that is wrong with one winding's compensation, at once; empty when it can be applied. */
export function windingProblems({ ratio, clockNumber }: WindingCompensation): readonly SettingProblem[] {
  const problems: SettingProblem[] = [];
  if (!(ratio > 0 && ratio < Infinity)) {
    problems.push({ field: 'ratio', problem: 'The ratio must be a number above 0.' });
  }
  if (!isClockNumber(clockNumber)) {
    problems.push({ field: 'clockNumber', problem: 'The clock number must be a whole number from 0 to 11.' });
  }
  return problems;
}

function zeroSequenceSign(clockNumber: number): number {
  if (clockNumber % 2 === 1) return 0;
  return clockNumber % 4 === 0 ? 1 : -1;
}

function clockCosine(clockNumber: number): number {
  return CLOCK_COSINES[(clockNumber + CLOCK_NUMBERS) % CLOCK_NUMBERS]!;
}

function isClockNumber(value: number): boolean {
  return Number.isInteger(value) && value >= 0 && value < CLOCK_NUMBERS;
}

function rowTimes([first, second, third]: Row, { a, b, c }: PerPhase<Phasor>): Phasor {
  return {
    re: first * a.re + second * b.re + third * c.re,
    im: first * a.im + second * b.im + third * c.im,
  };
}
