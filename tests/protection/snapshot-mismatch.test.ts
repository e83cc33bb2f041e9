import { describe, expect, test } from 'vitest';
import { complex, eachPhase, polar } from '../../simulator/plant/complex';
import { twoTerminalFlow } from '../../simulator/plant/line-flow';
import { magnitude, multiply, phasor, scale, subtract, sum } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { snapshotMismatch } from '../../src/protection/snapshot-mismatch';
import { zonePhases } from '../../src/protection/zone';
import type { TerminalPhasors } from '../../src/protection/zone';

const THIRD_RAD = (2 * Math.PI) / 3;
const SECTION = { impedanceOhm: complex(0.6, 3.4), susceptanceS: 3e-3 };
const CHARGING = { susceptanceMillisiemens: 3 };
const ONE = phasor(1, 0);

const ends = eachPhase((phase) =>
  twoTerminalFlow(SECTION, polar(127_000, -phase * THIRD_RAD), polar(500, -0.3 - phase * THIRD_RAD)),
);

/** One end of the plant's line through transformers that measure 1 + e of what flows. */
function measured(end: 0 | 1, e: Phasor, through = 1): TerminalPhasors {
  const [a, b, c] = eachPhase((phase) => {
    const { amps, volts } = ends[phase][end];
    return {
      amps: scale(multiply(sum([ONE, e]), amps), through),
      kv: scale(volts, 1e-3),
    };
  });
  return {
    currents: { a: a.amps, b: b.amps, c: c.amps },
    voltagesKv: { a: a.kv, b: b.kv, c: c.kv },
  };
}

const EXACT = phasor(0, 0);
const OFF = phasor(0.021, -0.008);
/** E = e/(1 + e) = 1 − 1/(1 + e), by the plant's own arithmetic */
const ACTING = subtract(ONE, scale(phasor(1 + OFF.re, -OFF.im), 1 / ((1 + OFF.re) ** 2 + OFF.im ** 2)));

function found(sent: readonly TerminalPhasors[], charging: typeof CHARGING | undefined) {
  const windings = sent.map(() => undefined);
  const uncharged = zonePhases({ windings, charging: CHARGING }, sent);
  const judged = zonePhases({ windings, charging }, sent);
  return snapshotMismatch(uncharged.b, judged.b);
}

describe('the mismatch that one snapshot tells', () => {
  test('is none of two exact terminals, however much charging lies between them', () => {
    expect(magnitude(found([measured(0, EXACT), measured(1, EXACT)], undefined)!)).toBeLessThan(1e-9);
  });

  test('is what the second terminal’s transformers add', () => {
    const mismatch = found([measured(0, EXACT), measured(1, OFF)], undefined)!;
    expect(magnitude(subtract(mismatch, ACTING))).toBeLessThan(1e-9);
  });

  test('acts on the current without its share of charging where the scheme compensates', () => {
    const sent = [measured(0, EXACT), measured(1, OFF)];
    const windings = sent.map(() => undefined);
    const { currents } = zonePhases({ windings, charging: CHARGING }, sent).b;
    const mismatch = found(sent, CHARGING)!;
    expect(magnitude(subtract(multiply(mismatch, currents[1]!), sum(currents)))).toBeLessThan(1e-9);
    expect(magnitude(subtract(mismatch, ACTING))).toBeGreaterThan(1e-4);
  });

  test('can’t be told without a voltage, nor from a terminal that carries nothing', () => {
    const mute = [measured(0, EXACT), measured(1, OFF)].map((sent) => ({ ...sent, voltagesKv: undefined }));
    expect(found(mute, undefined)).toBeUndefined();
    expect(found([measured(0, EXACT), measured(1, EXACT, 0)], undefined)).toBeUndefined();
  });

  test('of three terminals is refused', () => {
    const three = [measured(0, EXACT), measured(1, OFF), measured(1, OFF)];
    expect(() => found(three, undefined)).toThrow(RangeError);
  });
});
