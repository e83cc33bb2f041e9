import { describe, expect, test } from 'vitest';
import { complex, polar } from '../../simulator/plant/complex';
import { twoTerminalFlow } from '../../simulator/plant/line-flow';
import {
  chargingCompensation,
  compensatedCurrents,
  compensatedDifferential,
} from '../../src/protection/charging-compensation';
import { magnitude, phasor, scale, sum } from '../../src/protection/phasor';
import { seededRandom } from './seeded-random';

// A cable of 110 kV, 20 km, as the plant has it: 8.5 mS in all. Its flow gives volts, the feed kilovolts.
const SECTION = { impedanceOhm: complex(0.6, 3.4), susceptanceS: 8.5e-3 };
const SUSCEPTANCE = 8.5;

describe('charging compensation', () => {
  test('leaves nothing of a π line’s differential current, at any load', () => {
    const random = seededRandom(11);
    for (let index = 0; index < 100; index++) {
      const through = polar(900 * random(), 6.3 * random());
      const ends = twoTerminalFlow(SECTION, polar(63_500, 6.3 * random()), through);
      const measured = sum(ends.map(({ amps }) => amps));
      const { differential, compensation } = compensatedDifferential(measured, {
        voltagesKv: ends.map(({ volts }) => scale(volts, 1e-3)),
        susceptanceMillisiemens: SUSCEPTANCE,
      });
      expect(magnitude(measured)).toBeGreaterThan(400);
      expect(magnitude(differential)).toBeLessThan(1e-9);
      expect(compensation).toMatchObject({ state: 'compensated', voltageCount: 2 });
    }
  });

  test('goes by the voltages that are valid, and says how many they were', () => {
    const found = chargingCompensation({
      voltagesKv: [undefined, phasor(60, 0), phasor(64, 0)],
      susceptanceMillisiemens: SUSCEPTANCE,
    });
    expect(found).toEqual({ state: 'compensated', charging: phasor(-0, 8.5 * 62), voltageCount: 2 });
  });

  test.each([
    {
      voltagesKv: [undefined, undefined],
      susceptanceMillisiemens: SUSCEPTANCE,
      reason: 'The charging current is not compensated, because no terminal gives a valid voltage.',
    },
    {
      voltagesKv: [phasor(63, 0)],
      susceptanceMillisiemens: undefined,
      reason:
        'The charging current is not compensated, because the register does not hold the line’s capacitance.',
    },
  ])('falls back to the measured differential: $reason', ({ reason, ...supply }) => {
    const measured = phasor(20, 530);
    const found = compensatedDifferential(measured, supply);
    expect(found).toEqual({ differential: measured, compensation: { state: 'fallback', reason } });
  });

  test('takes an equal share of the charging from each terminal', () => {
    const currents = [phasor(500, 30), phasor(-300, 30), phasor(-200, 30)];
    const supply = { voltagesKv: [phasor(30, 0)], susceptanceMillisiemens: 3 };
    const compensation = chargingCompensation(supply);
    const left = compensatedCurrents(currents, compensation);
    expect(left).toEqual([phasor(500, 0), phasor(-300, 0), phasor(-200, 0)]);
    expect(sum(left)).toEqual(compensatedDifferential(sum(currents), supply).differential);
    expect(compensatedCurrents(currents, { state: 'fallback', reason: 'No voltage.' })).toBe(currents);
  });
});
