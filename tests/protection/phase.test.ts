import { expect, test } from 'vitest';
import { PHASES, perPhase } from '../../src/protection/phase';

test('every phase gets the value that is made for it', () => {
  expect(perPhase((phase) => phase.toUpperCase())).toEqual({ a: 'A', b: 'B', c: 'C' });
  expect(Object.keys(perPhase(() => 0))).toEqual([...PHASES]);
});
