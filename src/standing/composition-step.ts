import type { Complex } from './complex';
import { partsOf, settledCoefficients } from './composition-fit';
import { shapeOf, snapshotCount, totalOf } from './composition-sums';
import type { CompositionSums } from './composition-sums';
import { decided, explanations } from './moved-term';
import type { MovedTerm } from './moved-term';
import { normalSquares, writeResidualProducts } from './residual-products';
import { stepVerdict } from './step';
import type { HourlyValue, NoStep, Step, StepPlan } from './step';

/** The sums of one hour, hours counted from the epoch. */
export interface HourSums {
  readonly hour: number;
  readonly sums: CompositionSums;
}

/** A step of the composition. */
export interface CompositionStep extends Step {
  /** The term in which it was seen first and the unit of `size` and `spread`; for the cause see `terms`. */
  readonly seenIn: 'ratio' | 'angle' | 'charging';
  /** Explanations, the best first. */
  readonly terms: readonly MovedTerm[];
  /** The best one, where it, or with it its terminal, leaves clearly less over than the next; else `undefined`. */
  readonly moved: MovedTerm | undefined;
  /** The angle moved when the channel took another path. */
  readonly pointsToChannel: boolean;
}

export type CompositionStepVerdict =
  | { readonly kind: 'too few hours'; readonly hours: number; readonly hoursNeeded: number }
  | NoStep
  | CompositionStep;

export interface CompositionStepPlan extends StepPlan {
  /** When the channel changed its path, hours since the epoch with a fraction. */
  readonly pathChangeHours?: readonly number[];
}

const WATCHED_HOURS = 96;
const BASELINE_HOURS = 336;

/** A path change this near to an angle step is taken for its cause. */
const PATH_HOURS = 1.5;

/**
 * The step in the last hours of one phase: deviations of every hour from the composition of the hours before, along
 * the second terminal's current (ratio), across it (angle) and across the voltage (charging), each watched by
 * `stepVerdict`; the one with most evidence is told. Which term moved is judged by all hours after: each term's own
 * best change, by least squares, against what it leaves over. Unlike the level itself, deviations see a change at
 * right angles to the differential too. Hours without snapshots are left out; throws for hours out of order.
 */
export function compositionStep(
  hours: readonly HourSums[],
  plan: CompositionStepPlan = {},
): CompositionStepVerdict {
  const counted = hours.filter(({ sums }) => snapshotCount(sums) > 0);
  const watchedFrom = (counted.at(-1)?.hour ?? 0) - (plan.watchedHours ?? WATCHED_HOURS) + 1;
  const from = watchedFrom - (plan.baselineHours ?? BASELINE_HOURS);
  const within = counted.filter(({ hour }) => hour >= from);
  const before = coefficientsOf(within.filter(({ hour }) => hour < watchedFrom));
  if (before === undefined) return stepVerdict([], plan) as CompositionStepVerdict;
  const series = deviations(within, before);
  const verdicts = SEEN_IN.flatMap((seenIn) =>
    series[seenIn].length === 0 ? [] : [{ seenIn, verdict: stepVerdict(series[seenIn], plan) }],
  );
  let surest: { seenIn: CompositionStep['seenIn']; step: Step } | undefined;
  let alarmed = false;
  for (const { seenIn, verdict } of verdicts) {
    if (verdict.kind === 'too few hours') return verdict;
    alarmed ||= verdict.kind === 'no step' && verdict.alarmed;
    if (verdict.kind === 'step' && !(surest && surest.step.evidence >= verdict.evidence)) {
      surest = { seenIn, step: verdict };
    }
  }
  if (surest === undefined) return { kind: 'no step', alarmed };
  return explained(within, surest, plan.pathChangeHours ?? []);
}

function coefficientsOf(hours: readonly HourSums[]): Complex[] | undefined {
  const total = totalOf(hours.map(({ sums }) => sums));
  return total && settledCoefficients(total);
}

const SEEN_IN = ['ratio', 'angle', 'charging'] as const;

/**
 * Σ conj(x)·residue/Σ|x|² of every hour: with x the second terminal's current its real and imaginary part, with x
 * the voltage its imaginary part.
 */
function deviations(
  hours: readonly HourSums[],
  coefficients: readonly Complex[],
): Record<CompositionStep['seenIn'], HourlyValue[]> {
  const series: Record<CompositionStep['seenIn'], HourlyValue[]> = { ratio: [], angle: [], charging: [] };
  const parts = partsOf(coefficients);
  const products = new Float64Array(parts.length);
  for (const { hour, sums } of hours) {
    writeResidualProducts(sums, parts, { target: products, at: 0 });
    const { hasVoltage } = shapeOf(sums);
    const second = hasVoltage ? 1 : 0;
    const currents = normalSquares(sums, second);
    if (currents > 0) {
      series.ratio.push({ hour, value: products[2 * second]! / currents });
      series.angle.push({ hour, value: products[2 * second + 1]! / currents });
    }
    const voltages = hasVoltage ? normalSquares(sums, 0) : 0;
    if (voltages > 0) series.charging.push({ hour, value: products[1]! / voltages });
  }
  return series;
}

function explained(
  hours: readonly HourSums[],
  { seenIn, step }: { seenIn: CompositionStep['seenIn']; step: Step },
  pathChangeHours: readonly number[],
): CompositionStep {
  const coefficients = coefficientsOf(hours.filter(({ hour }) => hour + 1 <= step.atHour))!;
  const after = totalOf(hours.filter(({ hour }) => hour >= step.atHour).map(({ sums }) => sums))!;
  const terms = explanations(after, coefficients);
  const moved = decided(terms);
  const isPathNear = pathChangeHours.some((hour) => Math.abs(hour - step.atHour) <= PATH_HOURS);
  return { ...step, seenIn, terms, moved, pointsToChannel: moved?.term === 'angle' && isPathNear };
}
