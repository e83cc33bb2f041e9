import { conjugateProduct, squared } from './complex';
import type { Complex } from './complex';

/**
 * What the composition of one phase is taken from: sums of conjugate products over qualified snapshots of
 *
 *     D = Y·V̄ + Σ E_k·I_k + residue,   k from the second terminal on.
 *
 * Only conjugate products of phasors of one snapshot enter, so no angle reference has to last from one snapshot
 * to the next; and sums add, so that any window is the sum of its hour rows or of its day rows.
 *
 * All numbers of a row stand in one array, in this order: version, terminals, whether V̄ is a regressor (1 or 0),
 * snapshots, snapshots left out for want of a voltage, Σ through current, Σ through current², Σ|D|², then
 * Σ conj(x)·D of every regressor x, then Σ conj(x_i)·x_j for j ≥ i row by row, each as real and imaginary part.
 * Regressors come in the order V̄ (where there is one), I_2, I_3, …  Units: A, kV and their products.
 */
export interface CompositionSums {
  readonly values: Float64Array;
}

/** What a row of sums is about; only rows of equal shape add. */
export interface SumsShape {
  /** Terminals of the line, two or more. */
  readonly terminalCount: number;
  /** Whether the mean voltage is a regressor: then snapshots without one are left out, and counted. */
  readonly hasVoltage: boolean;
}

/** One phase of a qualified snapshot, phasors against one time reference. */
export interface CompositionSnapshot {
  /** D, the sum of all terminals' currents, amperes rms primary, without any compensation. */
  readonly differentialAmps: Complex;
  /** Mean of the valid phase-to-earth voltages, kilovolts rms; `undefined` where no terminal gives one. */
  readonly voltageKv: Complex | undefined;
  /** Currents into the line of all terminals but the first, amperes rms primary, in the register's order. */
  readonly otherCurrentsAmps: readonly Complex[];
  /** Through current of this phase, amperes rms primary. */
  readonly throughAmps: number;
}

const VERSION = 1;
const AT = { version: 0, terminals: 1, voltage: 2, count: 3, voltageless: 4, through: 5, through2: 6, d2: 7 };
/** Places in a row: Σ|D|², and from where on the products of the regressors stand. */
export const SQUARES_AT = AT.d2;
export const CROSS_FROM = 8;

/** Sums of no snapshots. Throws for fewer than two terminals. */
export function emptySums({ terminalCount, hasVoltage }: SumsShape): CompositionSums {
  if (!(Number.isInteger(terminalCount) && terminalCount >= 2)) {
    throw new RangeError(`A line has two terminals or more, not ${terminalCount}.`);
  }
  const values = new Float64Array(lengthOf(terminalCount - 1 + (hasVoltage ? 1 : 0)));
  values.set([VERSION, terminalCount, hasVoltage ? 1 : 0]);
  return { values };
}

const lengthOf = (regressors: number): number => CROSS_FROM + 2 * regressors + regressors * (regressors + 1);

/** The shape of these sums. */
export function shapeOf({ values }: CompositionSums): SumsShape {
  return { terminalCount: values[AT.terminals]!, hasVoltage: values[AT.voltage] === 1 };
}

/** How many regressors these sums have: V̄ where the shape has it, and every terminal but the first. */
export function regressorCount({ values }: CompositionSums): number {
  return values[AT.terminals]! - 1 + values[AT.voltage]!;
}

/** How many snapshots were summed. */
export function snapshotCount({ values }: CompositionSums): number {
  return values[AT.count]!;
}

/** How many qualified snapshots were left out since no terminal gave a voltage. */
export function voltagelessCount({ values }: CompositionSums): number {
  return values[AT.voltageless]!;
}

/** Σ|D|², A². */
export function differentialSquares({ values }: CompositionSums): number {
  return values[AT.d2]!;
}

/**
 * Mean through current, amperes, and its standard deviation over its mean (0 for a load that never changes).
 * `undefined` for no snapshots.
 */
export function throughLoad({
  values,
}: CompositionSums): { readonly meanAmps: number; readonly variation: number } | undefined {
  const count = values[AT.count]!;
  if (count === 0) return undefined;
  const meanAmps = values[AT.through]! / count;
  const variance = Math.max(0, values[AT.through2]! / count - meanAmps * meanAmps);
  return { meanAmps, variation: meanAmps > 0 ? Math.sqrt(variance) / meanAmps : 0 };
}

/** Σ conj(x)·D of the regressor at this place. */
export function crossProduct(sums: CompositionSums, regressor: number): Complex {
  const at = CROSS_FROM + 2 * regressor;
  return { re: sums.values[at]!, im: sums.values[at + 1]! };
}

/** Σ conj(x_row)·x_column of two regressors, in either order. */
export function normalProduct(sums: CompositionSums, row: number, column: number): Complex {
  if (column < row) {
    const { re, im } = normalProduct(sums, column, row);
    return { re, im: -im };
  }
  const p = regressorCount(sums);
  const at = CROSS_FROM + 2 * p + 2 * (row * p - (row * (row - 1)) / 2 + (column - row));
  return { re: sums.values[at]!, im: sums.values[at + 1]! };
}

