import type { Complex } from './complex';
import { minus, scaled, squared, ZERO } from './complex';
import { residualProducts, settledCoefficients } from './composition-fit';
import { normalProduct, shapeOf, snapshotCount, totalOf } from './composition-sums';
import type { CompositionSums } from './composition-sums';

/** A window's place in time, counted in any unit, and what stood in it. */
export interface MomentValue {
  readonly at: number;
  readonly value: Complex;
}

/** Windows on a side, at the least, for its mean to stand for it. */
const SIDE_LEAST = 10;

/** The change is that many times what is left over around the means of both sides, or no moment is told. */
const CLEAR_RATIO = 2;

/**
 * When a step that is known to lie within a series came: the first window after it, by least squares over all ways to
 * part the series in two means. `undefined` where the parts differ no more than they scatter. Common practice (a single
 * change of mean), no source.
 */
export function stepMoment(series: readonly MomentValue[]): number | undefined {
  const sums = [ZERO];
  for (const { value } of series) {
    const before = sums.at(-1)!;
    sums.push({ re: before.re + value.re, im: before.im + value.im });
  }
  let best: { place: number; gain: number } | undefined;
  for (let place = SIDE_LEAST; place <= series.length - SIDE_LEAST; place++) {
    const change = changeAt(sums, place);
    const gain = (squared(change) * place * (series.length - place)) / series.length;
    if (best === undefined || gain > best.gain) best = { place, gain };
  }
  if (best === undefined) return undefined;
  const { place } = best;
  const [before, after] = [series.slice(0, place), series.slice(place)];
  const scatter = (scatterOf(before) * before.length + scatterOf(after) * after.length) / series.length;
  return squared(changeAt(sums, place)) > CLEAR_RATIO ** 2 * scatter ? series[place]!.at : undefined;
}

function changeAt(sums: readonly Complex[], place: number): Complex {
  const count = sums.length - 1;
  const [before, all] = [sums[place]!, sums[count]!];
  return minus(scaled(minus(all, before), 1 / (count - place)), scaled(before, 1 / place));
}

/** Mean square around the mean. */
function scatterOf(series: readonly MomentValue[]): number {
  const mean = scaled(
    series.reduce((sum, { value }) => ({ re: sum.re + value.re, im: sum.im + value.im }), ZERO),
    1 / series.length,
  );
  return series.reduce((sum, { value }) => sum + squared(minus(value, mean)), 0) / series.length;
}

/**
 * What the composition of the windows before leaves over in each of these, per unit of the second terminal's current:
 * real part along it, imaginary part across. Windows without snapshots or current are left out; none at all where
 * there was nothing before. Throws for windows of different shapes.
 */
export function residueSeries(
  windows: readonly { readonly at: number; readonly sums: CompositionSums }[],
  before: readonly CompositionSums[],
): MomentValue[] {
  const total = totalOf(before);
  const coefficients = total && settledCoefficients(total);
  if (coefficients === undefined) return [];
  return windows.flatMap(({ at, sums }) => {
    const second = shapeOf(sums).hasVoltage ? 1 : 0;
    const squares = snapshotCount(sums) === 0 ? 0 : normalProduct(sums, second, second).re;
    if (squares === 0) return [];
    return [{ at, value: scaled(residualProducts(sums, coefficients)[second]!, 1 / squares) }];
  });
}
