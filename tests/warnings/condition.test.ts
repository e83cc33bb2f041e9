import { describe, expect, it } from 'vitest';
import { WARNING_KINDS, type WarningKind } from '../../src/contract/warning';
import { lineCondition } from '../../src/warnings/condition';

const sighting = (
  standing: readonly WarningKind[],
  { notEvaluated = false, outOfService = false } = {},
): Parameters<typeof lineCondition>[0] => ({ standing: new Set(standing), notEvaluated, outOfService });

/** Every set of the four kinds of warnings. */
const SUBSETS = Array.from({ length: 16 }, (_, bits) =>
  WARNING_KINDS.filter((_kind, index) => (bits & (1 << index)) !== 0),
);

describe('a line’s condition', () => {
  it.each([
    ['settled', []],
    ['rising', ['rising']],
    ['near', ['near', 'rising']],
    ['over', ['over', 'near', 'rising']],
    ['blind', ['blind', 'over', 'near', 'rising']],
    ['blind', ['blind', 'near']],
  ] as const)('is %s when there stands %j', (condition, standing) => {
    expect(lineCondition(sighting(standing))).toBe(condition);
  });

  it('is the worst of what stands as long as the line is seen, and blind as soon as it is not', () => {
    const ladder = ['blind', 'over', 'near', 'rising'] as const;
    for (const standing of SUBSETS)
      expect(lineCondition(sighting(standing))).toBe(
        ladder.find((kind) => standing.includes(kind)) ?? 'settled',
      );
  });

  it('is never settled, nor anything else, on a line that is not evaluated', () => {
    for (const standing of SUBSETS)
      for (const outOfService of [true, false])
        expect(lineCondition(sighting(standing, { notEvaluated: true, outOfService }))).toBe('not evaluated');
  });

  it('is out of service only where nothing stands', () => {
    expect(lineCondition(sighting([], { outOfService: true }))).toBe('out of service');
    expect(lineCondition(sighting(['near'], { outOfService: true }))).toBe('near');
  });
});
