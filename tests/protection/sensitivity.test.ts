import { describe, expect, test } from 'vitest';
import { isComputable } from '../../src/protection/evaluation';
import { phasor } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';
import { resistanceOhm, sensitivity } from '../../src/protection/sensitivity';
import type { Sensitivity } from '../../src/protection/sensitivity';
import { adaptiveScheme, ALPHA_PLANE, PHASE_COMPARISON, TWO_SLOPE } from './schemes';

const NO_LOAD = [phasor(0, 0), phasor(0, 0)];
const LOAD = [phasor(600, 0), phasor(-600, 0)];
const MAXIMUM: Scheme = { ...TWO_SLOPE, restraint: { kind: 'maximum' } };

function seen(scheme: Scheme, currents: readonly Phasor[], fedFrom: 'one end' | 'all ends'): Sensitivity {
  const found = sensitivity(scheme, { currents, fedFrom, voltageKv: 220, frequencyHz: 50 });
  if (!isComputable(found)) throw new Error(found.notComputable);
  return found;
}

describe('sensitivity at no load', () => {
  test('is the pickup of a percentage restraint whose first slope is not reached', () => {
    for (const scheme of [TWO_SLOPE, MAXIMUM]) {
      for (const fedFrom of ['one end', 'all ends'] as const) {
        const { faultAmps, faultResistanceOhm } = seen(scheme, NO_LOAD, fedFrom);
        expect(faultAmps).toBeCloseTo(150, 5);
        expect(faultResistanceOhm).toBeCloseTo(220_000 / Math.sqrt(3) / 150, 4);
      }
    }
  });

  test('of an adaptive restraint counts the errors of the fault current itself', () => {
    // 2.5 % below 1 kA at the second terminal here, and a time error of 0.2 ms: a chord of 0.0628.
    const chord = 2 * Math.sin(Math.PI * 50 * 0.0002);
    expect(seen(adaptiveScheme(2), NO_LOAD, 'one end').faultAmps).toBeCloseTo(120 / (1 - 0.015 - chord), 4);
  });

  test('of an alpha plane is its pickup, since there is no ratio to restrain', () => {
    expect(seen(ALPHA_PLANE, NO_LOAD, 'one end').faultAmps).toBeCloseTo(150, 5);
  });

  test('of a phase comparison needs the release current at both ends', () => {
    expect(seen(PHASE_COMPARISON, NO_LOAD, 'all ends').faultAmps).toBeCloseTo(400, 4);
    expect(seen(PHASE_COMPARISON, NO_LOAD, 'one end')).toMatchObject({
      faultAmps: undefined,
      faultResistanceOhm: undefined,
    });
  });
});

describe('sensitivity under load', () => {
  test('of a percentage restraint is worst where the fault adds to the load', () => {
    // F = 0.3·½·(600 + F + 600), so F = 180/0.85.
    const { faultAmps, worstAngleRad, fedFromIndex } = seen(TWO_SLOPE, LOAD, 'one end');
    expect(faultAmps).toBeCloseTo(180 / 0.85, 4);
    expect([0, Math.PI]).toContainEqual(expect.closeTo(Math.abs(worstAngleRad), 9));
    expect(fedFromIndex).toBe(worstAngleRad === 0 ? 0 : 1);
  });

  test('of an alpha plane is worst at the corner of its region', () => {
    // The local current grows until it is 6 times the load or 97.5° away: |3600∠97.5° − 600| in the corner.
    const corner = Math.hypot(
      3600 * Math.cos((97.5 * Math.PI) / 180) - 600,
      3600 * Math.sin((97.5 * Math.PI) / 180),
    );
    const { faultAmps } = seen(ALPHA_PLANE, LOAD, 'one end');
    expect(faultAmps! / corner).toBeGreaterThan(0.995);
    expect(faultAmps! / corner).toBeLessThan(1.0001);
  });

  test('of a phase comparison fed from one end is not given: in phase with the load nothing turns', () => {
    expect(seen(PHASE_COMPARISON, LOAD, 'one end').faultAmps).toBeUndefined();
  });

  test('is not given where a single angle hides the fault, whichever angle that is', () => {
    const backwards = LOAD.toReversed();
    expect(seen(PHASE_COMPARISON, backwards, 'one end').faultAmps).toBeUndefined();
  });

  test('is never better than at no load for restraint by the sum', () => {
    for (const fedFrom of ['one end', 'all ends'] as const) {
      const loaded = seen(TWO_SLOPE, LOAD, fedFrom).faultAmps!;
      expect(loaded).toBeGreaterThanOrEqual(seen(TWO_SLOPE, NO_LOAD, fedFrom).faultAmps! - 1e-6);
    }
  });
});

describe('sensitivity', () => {
  test('counts a standing differential that opposes the fault', () => {
    const charging = [phasor(0, 20), phasor(0, 20)];
    const { faultAmps, worstAngleRad } = seen(TWO_SLOPE, charging, 'one end');
    expect(faultAmps).toBeCloseTo(190, 4);
    expect(Math.cos(worstAngleRad + Math.PI / 2)).toBeCloseTo(1, 9);
  });

  test('is not told where the scheme stands at its threshold without a fault', () => {
    const reversed = [phasor(600, 0), phasor(600, 0)];
    expect(
      sensitivity(TWO_SLOPE, { currents: reversed, fedFrom: 'one end', voltageKv: 220, frequencyHz: 50 }),
    ).toEqual({ notComputable: 'The scheme already stands at its threshold, without any fault.' });
  });

  test('is not told where the scheme is not computable, with its reason', () => {
    const three = [...LOAD, phasor(0, 0)];
    expect(
      sensitivity(PHASE_COMPARISON, { currents: three, fedFrom: 'one end', voltageKv: 220, frequencyHz: 50 }),
    ).toEqual({ notComputable: 'A phase comparison weighs two terminals’ currents; 3 are there.' });
  });

  test('means a fault resistance at nominal voltage', () => {
    expect(resistanceOhm(110, 635.085)).toBeCloseTo(100, 3);
  });
});
