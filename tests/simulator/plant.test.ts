import { describe, expect, test } from 'vitest';
import { demoLines, demoTruths } from '../../simulator/network/demo-lines';
import { createPlant, type LineState } from '../../simulator/plant/plant';

const epochMs = Date.UTC(2026, 2, 2, 9);
const plant = createPlant(demoTruths, { seed: 7, epochMs });
const instants = [0, 7.3, 31, 100.25].map((hours) => epochMs - hours * 3_600_000);
const PHASES = [0, 1, 2] as const;

const trueSum = (state: LineState, phase: 0 | 1 | 2): { re: number; im: number } =>
  state.terminals.reduce(
    (sum, { trueFlow }) => ({ re: sum.re + trueFlow[phase].amps.re, im: sum.im + trueFlow[phase].amps.im }),
    { re: 0, im: 0 },
  );
const wholeLines = demoLines.filter(
  (line) => line.inZoneTransformer === null && line.key !== 'hask-marrow-gate',
);

describe('the plant', () => {
  test('gives the same day for the same seed, and another for another', () => {
    const again = createPlant(demoTruths, { seed: 7, epochMs });
    const other = createPlant(demoTruths, { seed: 8, epochMs });
    const atMs = epochMs - 3_600_000;
    // asked in another order, and after other instants
    again.state('quillby-hask-1', atMs + 999_000);
    expect(again.state('quillby-hask-1', atMs)).toEqual(plant.state('quillby-hask-1', atMs));
    expect(other.state('quillby-hask-1', atMs)).not.toEqual(plant.state('quillby-hask-1', atMs));
  });

  test.each(wholeLines.map((line) => [line.key, line] as const))(
    '%s: true currents sum to the charging of its capacitance at its voltage',
    (key, line) => {
      for (const atMs of instants) {
        const state = plant.state(key, atMs);
        for (const phase of PHASES) {
          const volts = state.terminals.map(({ trueFlow }) => trueFlow[phase].volts);
          const mean = {
            re: volts.reduce((sum, each) => sum + each.re, 0) / volts.length,
            im: volts.reduce((sum, each) => sum + each.im, 0) / volts.length,
          };
          const siemens = 2 * Math.PI * state.frequencyHz * line.capacitanceNfPerKm! * 1e-9 * line.lengthKm;
          const sum = trueSum(state, phase);
          // Charging leads the voltage by a quarter turn. A tee weighs its ends by their sections, the plain mean does not.
          const tolerance = line.terminals.length === 2 ? 0.001 : 0.03;
          const expectedAmps = siemens * Math.hypot(mean.re, mean.im);
          expect(Math.hypot(sum.re + siemens * mean.im, sum.im - siemens * mean.re)).toBeLessThan(
            tolerance * expectedAmps,
          );
        }
      }
    },
  );

  test('has power flow through: far currents leave by about what near ones enter', () => {
    const { terminals } = plant.state('skelder-tarn-head', epochMs);
    const [near, far] = terminals.map(({ trueFlow }) => trueFlow[0].amps);
    expect(near!.re * far!.re + near!.im * far!.im).toBeLessThan(0);
  });

  test('drops voltage along a loaded line', () => {
    const { terminals } = plant.state('low-pell-quillby', epochMs);
    const [near, far] = terminals.map(({ trueFlow }) =>
      Math.hypot(trueFlow[0].volts.re, trueFlow[0].volts.im),
    );
    expect(far).not.toBeCloseTo(near!, -2);
    expect(far! / near!).toBeGreaterThan(0.9);
    expect(far! / near!).toBeLessThan(1.05);
  });

  test('turns and scales the far side of a transformer in the zone by clock number and ratio', () => {
    const { terminals } = plant.state('tarn-head-fennick', epochMs);
    const [near, far] = terminals.map(({ trueFlow }) => trueFlow[0]);
    const ratio = Math.hypot(far!.amps.re, far!.amps.im) / Math.hypot(near!.amps.re, near!.amps.im);
    expect(ratio).toBeGreaterThan(1.9);
    expect(ratio).toBeLessThan(2.1);
    const turn =
      (Math.atan2(far!.volts.im, far!.volts.re) - Math.atan2(near!.volts.im, near!.volts.re)) *
      (180 / Math.PI);
    // clock number 11 puts the far side 30 degrees ahead; the load's angle across the feeder takes some off
    const ahead = ((turn % 360) + 360) % 360;
    expect(ahead).toBeGreaterThan(18);
    expect(ahead).toBeLessThan(30);
  });

  test('keeps every loaded line within its rating, and loads it less at the weekend', () => {
    const meanAmps = (fromMs: number): number => {
      let sum = 0;
      for (let quarter = 0; quarter < 96; quarter++) {
        const { amps } = plant.state('brindle-quillby', fromMs + quarter * 900_000).terminals[0]!;
        const magnitude = Math.hypot(amps[0].re, amps[0].im);
        expect(magnitude).toBeLessThan(600);
        sum += magnitude / 96;
      }
      return sum;
    };
    // a Wednesday and the Sunday after
    expect(meanAmps(Date.UTC(2026, 1, 22))).toBeLessThan(0.95 * meanAmps(Date.UTC(2026, 1, 18)));
  });
});
