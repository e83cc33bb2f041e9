import { scaled } from './complex';
import {
  CROSS_FROM,
  crossProduct,
  normalProduct,
  packedSums,
  regressorCount,
  snapshotCount,
  sumsFromPacked,
} from './composition-sums';
import type { CompositionSums } from './composition-sums';

/** Rms current of a terminal but the first over the snapshots of sums with a voltage, amperes. */
export const rmsAmps = (sums: CompositionSums, terminal: number): number =>
  Math.sqrt(normalProduct(sums, terminal, terminal).re / snapshotCount(sums));

/**
 * The sums of an hour with one regressor more, as if of one terminal more: the current of `terminal` at the size
 * `steadyAmps`. Within the hour the current counts as steady. `undefined` for no current.
 */
export function withSteadyCurrent(
  sums: CompositionSums,
  { terminal, steadyAmps }: { terminal: number; steadyAmps: number },
): CompositionSums | undefined {
  const factor = steadyAmps / rmsAmps(sums, terminal);
  if (!Number.isFinite(factor)) return undefined;
  const places = Array.from({ length: regressorCount(sums) }, (_, place) => place);
  const [version, terminals, ...head] = packedSums(sums).slice(0, CROSS_FROM);
  const cross = places.map((place) => crossProduct(sums, place));
  const normal = places.flatMap((row) => [
    ...places.slice(row).map((column) => normalProduct(sums, row, column)),
    scaled(normalProduct(sums, row, terminal), factor),
  ]);
  const products = [
    ...cross,
    scaled(crossProduct(sums, terminal), factor),
    ...normal,
    { re: snapshotCount(sums) * steadyAmps ** 2, im: 0 },
  ];
  return sumsFromPacked([version!, terminals! + 1, ...head, ...products.flatMap(({ re, im }) => [re, im])]);
}
