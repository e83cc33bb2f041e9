import { expect } from 'vitest';

/** A figure printed elsewhere, with the tolerance that its printed digits leave. */
export interface Figure {
  readonly value: number;
  readonly tolerance: number;
}

/** The figure with half a unit of its last printed digit as tolerance: `printed('0.4476')` is 0.4476 ± 0.00005. */
export function printed(digits: string): Figure {
  const decimals = digits.split('.')[1]?.length ?? 0;
  return { value: Number(digits), tolerance: 0.5000001 * 10 ** -decimals };
}

/** Holds a computed value against a printed figure. */
export function expectFigure(actual: number | undefined, { value, tolerance }: Figure): void {
  expect(actual, 'the value is computable').toBeDefined();
  expect(actual, `${value} ± ${tolerance}`).toBeGreaterThanOrEqual(value - tolerance);
  expect(actual, `${value} ± ${tolerance}`).toBeLessThanOrEqual(value + tolerance);
}
