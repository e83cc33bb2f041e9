import { describe, expect, test } from 'vitest';
import {
  add,
  complex,
  type Complex,
  magnitude,
  multiply,
  polar,
  scale,
  subtract,
} from '../../simulator/plant/complex';
import { type Fault, faultedLine, loadedLine, type SourcedLine } from '../../simulator/plant/fault';

const NETWORK: SourcedLine = {
  line: { positive: complex(3, 24), zero: complex(12, 72) },
  firstSource: { positive: complex(1, 15), zero: complex(1, 10) },
  secondSource: { positive: complex(1.5, 20), zero: complex(1.5, 15) },
  firstVolts: polar(127_000, 0.28),
  secondVolts: polar(127_000, 0),
};
const earthFault = (at: Fault['at'], resistanceOhm: number): Fault => ({
  kind: 'phase A to earth',
  at,
  resistanceOhm,
});

const total = (currents: readonly Complex[]): Complex => currents.reduce(add);

describe('a line between two sources', () => {
  test('carries the same load at both ends, balanced over its phases', () => {
    const [first, second] = loadedLine(NETWORK);
    first.forEach((amps, phase) => expect(magnitude(add(amps, second[phase]!))).toBeCloseTo(0, 9));
    expect(magnitude(total(first))).toBeCloseTo(0, 9);
  });

  test('passes a fault behind its end through, whatever its kind', () => {
    for (const kind of ['phase A to earth', 'three-phase'] as const) {
      const [first, second] = faultedLine(NETWORK, { kind, at: 'behind the second end', resistanceOhm: 2 });
      first.forEach((amps, phase) => expect(magnitude(add(amps, second[phase]!))).toBeCloseTo(0, 9));
    }
  });

  test('feeds an earth fault from both ends in phase A alone', () => {
    const [first, second] = faultedLine(NETWORK, earthFault(0.4, 10));
    expect(magnitude(add(first[0], second[0]))).toBeGreaterThan(1000);
    expect(magnitude(add(first[1], second[1]))).toBeCloseTo(0, 8);
    expect(magnitude(add(first[2], second[2]))).toBeCloseTo(0, 8);
  });

  test('keeps to Ohm’s law from each source to the fault, in the phase that has it', () => {
    // Phase A's own loop: E − Z₁·I_A − (Z₀ − Z₁)·I₀ from either side is the voltage at the fault, R·I_F.
    const fault = earthFault(0.4, 25);
    const [first, second] = faultedLine(NETWORK, fault);
    const voltsFrom = (
      [source, volts]: readonly [SourcedLine['firstSource'], Complex],
      share: number,
      currents: readonly Complex[],
    ) => {
      const positive = add(source.positive, scale(NETWORK.line.positive, share));
      const zero = add(source.zero, scale(NETWORK.line.zero, share));
      const earth = scale(total(currents), 1 / 3);
      return subtract(
        subtract(volts, multiply(positive, currents[0]!)),
        multiply(subtract(zero, positive), earth),
      );
    };
    const there = scale(add(first[0], second[0]), fault.resistanceOhm);
    for (const seen of [
      voltsFrom([NETWORK.firstSource, NETWORK.firstVolts], 0.4, first),
      voltsFrom([NETWORK.secondSource, NETWORK.secondVolts], 0.6, second),
    ]) {
      expect(magnitude(subtract(seen, there))).toBeLessThan(1e-6 * magnitude(NETWORK.firstVolts));
    }
  });
});
