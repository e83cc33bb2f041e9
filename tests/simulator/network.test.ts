import { describe, expect, test } from 'vitest';
import { newLineSchema } from '../../src/contract/register';
import { demoLines, demoTruths } from '../../simulator/network/demo-lines';

const chargingAmps = (line: (typeof demoLines)[number]): number =>
  2 *
  Math.PI *
  50 *
  line.capacitanceNfPerKm! *
  1e-9 *
  line.lengthKm *
  ((line.voltageKv * 1000) / Math.sqrt(3));

describe('the invented network', () => {
  test('has 24 lines in 9 substations from 110 to 380 kV', () => {
    expect(demoLines).toHaveLength(24);
    expect(new Set(demoLines.map((line) => line.key)).size).toBe(24);
    expect(new Set(demoLines.flatMap((line) => line.terminals.map((each) => each.substation))).size).toBe(9);
    expect(new Set(demoLines.map((line) => line.voltageKv))).toEqual(new Set([110, 220, 380]));
  });

  test('has four tees, one transformer in a zone, one series capacitor and two lines that only report', () => {
    expect(demoLines.filter((line) => line.terminals.length === 3)).toHaveLength(4);
    expect(demoLines.filter((line) => line.terminals.length === 2)).toHaveLength(20);
    expect(demoLines.filter((line) => line.inZoneTransformer !== null)).toHaveLength(1);
    expect(demoLines.filter((line) => line.seriesCompensated)).toHaveLength(1);
    expect(demoLines.filter((line) => line.goesBy === 'reported')).toHaveLength(2);
    expect(new Set(demoLines.map((line) => line.kind))).toEqual(new Set(['overhead', 'cable', 'mixed']));
  });

  test.each(demoLines.map((line) => [line.key, line] as const))(
    '%s is what the register takes',
    (_, line) => {
      expect(newLineSchema.parse(line)).toEqual(line);
      expect(demoTruths.find((truth) => truth.key === line.key)?.terminals.map((each) => each.key)).toEqual(
        line.terminals.map((terminal) => terminal.key),
      );
    },
  );

  test.each(demoLines.map((line) => [line.key, line] as const))('%s has ratings of the trade', (_, line) => {
    expect(line.ratingAmps).toBeGreaterThanOrEqual(400);
    expect(line.ratingAmps).toBeLessThanOrEqual(2500);
    const emergency = line.emergencyRatingAmps / line.ratingAmps;
    expect(emergency).toBeGreaterThanOrEqual(1.1);
    expect(emergency).toBeLessThanOrEqual(1.3);
  });

  test.each(demoLines.map((line) => [line.key, line] as const))(
    '%s is recorded with characteristics that hold together',
    (_, line) => {
      for (const { characteristic, chargingCompensation } of line.settings) {
        if (characteristic.kind === 'two-slope') {
          const { pickupAmps, slope1, slope2, kneeAmps, slopeStart } = characteristic;
          expect(slope1).toBeGreaterThan(0);
          expect(slope2).toBeGreaterThanOrEqual(slope1);
          expect(slope2).toBeLessThanOrEqual(2);
          if (slopeStart === 'from-zero') expect(kneeAmps).toBeGreaterThanOrEqual(pickupAmps / slope1);
        }
        // a phase comparison has no pickup for the differential current
        if (characteristic.kind === 'phase-comparison') continue;
        const { pickupAmps } = characteristic;
        if (!chargingCompensation) expect(pickupAmps).toBeGreaterThan(1.5 * chargingAmps(line));
        expect(pickupAmps / line.terminals[0]!.ctPrimaryAmps).toBeGreaterThanOrEqual(0.099);
        expect(pickupAmps / line.terminals[0]!.ctPrimaryAmps).toBeLessThanOrEqual(0.25);
      }
    },
  );

  test('records versions in the order in which they came into force', () => {
    for (const { settings } of demoLines) {
      const from = settings.map((version) => version.validFrom);
      expect([...from].sort()).toEqual(from);
    }
    expect(demoLines.some((line) => line.settings.length > 1)).toBe(true);
    expect(demoLines.filter((line) => line.settings[0]?.restraint.kind === 'maximum')).toHaveLength(1);
  });

  // practice: amperes of charging a kilometre, from the capacitances of ordinary conductors at 50 Hz
  test.each([
    { kind: 'overhead', voltageKv: 110, least: 0.15, most: 0.25 },
    { kind: 'overhead', voltageKv: 220, least: 0.35, most: 0.45 },
    { kind: 'overhead', voltageKv: 380, least: 0.7, most: 0.9 },
    { kind: 'cable', voltageKv: 110, least: 2.2, most: 4.6 },
    { kind: 'cable', voltageKv: 220, least: 4.4, most: 9.2 },
  ])('charges a kilometre of $kind at $voltageKv kV with $least to $most A', (row) => {
    const alike = demoLines.filter((line) => line.kind === row.kind && line.voltageKv === row.voltageKv);
    expect(alike.length).toBeGreaterThan(0);
    for (const line of alike) {
      expect(chargingAmps(line) / line.lengthKm).toBeGreaterThanOrEqual(row.least);
      expect(chargingAmps(line) / line.lengthKm).toBeLessThanOrEqual(row.most);
    }
  });
});
