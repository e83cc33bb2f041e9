import { currentSquares, shapeOf, snapshotCount } from './composition-sums';
import type { CompositionSums } from './composition-sums';

/**
 * How much more current one phase carries than the other two, as each terminal of the line measures it: ln of its
 * rms current over the geometric mean of theirs, one value a terminal in the register's order. Per unit for small
 * values, without a unit. The load's own unbalance is in every terminal's value alike, a transformer's ratio error
 * only in its own. `undefined` where a window has no snapshots, a current is zero, or the shapes differ.
 */
export function phaseUnbalance(
  own: CompositionSums,
  others: readonly [CompositionSums, CompositionSums],
): readonly number[] | undefined {
  const { terminalCount } = shapeOf(own);
  if (others.some((sums) => shapeOf(sums).terminalCount !== terminalCount)) return undefined;
  const values = Array.from({ length: terminalCount }, (_, terminal) => {
    const [mine, ...theirs] = [own, ...others].map((sums) => logOfRms(sums, terminal));
    return mine! - theirs.reduce((total, each) => total + each, 0) / theirs.length;
  });
  return values.every(Number.isFinite) ? values : undefined;
}

const logOfRms = (sums: CompositionSums, terminal: number): number =>
  Math.log(currentSquares(sums, terminal) / snapshotCount(sums)) / 2;
