import { describe, expect, test } from 'vitest';
import { generalisedEquivalent } from '../../src/protection/generalised-equivalent';
import {
  magnitude,
  phasor,
  phasorFromPolar,
  rotate,
  scale,
  subtract,
  sum,
} from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { magnitudeSumAmps } from '../../src/protection/terminal-currents';
import { seededCurrents } from './seeded-currents';

const sets = seededCurrents(400);
const apart = (one: Phasor, other: Phasor) => magnitude(subtract(one, other));

describe('generalised two-terminal equivalent', () => {
  test('keeps the differential current and the sum of magnitudes', () => {
    for (const currents of sets) {
      const { local, remote } = generalisedEquivalent(currents);
      expect(apart(sum([local, remote]), sum(currents))).toBeLessThan(1e-7);
      expect(magnitude(local) + magnitude(remote)).toBeCloseTo(magnitudeSumAmps(currents), 7);
    }
  });

  test('gives back two terminals, alone or beside terminals without current', () => {
    for (const [one, other] of sets.filter((currents) => currents.length === 2)) {
      for (const currents of [
        [one!, other!],
        [phasor(0, 0), one!, phasor(0, 0), other!],
      ]) {
        const { local, remote } = generalisedEquivalent(currents);
        const asGiven = Math.max(apart(local, one!), apart(remote, other!));
        const swapped = Math.max(apart(local, other!), apart(remote, one!));
        expect(Math.min(asGiven, swapped)).toBeLessThan(1e-6);
      }
    }
  });

  test('turns with the currents', () => {
    for (const currents of sets) {
      const found = generalisedEquivalent(currents);
      const turned = generalisedEquivalent(currents.map((current) => rotate(current, 0.7)));
      expect(apart(turned.local, rotate(found.local, 0.7))).toBeLessThan(1e-6);
      expect(apart(turned.remote, rotate(found.remote, 0.7))).toBeLessThan(1e-6);
    }
  });

  test('does not depend on the order of the terminals', () => {
    for (const currents of sets) {
      const [found, reversed] = [
        generalisedEquivalent(currents),
        generalisedEquivalent(currents.toReversed()),
      ];
      expect(apart(found.local, reversed.local)).toBeLessThan(1e-6);
      expect(apart(found.remote, reversed.remote)).toBeLessThan(1e-6);
    }
  });

  test('of a balanced through load is two opposed halves of the sum of magnitudes', () => {
    const { local, remote } = generalisedEquivalent([phasor(600, 0), phasor(-400, 0), phasor(-200, 0)]);
    expect(magnitude(local)).toBeCloseTo(600, 9);
    expect(apart(remote, scale(local, -1))).toBeLessThan(1e-9);
  });

  test('takes the direction of the greatest projection on the differential, not of the greatest current', () => {
    const { local } = generalisedEquivalent([phasor(0, 5), phasor(0, -4.5), phasor(3, 0), phasor(2, 0)]);
    expect(local.re).toBeGreaterThan(3);
    expect(local.im).toBe(0);
  });

  test('of currents in phase is the leading one and the rest, and stays so as they come into phase', () => {
    const inPhase = generalisedEquivalent([phasor(500, 0), phasor(300, 0), phasor(100, 0)]);
    expect(inPhase).toEqual({ local: phasor(500, 0), remote: phasor(400, 0) });
    for (const angle of [1e-2, 1e-4, 1e-6]) {
      const nearly = generalisedEquivalent([
        phasor(500, 0),
        phasorFromPolar(300, angle),
        phasorFromPolar(100, angle),
      ]);
      expect(apart(nearly.local, inPhase.local)).toBeLessThan(500 * angle);
    }
  });

  test('of one fed terminal is that terminal and nothing', () => {
    const { local, remote } = generalisedEquivalent([phasor(0, 0), phasor(300, 400), phasor(0, 0)]);
    expect(apart(local, phasor(300, 400))).toBeLessThan(1e-9);
    expect(magnitude(remote)).toBeLessThan(1e-9);
  });

  test('of no current is no current', () => {
    expect(generalisedEquivalent([phasor(0, 0), phasor(0, 0)])).toEqual({
      local: phasor(0, 0),
      remote: phasor(0, 0),
    });
  });
});