/** Σ|I|² of the terminal at this place, from 0, A²: the first one's current is D less all others. */
export function currentSquares(sums: CompositionSums, terminal: number): number {
  const { terminalCount, hasVoltage } = shapeOf(sums);
  if (!(Number.isInteger(terminal) && terminal >= 0 && terminal < terminalCount)) {
    throw new RangeError(`The line has ${terminalCount} terminals and none at place ${terminal}.`);
  }
  const from = hasVoltage ? 1 : 0;
  if (terminal > 0) return normalProduct(sums, from + terminal - 1, from + terminal - 1).re;
  let squares = differentialSquares(sums);
  for (let row = from; row < regressorCount(sums); row++) {
    squares -= 2 * crossProduct(sums, row).re;
    for (let column = from; column < regressorCount(sums); column++) {
      squares += normalProduct(sums, row, column).re;
    }
  }
  return Math.max(0, squares);
}

/**
 * Adds one snapshot to the sums, in place: an hour has thousands. A snapshot without the voltage that the shape
 * asks for is counted and left out. Throws for a snapshot of another number of terminals and for values that
 * are not finite.
 */
export function addSnapshot(sums: CompositionSums, snapshot: CompositionSnapshot): void {
  const { values } = sums;
  const { differentialAmps: d, voltageKv, otherCurrentsAmps, throughAmps } = snapshot;
  const { terminalCount, hasVoltage } = shapeOf(sums);
  if (otherCurrentsAmps.length !== terminalCount - 1) {
    throw new RangeError('A snapshot is summed with the currents of all terminals but the first.');
  }
  if (hasVoltage && voltageKv === undefined) {
    values[AT.voltageless]! += 1;
    return;
  }
  const regressors =
    hasVoltage && voltageKv !== undefined ? [voltageKv, ...otherCurrentsAmps] : otherCurrentsAmps;
  if (![throughAmps, squared(d), ...regressors.map(squared)].every(Number.isFinite)) {
    throw new RangeError('A snapshot with a value that is not a finite number can’t be summed.');
  }
  values[AT.count]! += 1;
  values[AT.through]! += throughAmps;
  values[AT.through2]! += throughAmps * throughAmps;
  values[AT.d2]! += squared(d);
  addProducts(values, d, regressors);
}

function addProducts(values: Float64Array, d: Complex, regressors: readonly Complex[]): void {
  let at = CROSS_FROM;
  const add = (product: Complex): void => {
    values[at++]! += product.re;
    values[at++]! += product.im;
  };
  for (const x of regressors) add(conjugateProduct(x, d));
  for (let i = 0; i < regressors.length; i++) {
    for (let j = i; j < regressors.length; j++) add(conjugateProduct(regressors[i]!, regressors[j]!));
  }
}

/** The sums of two windows that have no snapshot in common. Throws for different shapes. */
export function addSums(a: CompositionSums, b: CompositionSums): CompositionSums {
  return combined(a, b, 1);
}

/** The sums of a window less those of a part of it. Throws for different shapes. */
export function subtractSums(whole: CompositionSums, part: CompositionSums): CompositionSums {
  return combined(whole, part, -1);
}

function combined(a: CompositionSums, b: CompositionSums, sign: 1 | -1): CompositionSums {
  assertSameShape(a.values, b.values);
  const values = a.values.slice();
  for (let at = AT.count; at < values.length; at++) values[at]! += sign * b.values[at]!;
  return { values };
}

function assertSameShape(a: Float64Array, b: Float64Array): void {
  if (a[AT.terminals] !== b[AT.terminals] || a[AT.voltage] !== b[AT.voltage]) {
    throw new RangeError('Sums of lines with different regressors do not add.');
  }
}

/** The sum over all rows; `undefined` for none. Throws for rows of different shapes. */
export function totalOf(rows: readonly CompositionSums[]): CompositionSums | undefined {
  const [first, ...others] = rows;
  if (first === undefined) return undefined;
  const values = first.values.slice();
  for (const { values: row } of others) {
    assertSameShape(values, row);
    for (let at = AT.count; at < values.length; at++) values[at]! += row[at]!;
  }
  return { values };
}

/** The sums as plain numbers, in the order that `CompositionSums` gives. */
export function packedSums({ values }: CompositionSums): number[] {
  return Array.from(values);
}

/** Sums from plain numbers; `undefined` for what `packedSums` of this version can't have made. */
export function sumsFromPacked(numbers: ArrayLike<number>): CompositionSums | undefined {
  const values = Float64Array.from(numbers);
  const terminals = values[AT.terminals] ?? 0;
  const voltage = values[AT.voltage];
  const isOurs =
    values[AT.version] === VERSION &&
    Number.isInteger(terminals) &&
    terminals >= 2 &&
    (voltage === 0 || voltage === 1) &&
    values.length === lengthOf(terminals - 1 + voltage) &&
    values.every(Number.isFinite);
  return isOurs ? { values } : undefined;
}
