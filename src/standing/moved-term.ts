import { conjugateProduct } from './complex';
import type { Complex } from './complex';
import { residualProducts, residualSquares } from './composition-fit';
import {
  crossProduct,
  currentSquares,
  differentialSquares,
  normalProduct,
  shapeOf,
} from './composition-sums';
import type { CompositionSums } from './composition-sums';

/** One term of the composition as an explanation of a step. */
export interface MovedTerm {
  readonly term: 'charging' | 'leakage' | 'ratio' | 'angle';
  /**
   * Place of the terminal whose mismatch it is, from 0; `undefined` for charging and leakage. Never 0 on a line with
   * two terminals, whose currents tell only that they differ.
   */
  readonly terminal: number | undefined;
  /** Change were it this term alone: siemens/1000 for charging and leakage, per unit for ratio, radians for angle. */
  readonly change: number;
  /** Share of what the composition before leaves over of the hours after, that this change takes away; 0 to 1. */
  readonly explains: number;
}

/** The second best explanation leaves at least so many times more over, or the best one is not said to be it. */
const DECIDED_RATIO = 1.5;

/**
 * The best explanation, where it leaves clearly less over than the next. First by places: a transformer that was
 * replaced moves the ratio and the angle of its terminal at once, of which neither alone explains much, so the two of
 * a terminal, or of the voltage, are taken together and the greater one is told. What the two explain adds up, since
 * they are at right angles. Where the load of the hours after is too even for that, by single terms without leakage:
 * at an even load a ratio that moved looks like leakage, which hardly ever comes at once. `undefined` where none
 * stands out even so.
 */
export function decided(terms: readonly MovedTerm[]): MovedTerm | undefined {
  const isClear = (best: number, next: number): boolean => 1 - next >= DECIDED_RATIO * (1 - best);
  const together = new Map<number | undefined, number>();
  for (const { terminal, explains } of terms) {
    together.set(terminal, (together.get(terminal) ?? 0) + explains);
  }
  const [best, next] = [...together].sort(([, a], [, b]) => b - a);
  if (best !== undefined && isClear(best[1], next?.[1] ?? 0)) {
    return terms.find(({ terminal }) => terminal === best[0]);
  }
  const [first, second] = terms.filter(({ term }) => term !== 'leakage');
  return first !== undefined && isClear(first.explains, second?.explains ?? 0) ? first : undefined;
}

/**
 * What each term alone would have to change for the hours after a change, by the coefficients before it, and how much
 * of what they leave over that explains; the best first.
 */
export function explanations(after: CompositionSums, coefficients: readonly Complex[]): MovedTerm[] {
  const { hasVoltage, terminalCount } = shapeOf(after);
  const leftOver = residualSquares(after, coefficients);
  const products = residualProducts(after, coefficients);
  const along = (product: Complex, squares: number, terminal: number | undefined): MovedTerm[] => {
    if (squares === 0 || leftOver <= 0) return [];
    const term = (name: MovedTerm['term'], part: number): MovedTerm => ({
      term: name,
      terminal,
      change: part / squares,
      explains: Math.min(1, part ** 2 / squares / leftOver),
    });
    const isVoltage = terminal === undefined;
    return [
      term(isVoltage ? 'leakage' : 'ratio', product.re),
      term(isVoltage ? 'charging' : 'angle', product.im),
    ];
  };
  const terms = products.flatMap((product, place) => {
    const terminal = hasVoltage && place === 0 ? undefined : place + (hasVoltage ? 0 : 1);
    return along(product, normalProduct(after, place, place).re, terminal);
  });
  if (terminalCount > 2)
    terms.push(...along(firstTerminalProduct(after, coefficients, products), currentSquares(after, 0), 0));
  return terms.sort((a, b) => b.explains - a.explains);
}

/** Σ conj(I₁)·residue, the first terminal's current being D less all others. */
function firstTerminalProduct(
  after: CompositionSums,
  coefficients: readonly Complex[],
  products: readonly Complex[],
): Complex {
  const from = shapeOf(after).hasVoltage ? 1 : 0;
  let { re, im } = { re: differentialSquares(after), im: 0 };
  coefficients.forEach((coefficient, place) => {
    const ofDifferential = conjugateProduct(crossProduct(after, place), coefficient);
    re -= ofDifferential.re + (place >= from ? products[place]!.re : 0);
    im -= ofDifferential.im + (place >= from ? products[place]!.im : 0);
  });
  return { re, im };
}
