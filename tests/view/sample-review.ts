import type { TerminalResult } from '../../src/contract/result';
import type { SettingsVersion } from '../../src/contract/settings-version';
import type { ReviewCompositions } from '../../src/view/review-composition';
import type { ReviewLine } from '../../src/view/review-line';

/** A two-terminal line of 110 kV with 5P transformers at both ends. */
export function reviewLine(change: Partial<ReviewLine> = {}): ReviewLine {
  return {
    key: 'skelder-hask',
    voltageKv: 110,
    ratingAmps: 800,
    emergencyRatingAmps: 960,
    lengthKm: 71,
    capacitanceNfPerKm: 9,
    leastInternalFaultAmps: 620,
    goesBy: 'phasors',
    seriesCompensated: false,
    inZoneTransformer: null,
    nominalFrequencyHz: 50,
    dayThroughAmps: 400,
    terminals: ['skelder', 'hask'].map((key, position) => ({
      key,
      position,
      substation: key,
      substationName: key === 'skelder' ? 'Skelder' : 'Hask',
      ctPrimaryAmps: 800,
      ctClass: '5P20',
      inService: true,
    })),
    ...change,
  };
}

/** Before the levels of any phase have been looked at. */
export const NO_COMPOSITIONS: ReviewCompositions = { a: undefined, b: undefined, c: undefined };

type Recorded = Pick<SettingsVersion, 'characteristic' | 'restraint' | 'chargingCompensation'>;

export const TWO_SLOPE: Recorded = {
  characteristic: {
    kind: 'two-slope',
    pickupAmps: 60,
    slope1: 0.2,
    kneeAmps: 700,
    slope2: 0.6,
    slopeStart: 'from-zero',
  },
  restraint: { kind: 'scaled-sum', factor: 0.5 },
  chargingCompensation: false,
};
export const ALPHA: Recorded = {
  characteristic: { kind: 'alpha-plane', pickupAmps: 60, radius: 6, angleDeg: 195 },
  restraint: { kind: 'none' },
  chargingCompensation: false,
};
export const COMPARISON: Recorded = {
  characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 100 },
  restraint: { kind: 'none' },
  chargingCompensation: false,
};

const SHIFT = { a: 0, b: -120, c: 120 };

/** What one terminal sent: symmetrical currents and voltages, angles of phase a in degrees. */
export function terminalSaying(
  key: string,
  [amps, angleDeg]: readonly [number, number],
  change: Partial<TerminalResult> = {},
): TerminalResult {
  const three = (value: number, angle: number): NonNullable<TerminalResult['current']> => ({
    a: [value, angle + SHIFT.a],
    b: [value, angle + SHIFT.b],
    c: [value, angle + SHIFT.c],
  });
  return {
    key,
    present: true,
    current: three(amps, angleDeg),
    voltage: three(110 / Math.sqrt(3), 0),
    frequencyHz: 50,
    breaker: 'closed',
    clock: { source: 'satellite', error_us: 1 },
    channel: null,
    validity: 'good',
    test: false,
    ...change,
  };
}
