import { describe, expect, test } from 'vitest';
import { add, complex, eachPhase, polar, type Three } from '../../simulator/plant/complex';
import { type TerminalFlow, twoTerminalFlow } from '../../simulator/plant/line-flow';
import { farSide } from '../../simulator/plant/transformer';
import { evaluation, isComputable } from '../../src/protection/evaluation';
import { PHASES } from '../../src/protection/phase';
import { magnitude, scale, sum } from '../../src/protection/phasor';
import { zonePhases, zoneProblems, zoneWindings } from '../../src/protection/zone';
import type { TerminalPhasors, Zone } from '../../src/protection/zone';
import { TWO_SLOPE } from './schemes';

const THIRD_RAD = (2 * Math.PI) / 3;
const SECTION = { impedanceOhm: complex(0.6, 3.4), susceptanceS: 3e-3 };
const SUSCEPTANCE = { susceptanceMillisiemens: 3 };
const TRANSFORMER = {
  otherVoltageKv: 110,
  clockNumber: 5,
  otherTerminals: ['mill'],
  removesZeroSequence: { line: true, other: true },
};

const ends = eachPhase((phase) =>
  twoTerminalFlow(SECTION, polar(127_000, -phase * THIRD_RAD), polar(500, -0.3 - phase * THIRD_RAD)),
);
const NEAR: Three<TerminalFlow> = eachPhase((phase) => ends[phase][0]);
const FAR: Three<TerminalFlow> = eachPhase((phase) => ends[phase][1]);
/** What the π draws in all: its susceptance on the mean of both ends' voltages. */
const CHARGING_AMPS = SECTION.susceptanceS * (magnitude(add(NEAR[0].volts, FAR[0].volts)) / 2);
const TRANSFORMER_TRUTH = { ratio: 2, clockNumber: 5 };
const BEHIND = farSide(FAR, TRANSFORMER_TRUTH);
const turnedRound = (flows: Three<TerminalFlow>): Three<TerminalFlow> =>
  eachPhase((phase) => ({ ...flows[phase], amps: scale(flows[phase].amps, -1) }));

function measured([a, b, c]: Three<TerminalFlow>): TerminalPhasors {
  return {
    currents: { a: a.amps, b: b.amps, c: c.amps },
    voltagesKv: { a: scale(a.volts, 1e-3), b: scale(b.volts, 1e-3), c: scale(c.volts, 1e-3) },
  };
}

const left = (zone: Zone, terminals: readonly TerminalPhasors[]) => {
  const phases = zonePhases(zone, terminals);
  return PHASES.map((phase) => magnitude(sum(phases[phase].currents)));
};

describe('zone', () => {
  const windings = zoneWindings(['hask', 'mill'], { voltageKv: 220, transformer: TRANSFORMER });

  test('without transformer and compensation is what was measured', () => {
    const terminals = [measured(NEAR), measured(FAR)];
    const plain = zoneWindings(['hask', 'mill'], { voltageKv: 220, transformer: undefined });
    const phases = zonePhases({ windings: plain, charging: undefined }, terminals);
    expect(phases.b).toEqual({
      currents: terminals.map(({ currents }) => currents.b),
      compensation: undefined,
    });
  });

  test('with a transformer at its far end is left with the charging alone', () => {
    const terminals = [measured(NEAR), measured(BEHIND)];
    for (const amps of left({ windings, charging: undefined }, terminals))
      expect(amps).toBeCloseTo(CHARGING_AMPS, 8);
  });

  test('compensates by the voltages of the line, and leaves those behind the transformer aside', () => {
    const terminals = [measured(NEAR), measured(BEHIND)];
    const zone = { windings, charging: SUSCEPTANCE };
    expect(zonePhases(zone, terminals).a.compensation).toMatchObject({ voltageCount: 1 });
    // One end's voltage stands for the mean: what is left is the susceptance on half the drop along the line.
    for (const amps of left(zone, terminals)) expect(amps).toBeLessThan(4);
  });

  test('falls back visibly when only the voltage behind the transformer is there', () => {
    const terminals = [{ ...measured(NEAR), voltagesKv: undefined }, measured(BEHIND)];
    const zone = { windings, charging: SUSCEPTANCE };
    expect(zonePhases(zone, terminals).c.compensation).toEqual({
      state: 'fallback',
      reason: 'The charging current is not compensated, because no terminal gives a valid voltage.',
    });
    for (const amps of left(zone, terminals)) expect(amps).toBeCloseTo(CHARGING_AMPS, 8);
  });

  test('restrains for an earth fault behind the line’s end only with zero sequence removed there', () => {
    // What the transformer's earthed star point feeds back through the line has no counterpart behind it.
    const line = eachPhase((phase) => ({
      ...NEAR[phase],
      amps: add(polar(500, -phase * THIRD_RAD), complex(1000, 0)),
    }));
    const terminals = [measured(line), measured(farSide(turnedRound(line), TRANSFORMER_TRUTH))];
    const utilisations = (removesOnLine: boolean) => {
      const removesZeroSequence = { line: removesOnLine, other: true };
      const transformer = { ...TRANSFORMER, removesZeroSequence };
      const phases = zonePhases(
        { windings: zoneWindings(['hask', 'mill'], { voltageKv: 220, transformer }), charging: undefined },
        terminals,
      );
      return PHASES.map((phase) => evaluation(TWO_SLOPE, phases[phase].currents, { frequencyHz: 50 }));
    };
    for (const found of utilisations(true))
      expect(found).toMatchObject({ utilisation: expect.closeTo(0, 9) });
    for (const found of utilisations(false)) {
      expect(found).toMatchObject({ differentialAmps: expect.closeTo(1000, 6) });
      expect(isComputable(found) && found.utilisation).toBeGreaterThan(1);
    }
  });

  test('is refused for terminals that do not pair with its windings', () => {
    expect(() => zonePhases({ windings, charging: undefined }, [measured(NEAR)])).toThrow(RangeError);
  });
});

describe('zone problems', () => {
  test('are none for up to six terminals', () => {
    expect(zoneProblems({ windings: Array(6).fill(undefined), charging: SUSCEPTANCE })).toEqual([]);
  });

  test('come all at once, each by its place', () => {
    const broken = { ratio: 0, clockNumber: 3, zeroSequence: 'kept' } as const;
    const windings = [undefined, broken, ...Array(5).fill(undefined)];
    expect(zoneProblems({ windings, charging: { susceptanceMillisiemens: undefined } })).toEqual([
      { field: 'windings.1.ratio', problem: 'The ratio must be a number above 0.' },
      { field: 'windings', problem: 'A line has at most 6 terminals; this one has 7.' },
      {
        field: 'charging',
        problem: 'The charging current can be compensated only when the line’s capacitance is recorded.',
      },
    ]);
  });
});
