import { describe, expect, test } from 'vitest';
import { chargingAmps, chargingAmpsPerEnd, chargingMva } from '../../src/protection/charging';

const LINE = { susceptanceMicrosiemensPerKm: 3.4, lengthKm: 80, voltageKv: 230 };

describe('charging', () => {
  test('current and reactive power agree with each other', () => {
    const mvaFromCurrent = (Math.sqrt(3) * LINE.voltageKv * chargingAmps(LINE)) / 1000;
    expect(chargingMva(LINE)).toBeCloseTo(mvaFromCurrent, 10);
  });

  test('grows with length, and is nothing for a line of no length', () => {
    expect(chargingAmps({ ...LINE, lengthKm: 160 })).toBeCloseTo(2 * chargingAmps(LINE), 10);
    expect(chargingAmps({ ...LINE, lengthKm: 0 })).toBe(0);
  });

  test('is carried by both ends in halves', () => {
    expect(2 * chargingAmpsPerEnd(LINE)).toBe(chargingAmps(LINE));
  });
});
