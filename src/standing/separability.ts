import { normalMatrix } from './composition-fit';
import type { CompositionFit } from './composition-fit';
import {
  normalProduct,
  regressorCount,
  shapeOf,
  snapshotCount,
  throughLoad,
  voltagelessCount,
} from './composition-sums';
import type { CompositionSums } from './composition-sums';
import { coherence } from './hermitian';

/**
 * Why a window can't tell the causes apart, and with it what would: qualified snapshots; a valid voltage; more
 * days; some current at the idle terminal; a load that changes in the course of a day; a load whose angle
 * against the voltage changes, or whose size does; terminals that are loaded unequally; a window in which more
 * than one day has a changing load.
 */
export type NotSeparableReason =
  | { readonly kind: 'no snapshots' }
  | { readonly kind: 'no voltage'; readonly snapshots: number }
  | { readonly kind: 'too few snapshots'; readonly snapshots: number; readonly snapshotsNeeded: number }
  | { readonly kind: 'too few days'; readonly days: number; readonly daysNeeded: number }
  | { readonly kind: 'idle terminal'; readonly terminal: number }
  | {
      readonly kind: 'constant load';
      /** Standard deviation of the through current over its mean. */
      readonly loadVariation: number;
      readonly condition: number;
    }
  | { readonly kind: 'voltage and load proportional'; readonly terminal: number; readonly condition: number }
  | {
      readonly kind: 'terminals proportional';
      readonly terminals: readonly [number, number];
      readonly condition: number;
    }
  | { readonly kind: 'one day decides' };

/** A load that varies by less than this share of its mean counts as constant when it can't be told apart. */
const LOAD_VARIATION_LEAST = 0.1;

/** A terminal with less than this share of the strongest terminal's rms current carries nothing to learn from. */
const IDLE_SHARE = 1e-4;

/** What stands in the way before anything is fitted: nothing to sum, or too few days of it. */
export function obstacleOfWindow(
  days: readonly CompositionSums[],
  daysNeeded: number,
): NotSeparableReason | undefined {
  const voltageless = days.reduce((total, sums) => total + voltagelessCount(sums), 0);
  const withSnapshots = days.filter((sums) => throughLoad(sums) !== undefined).length;
  if (withSnapshots === 0) {
    return voltageless > 0 ? { kind: 'no voltage', snapshots: voltageless } : { kind: 'no snapshots' };
  }
  return withSnapshots < daysNeeded ? { kind: 'too few days', days: withSnapshots, daysNeeded } : undefined;
}

/** What makes the fit of these sums meaningless, the plainest reason first; `undefined` for nothing. */
export function obstacleOfFit(
  sums: CompositionSums,
  { fit, conditionMost }: { readonly fit: CompositionFit | undefined; readonly conditionMost: number },
): NotSeparableReason | undefined {
  const snapshots = snapshotCount(sums);
  const snapshotsNeeded = regressorCount(sums) + 1;
  if (snapshots < snapshotsNeeded) return { kind: 'too few snapshots', snapshots, snapshotsNeeded };
  const terminal = idleTerminal(sums);
  if (terminal !== undefined) return { kind: 'idle terminal', terminal };
  const condition = fit?.condition ?? Infinity;
  return condition <= conditionMost ? undefined : proportionality(sums, condition);
}

function idleTerminal(sums: CompositionSums): number | undefined {
  const { hasVoltage, terminalCount } = shapeOf(sums);
  const from = hasVoltage ? 1 : 0;
  const squares = Array.from(
    { length: terminalCount - 1 },
    (_, index) => normalProduct(sums, from + index, from + index).re,
  );
  const strongest = Math.max(...squares);
  const idle = squares.findIndex((each) => !(each > IDLE_SHARE ** 2 * strongest));
  return idle < 0 ? undefined : idle + 1;
}

/** Names the pair of regressors that resemble each other most. */
function proportionality(sums: CompositionSums, condition: number): NotSeparableReason {
  const matrix = normalMatrix(sums);
  let worst = { first: 0, second: 0, coherence: -1 };
  for (let first = 0; first < matrix.length; first++) {
    for (let second = first + 1; second < matrix.length; second++) {
      const alike = coherence(matrix, first, second);
      if (alike > worst.coherence) worst = { first, second, coherence: alike };
    }
  }
  const offset = shapeOf(sums).hasVoltage ? 0 : 1;
  const [a, b] = [worst.first + offset, worst.second + offset];
  if (a > 0) return { kind: 'terminals proportional', terminals: [a, b], condition };
  const loadVariation = throughLoad(sums)?.variation ?? 0;
  return loadVariation < LOAD_VARIATION_LEAST
    ? { kind: 'constant load', loadVariation, condition }
    : { kind: 'voltage and load proportional', terminal: b, condition };
}
