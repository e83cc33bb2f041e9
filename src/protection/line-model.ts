/**
 * What a line's currents would be at a through current that it does not carry now.
 *
 * The model is that of the composition of a standing level, D = Y·V̄ + Σ E_k·I_k over terminals 2 to n: Y the
 * admittance on the mean voltage, E_k the mismatch of terminal k against terminal 1 as it acts on measured
 * currents. The through current T lags the voltage by φ; it enters at terminal 1 and leaves by the others in
 * stated shares, and each terminal supplies its share of the charging:
 *   I_k = Y·V̄/n − s_k·T∠−φ for k ≥ 2,   I_1 = Y·V̄/n + T∠−φ + Σ E_k·I_k.
 * Their sum is D. Whatever does not follow voltage or load is not in the model.
 */
import type { CtClass } from './ct-class';
import { LIMIT_SIGNS, opposite, transformerAtLimit } from './ct-class';
import { multiply, phasor, phasorFromPolar, quotient, scale, subtract, sum } from './phasor';
import type { Phasor } from './phasor';

/** One phase of a line as it answers to voltage and load. */
export interface LineModel {
  /** mean voltage to earth, kilovolts rms, taken as the reference of angles */
  readonly phaseVoltageKv: number;
  /** admittance on the mean voltage that the scheme is left with after any compensation, millisiemens */
  readonly admittanceMillisiemens: Phasor;
  /**
   * Mismatches E_k of terminals 2 to n: one set where they are measured, several where they are bounds. A
   * prediction takes the worst set.
   */
  readonly mismatchSets: readonly (readonly Phasor[])[];
  /** shares of the through current that leave by terminals 2 to n, adding up to 1 */
  readonly shares: readonly number[];
  readonly basis: 'measured' | 'class limits';
}

/** What a model of a line starts from, measured or not. */
export interface LineUnderLoad {
  readonly terminalCount: number;
  /** nominal voltage, kilovolts rms phase to phase */
  readonly voltageKv: number;
  /** ωC′l that the scheme takes out by compensation, millisiemens; 0 where it does not */
  readonly compensatedMillisiemens: number;
  /** undefined for equal shares */
  readonly shares?: readonly number[] | undefined;
}

/** The model from a composition: measured admittance, millisiemens, and measured mismatches E_k of terminals 2 to n. */
export function measuredModel(
  line: LineUnderLoad,
  {
    admittanceMillisiemens,
    mismatches,
  }: { readonly admittanceMillisiemens: Phasor; readonly mismatches: readonly Phasor[] },
): LineModel {
  return model(line, { admittanceMillisiemens, mismatchSets: [mismatches], basis: 'measured' });
}

/**
 * The model where no mismatch is measured: charging by the line constants, and the transformers of terminal 1
 * against all others at opposite limits of their classes, at each of the four corners.
 */
export function classLimitModel(
  line: LineUnderLoad,
  {
    susceptanceMillisiemens,
    classes,
  }: { readonly susceptanceMillisiemens: number; readonly classes: readonly CtClass[] },
): LineModel {
  const [first, ...others] = classes;
  if (first === undefined) throw new RangeError('A line has a class of transformer at each terminal.');
  const mismatchSets = LIMIT_SIGNS.map((signs) => {
    const seen = transformerAtLimit(first, signs);
    return others.map((other) => mismatch(seen, transformerAtLimit(other, opposite(signs))));
  });
  const admittanceMillisiemens = phasor(0, susceptanceMillisiemens);
  return model(line, { admittanceMillisiemens, mismatchSets, basis: 'class limits' });
}

/** A through current: amperes rms primary, and by how much it lags the voltage, radians; half a turn reverses it. */
export interface ThroughCurrent {
  readonly throughAmps: number;
  readonly lagRad: number;
}

/** The currents of all terminals, amperes rms primary into the line, with one of the model's sets of mismatches. */
export function predictedCurrents(
  model: LineModel,
  mismatches: readonly Phasor[],
  { throughAmps, lagRad }: ThroughCurrent,
): Phasor[] {
  const through = phasorFromPolar(throughAmps, -lagRad);
  const charging = scale(model.admittanceMillisiemens, model.phaseVoltageKv / (model.shares.length + 1));
  const others = model.shares.map((share) => subtract(charging, scale(through, share)));
  const mismatched = others.map((current, index) => multiply(mismatches[index] ?? ZERO, current));
  return [sum([charging, through, ...mismatched]), ...others];
}

/**
 * E_k, as a mismatch acts on the terminal's measured current, of e_k, by which the terminal measures more (real part,
 * per unit) and leads (imaginary part, radians) against terminal 1: E = e/(1 + e), since what it measures is 1 + e of
 * what terminal 1 would. Not finite for e = −1, a terminal that measures nothing.
 */
export function actingMismatch(mismatchAgainstFirst: Phasor): Phasor {
  return quotient(mismatchAgainstFirst, sum([ONE, mismatchAgainstFirst]));
}

const ZERO = phasor(0, 0);
const ONE = phasor(1, 0);

function model(
  { terminalCount, voltageKv, compensatedMillisiemens, shares }: LineUnderLoad,
  { admittanceMillisiemens, ...rest }: Pick<LineModel, 'admittanceMillisiemens' | 'mismatchSets' | 'basis'>,
): LineModel {
  const otherCount = terminalCount - 1;
  const lengths = [...rest.mismatchSets, ...(shares === undefined ? [] : [shares])].map((set) => set.length);
  if (otherCount < 1 || lengths.some((length) => length !== otherCount)) {
    throw new RangeError(
      `A line of ${terminalCount} terminals has a mismatch and a share for each but the first.`,
    );
  }
  return {
    ...rest,
    phaseVoltageKv: voltageKv / Math.sqrt(3),
    admittanceMillisiemens: subtract(admittanceMillisiemens, phasor(0, compensatedMillisiemens)),
    shares: shares ?? Array.from({ length: otherCount }, () => 1 / otherCount),
  };
}

/** E of a terminal that makes `other` of 1∠0 against a first one that makes `first` of it. */
function mismatch(first: Phasor, other: Phasor): Phasor {
  return actingMismatch(subtract(quotient(other, first), ONE));
}
