import { median } from './quantile';

/** Where a mismatch moved: at one terminal, or somewhere between two of which none can be told. */
export type MovedTerminal =
  | { readonly kind: 'terminal'; readonly terminal: number }
  | { readonly kind: 'between'; readonly terminal: number; readonly against: number };

/** `phaseUnbalance` of each day (or hour) on either side of a change, oldest first. */
export interface UnbalanceSides {
  readonly before: readonly (readonly number[])[];
  readonly after: readonly (readonly number[])[];
}

/** A terminal stood still when what moved there is at most this share of the whole change. */
const STILL_SHARE = 1 / 3;

/** Changes are alike where none is further from their mean than this share of it. */
const ALIKE_SHARE = 1 / 4;

/** A change smaller than so many spreads of the load's own unbalance is not laid on either terminal. */
const SPREADS_LEAST = 3;

/** Days or hours on a side, at the least, for its median to be sure enough. */
const SIDE_LEAST = 5;

/** Makes the median absolute deviation the standard deviation of normal noise. */
const MAD_TO_DEVIATION = 1.4826;

/**
 * At which terminal a mismatch changed. `changes` are the changes of e_k (real part for the ratio, per unit; imaginary
 * part for the angle, radians) of every terminal against the first, places from 0.
 *
 * Three terminals and more tell by themselves: a change of terminal k stands in e_k alone, one of the first in all of
 * them alike. Two terminals tell only that they differ; of a ratio, whether it moved at the one or the other follows
 * from the unbalance between the phases, which both measure: it jumps where the transformer moved and stays where it
 * did not. That takes the load's own unbalance to be steady, which its spread from day to day is held against.
 * Own method, no source. `undefined` where nothing changed.
 */
export function movedTerminal(
  changes: readonly number[],
  unbalance?: UnbalanceSides,
): MovedTerminal | undefined {
  const largest = placeOfLargest(changes);
  if (largest === undefined) return undefined;
  const between = { kind: 'between', terminal: largest + 1, against: 0 } as const;
  const found =
    changes.length > 1 ? oddOneOut(changes, largest) : unbalance && movedOfTwo(changes[0]!, unbalance);
  return found === undefined ? between : { kind: 'terminal', terminal: found };
}

function placeOfLargest(changes: readonly number[]): number | undefined {
  const sizes = changes.map(Math.abs);
  const most = Math.max(...sizes);
  return most > 0 ? sizes.indexOf(most) : undefined;
}

/** The one terminal whose change explains all of them; `undefined` where none does. */
function oddOneOut(changes: readonly number[], largest: number): number | undefined {
  const still = STILL_SHARE * Math.abs(changes[largest]!);
  if (changes.every((change, place) => place === largest || Math.abs(change) <= still)) return largest + 1;
  const mean = changes.reduce((total, change) => total + change, 0) / changes.length;
  return changes.every((change) => Math.abs(change - mean) <= ALIKE_SHARE * Math.abs(mean)) ? 0 : undefined;
}

/** By the unbalance: ratio error of the second against the first rises with the second's value, falls with the first's. */
function movedOfTwo(change: number, { before, after }: UnbalanceSides): number | undefined {
  if (before.length < SIDE_LEAST || after.length < SIDE_LEAST) return undefined;
  const shifts = [0, 1].map((terminal) => sideMedian(after, terminal) - sideMedian(before, terminal));
  const [first, second] = [shifts[0]!, shifts[1]!];
  const least = Math.abs(change) * STILL_SHARE;
  // what else moved, another phase's transformer say, is in the unbalance and not in this phase's mismatch
  if (Math.abs(second - first - change) > least) return undefined;
  const still = Math.abs(first) <= Math.abs(second) ? 0 : 1;
  if (Math.abs(shifts[still]!) > least) return undefined;
  const spread = Math.max(sideSpread(before, still), sideSpread(after, still));
  return Math.abs(change) >= SPREADS_LEAST * spread ? 1 - still : undefined;
}

const sideMedian = (side: readonly (readonly number[])[], terminal: number): number =>
  median(side.map((values) => values[terminal]!))!;

function sideSpread(side: readonly (readonly number[])[], terminal: number): number {
  const middle = sideMedian(side, terminal);
  return MAD_TO_DEVIATION * median(side.map((values) => Math.abs(values[terminal]! - middle)))!;
}
