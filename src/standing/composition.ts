import { minus, quotient, scaled } from './complex';
import type { Complex } from './complex';
import { compositionFit, fittedCoefficients } from './composition-fit';
import type { CompositionFit } from './composition-fit';
import {
  addSums,
  crossProduct,
  normalProduct,
  shapeOf,
  snapshotCount,
  subtractSums,
  totalOf,
} from './composition-sums';
import type { CompositionSums } from './composition-sums';
import { obstacleOfFit, obstacleOfWindow } from './separability';
import type { NotSeparableReason } from './separability';
import { studentTwoSided } from './student-t';

/** A value with its 95 % interval, in the unit that its name gives. */
export interface Estimate {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

/** The mismatch e_k of one terminal's measured current against that of the first. */
export interface TerminalMismatch {
  /** Place of the terminal in the register's order, from 0; never 0 itself. */
  readonly terminal: number;
  /** Re e, per unit of the current: above 0 where this terminal measures more. */
  readonly ratio: Estimate;
  /** Im e, radians: above 0 where this terminal's phasor leads. */
  readonly angleRad: Estimate;
  /** Im e/ω, milliseconds: the channel time error that would look the same. */
  readonly timeErrorMs: Estimate;
  /** 2·Im e/ω, milliseconds: send less receive delay that would look the same. */
  readonly asymmetryMs: Estimate;
}

/** The causes of a standing differential, told apart over a window. */
export interface SeparatedComposition extends CompositionFit {
  readonly kind: 'separated';
  /** Days with qualified snapshots. */
  readonly days: number;
  /** Im Y, siemens/1000: charging. `undefined` without a voltage; the mismatches then hold the charging. */
  readonly susceptanceMillisiemens: Estimate | undefined;
  /** Re Y, siemens/1000: leakage or tapped load. `undefined` without a voltage. */
  readonly conductanceMillisiemens: Estimate | undefined;
  /** Rms of V̄ over the window, kilovolts. `undefined` without a voltage. */
  readonly voltageKv: number | undefined;
  readonly mismatches: readonly TerminalMismatch[];
}

/** A window that can't tell the causes apart: why, and what would let it. */
export interface NotSeparableComposition {
  readonly kind: 'not separable';
  readonly reason: NotSeparableReason;
  readonly days: number;
  readonly count: number;
  /**
   * What can be said all the same: the differential per unit of the second terminal's current, all causes
   * together, at the loads of the window. `undefined` where there is no such current.
   */
  readonly lumped: Complex | undefined;
}

export type Composition = SeparatedComposition | NotSeparableComposition;

export interface CompositionPlan {
  /** Nominal frequency, for angles as times. */
  readonly frequencyHz: number;
  /** Least days with qualified snapshots; 7 unless given. */
  readonly daysLeast?: number;
  /** A normal matrix of a greater condition number is singular for all practical purposes; 1000 unless given. */
  readonly conditionMost?: number;
}

const CONFIDENCE = 0.95;
const DAYS_LEAST = 7;
const CONDITION_MOST = 1000;

/** Blocks cover what days have in common with the next; fewer than this leave too little to tell the spread by. */
const BLOCKS_LEAST = 9;
const BLOCK_DAYS_MOST = 4;

/**
 * The composition of one phase from its day rows. Complex least squares over their sum; 95 % intervals by the
 * delete-one-day jackknife (J. W. Tukey, 1958) with Student's t, since residuals stay alike for hours and the
 * textbook standard error would be several times too small; where there are days enough, blocks of up to four
 * days are left out together, since some residuals stay alike for days. The coefficients E_k belong to measured
 * currents, hence e_k = E_k/(1 − E_k). Days without snapshots count for nothing. Throws for rows of different
 * shapes.
 */
export function composition(daySums: readonly CompositionSums[], plan: CompositionPlan): Composition {
  const days = daySums.filter((sums) => snapshotCount(sums) > 0);
  const total = totalOf(days);
  const daysLeast = Math.max(plan.daysLeast ?? DAYS_LEAST, 2);
  if (total === undefined) {
    return refusal(undefined, { reason: obstacleOfWindow(daySums, daysLeast), days: 0 });
  }
  const fit = compositionFit(total);
  const reason =
    obstacleOfFit(total, { fit, conditionMost: plan.conditionMost ?? CONDITION_MOST }) ??
    obstacleOfWindow(days, daysLeast);
  if (fit === undefined || reason !== undefined) return refusal(total, { reason, days: days.length });
  const replicates: Complex[][] = [];
  for (const block of blocksOf(days)) {
    const without = fittedCoefficients(subtractSums(total, block));
    if (without === undefined) {
      return refusal(total, { reason: { kind: 'one day decides' }, days: days.length });
    }
    replicates.push(without);
  }
  return separated(total, { fit, replicates, days: days.length, frequencyHz: plan.frequencyHz });
}

/** The days in blocks of one to four neighbours, nine blocks or more where there are as many days. */
function blocksOf(days: readonly CompositionSums[]): CompositionSums[] {
  const length = Math.min(BLOCK_DAYS_MOST, Math.max(1, Math.floor(days.length / BLOCKS_LEAST)));
  const count = Math.max(1, Math.floor(days.length / length));
  return Array.from({ length: count }, (_, index) => {
    // what does not come out even goes to the last block
    const to = index === count - 1 ? days.length : (index + 1) * length;
    return days.slice(index * length + 1, to).reduce(addSums, days[index * length]!);
  });
}

function refusal(
  total: CompositionSums | undefined,
  { reason, days }: { reason: NotSeparableReason | undefined; days: number },
): NotSeparableComposition {
  return {
    kind: 'not separable',
    reason: reason ?? { kind: 'no snapshots' },
    days,
    count: total === undefined ? 0 : snapshotCount(total),
    lumped: total && lumpedMismatch(total),
  };
}

/** Σ conj(I_2)·D / Σ|I_2|². */
function lumpedMismatch(total: CompositionSums): Complex | undefined {
  const second = shapeOf(total).hasVoltage ? 1 : 0;
  const squares = normalProduct(total, second, second).re;
  if (squares === 0) return undefined;
  return scaled(crossProduct(total, second), 1 / squares);
}

interface Replicated {
  readonly fit: CompositionFit;
  /** The coefficients without each block. */
  readonly replicates: readonly (readonly Complex[])[];
  readonly days: number;
  readonly frequencyHz: number;
}

function separated(
  total: CompositionSums,
  { fit, replicates, days, frequencyHz }: Replicated,
): SeparatedComposition {
  const { hasVoltage, terminalCount } = fit.shape;
  const estimate = (figure: (coefficients: readonly Complex[]) => number): Estimate =>
    jackknife(figure(fit.coefficients), replicates.map(figure));
  const omegaPerMs = (2 * Math.PI * frequencyHz) / 1000;
  const mismatchOf = (terminal: number): TerminalMismatch => {
    const place = terminal - 1 + (hasVoltage ? 1 : 0);
    const angleRad = estimate((coefficients) => mismatchFrom(coefficients[place]!).im);
    return {
      terminal,
      ratio: estimate((coefficients) => mismatchFrom(coefficients[place]!).re),
      angleRad,
      timeErrorMs: scaledEstimate(angleRad, 1 / omegaPerMs),
      asymmetryMs: scaledEstimate(angleRad, 2 / omegaPerMs),
    };
  };
  return {
    kind: 'separated',
    ...fit,
    days,
    susceptanceMillisiemens: hasVoltage ? estimate((coefficients) => coefficients[0]!.im) : undefined,
    conductanceMillisiemens: hasVoltage ? estimate((coefficients) => coefficients[0]!.re) : undefined,
    voltageKv: hasVoltage ? Math.sqrt(normalProduct(total, 0, 0).re / fit.count) : undefined,
    mismatches: Array.from({ length: terminalCount - 1 }, (_, index) => mismatchOf(index + 1)),
  };
}

/** e = E/(1 − E), both per unit: what a coefficient of the measured current says of the transformers. */
export function mismatchFrom(coefficient: Complex): Complex {
  return quotient(coefficient, minus({ re: 1, im: 0 }, coefficient));
}

/** ± t·√[(n−1)/n · Σ(replicate − their mean)²] around the value of the whole. */
function jackknife(value: number, replicates: readonly number[]): Estimate {
  const n = replicates.length;
  const mean = replicates.reduce((total, each) => total + each, 0) / n;
  const squares = replicates.reduce((total, each) => total + (each - mean) ** 2, 0);
  const half = studentTwoSided(CONFIDENCE, n - 1) * Math.sqrt((squares * (n - 1)) / n);
  return { value, low: value - half, high: value + half };
}

function scaledEstimate({ value, low, high }: Estimate, factor: number): Estimate {
  return { value: value * factor, low: low * factor, high: high * factor };
}

/** Where a measured value stands against a limit that is symmetrical around 0. */
export type BudgetVerdict = 'within' | 'beyond' | 'undecided';

/**
 * Whether an estimate lies within ±`budget` of its own unit: its whole interval does, none of it does, or the
 * interval reaches across. A mismatch is held against the class limits of both transformers together.
 */
export function againstBudget({ low, high }: Estimate, budget: number): BudgetVerdict {
  if (low >= -budget && high <= budget) return 'within';
  return low > budget || high < -budget ? 'beyond' : 'undecided';
}

/**
 * The charging current of the composition at its own voltage and the one that the register's susceptance
 * (siemens/1000) would give there, amperes. `undefined` without a voltage.
 */
export function chargingAgainstExpected(
  { susceptanceMillisiemens, voltageKv }: SeparatedComposition,
  expectedMillisiemens: number,
): { readonly measuredAmps: Estimate; readonly expectedAmps: number } | undefined {
  if (susceptanceMillisiemens === undefined || voltageKv === undefined) return undefined;
  return {
    measuredAmps: scaledEstimate(susceptanceMillisiemens, voltageKv),
    expectedAmps: expectedMillisiemens * voltageKv,
  };
}

/**
 * For a line without voltages: how much of a mismatch the charging it holds can be, per unit of the current:
 * expected charging over the current's rms. `undefined` for no current.
 */
export function chargingInMismatch(expectedChargingAmps: number, currentRmsAmps: number): number | undefined {
  return currentRmsAmps > 0 ? expectedChargingAmps / currentRmsAmps : undefined;
}
