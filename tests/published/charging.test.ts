import { describe, test } from 'vitest';
import {
  chargingAmps,
  chargingAmpsPerEnd,
  chargingMva,
  susceptanceMicrosiemensPerKm,
} from '../../src/protection/charging';
import { expectFigure, printed } from './tolerance';

// P. Kundur, Power System Stability and Control, 1994, tables 6.1 and 6.2, 60 Hz. From memory; the table's own
// reactive powers and surge impedances agree. The current is recomputed from the table's susceptance.
const KUNDUR = [
  { kind: 'overhead', voltageKv: 230, susceptance: 3.371, mva: '0.18', amps: '0.4476' },
  { kind: 'overhead', voltageKv: 345, susceptance: 4.518, mva: '0.54', amps: '0.8999' },
  { kind: 'overhead', voltageKv: 500, susceptance: 5.2, mva: '1.30', amps: '1.5011' },
  { kind: 'paper-insulated cable', voltageKv: 115, susceptance: 230.4, mva: '3.05', amps: '15.297' },
  { kind: 'paper-insulated cable', voltageKv: 230, susceptance: 245.6, mva: '13.0', amps: '32.613' },
  { kind: 'pipe-type cable', voltageKv: 230, susceptance: 298.8, mva: '15.8', amps: '39.678' },
] as const;

// pandapower standard line types (BSD-3), doc/std_types/linetypes.csv, 50 Hz: capacitance as listed there.
const STANDARD_LINE_TYPES = [
  { type: '490-AL1/64-ST1A 110 kV', voltageKv: 110, nanofarads: 9.75, amps: '0.1945' },
  { type: '490-AL1/64-ST1A 220 kV', voltageKv: 220, nanofarads: 10.0, amps: '0.3990' },
  { type: '490-AL1/64-ST1A 380 kV', voltageKv: 380, nanofarads: 11.0, amps: '0.7582' },
  { type: 'N2XS(FL)2Y 1x120 110 kV', voltageKv: 110, nanofarads: 112, amps: '2.2346' },
  { type: 'N2XS(FL)2Y 1x240 110 kV', voltageKv: 110, nanofarads: 135, amps: '2.6935' },
] as const;

// IEEE Reliability Test System, IEEE Trans. PAS-98(6), 1979, 2047–2054, 60 Hz: total B in per unit of 100 MVA.
const RELIABILITY_TEST_SYSTEM = [
  { line: '1–2, cable', voltageKv: 138, miles: 3, perUnit: 0.4611, mva: '46.11', amps: '192.91' },
  { line: '1–3', voltageKv: 138, miles: 55, perUnit: 0.0572, mva: '5.72', amps: '23.931' },
  { line: '11–13', voltageKv: 230, miles: 33, perUnit: 0.0999, mva: '9.99', amps: '25.077' },
  { line: '17–22', voltageKv: 230, miles: 73, perUnit: 0.2212, mva: '22.12', amps: '55.526' },
] as const;

const KM_PER_MILE = 1.609344;

describe('Kundur, tables 6.1 and 6.2', () => {
  test.each(KUNDUR)('$kind at $voltageKv kV charges with $amps A/km and $mva MVA/km', (row) => {
    const line = { susceptanceMicrosiemensPerKm: row.susceptance, lengthKm: 1, voltageKv: row.voltageKv };
    expectFigure(chargingAmps(line), printed(row.amps));
    expectFigure(chargingMva(line), printed(row.mva));
  });
});

describe('pandapower standard line types', () => {
  test.each(STANDARD_LINE_TYPES)('$type charges with $amps A/km', (row) => {
    const susceptance = susceptanceMicrosiemensPerKm(row.nanofarads, 50);
    const line = { susceptanceMicrosiemensPerKm: susceptance, lengthKm: 1, voltageKv: row.voltageKv };
    expectFigure(chargingAmps(line), printed(row.amps));
  });
});

describe('IEEE Reliability Test System', () => {
  test.each(RELIABILITY_TEST_SYSTEM)('line $line charges with $amps A and $mva MVA', (row) => {
    const lengthKm = row.miles * KM_PER_MILE;
    const totalMicrosiemens = ((row.perUnit * 100) / row.voltageKv ** 2) * 1e6;
    const line = {
      susceptanceMicrosiemensPerKm: totalMicrosiemens / lengthKm,
      lengthKm,
      voltageKv: row.voltageKv,
    };
    expectFigure(chargingAmps(line), printed(row.amps));
    expectFigure(chargingMva(line), printed(row.mva));
    expectFigure(2 * chargingAmpsPerEnd(line), printed(row.amps));
  });
});

describe('Stevenson, Elements of Power System Analysis, example 4.2', () => {
  // 220 kV, 60 Hz, 175 mi; conductor 1.108 in across; spacings 20, 20 and 38 ft.
  const equivalentSpacingFt = Math.cbrt(20 * 20 * 38);
  const radiusFt = 1.108 / 2 / 12;
  const faradsPerMetre = (2 * Math.PI * 8.854e-12) / Math.log(equivalentSpacingFt / radiusFt);
  const line = {
    susceptanceMicrosiemensPerKm: susceptanceMicrosiemensPerKm(faradsPerMetre * 1e12, 60),
    voltageKv: 220,
  };

  test('the line charges with 0.6816 A per mile', () => {
    // The book rounds its logarithms to four figures.
    expectFigure(chargingAmps({ ...line, lengthKm: KM_PER_MILE }), { value: 0.6816, tolerance: 0.0007 });
  });

  test('the line charges with 119.3 A over 175 miles', () => {
    expectFigure(chargingAmps({ ...line, lengthKm: 175 * KM_PER_MILE }), { value: 119.3, tolerance: 0.12 });
  });
});
