import { describe, expect, it } from 'vitest';
import type { SettingsVersion } from '../../src/contract/settings-version';
import { pickupSteps, versionInForce } from '../../src/view/trend-pickup';

const version = (id: number, validFrom: string, pickupAmps: number): SettingsVersion => ({
  id,
  validFrom,
  characteristic: {
    kind: 'two-slope',
    pickupAmps,
    slope1: 0.2,
    kneeAmps: 700,
    slope2: 0.6,
    slopeStart: 'from-zero',
  },
  restraint: { kind: 'scaled-sum', factor: 0.5 },
  chargingCompensation: false,
  note: 'first copy',
  recordedBy: 'Maren Oduya',
  recordedAt: validFrom,
});
const newer = version(2, '2026-02-01T00:00:00.000Z', 60);
const older = version(1, '2025-01-01T00:00:00.000Z', 72);
const window = { fromMs: Date.UTC(2026, 0, 15), toMs: Date.UTC(2026, 1, 15) };

describe('the recorded pickup over time', () => {
  it('each version counts for the time it was in force', () => {
    expect(pickupSteps([newer, older], window)).toEqual([
      { fromMs: window.fromMs, toMs: Date.UTC(2026, 1, 1), pickup: 72 },
      { fromMs: Date.UTC(2026, 1, 1), toMs: window.toMs, pickup: 60 },
    ]);
  });

  it('while a scheme without a pickup was in force there is none', () => {
    const comparing: SettingsVersion = {
      ...newer,
      characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 120 },
      restraint: { kind: 'none' },
    };
    expect(pickupSteps([comparing, older], window)).toEqual([
      { fromMs: window.fromMs, toMs: Date.UTC(2026, 1, 1), pickup: 72 },
    ]);
  });

  it('before the first version there is no pickup', () => {
    expect(pickupSteps([newer], window)).toEqual([
      { fromMs: Date.UTC(2026, 1, 1), toMs: window.toMs, pickup: 60 },
    ]);
  });

  it('per unit divides by the rating', () => {
    expect(pickupSteps([older], window, 720)[0]?.pickup).toBe(0.1);
  });

  it('the version in force is the newest that has begun', () => {
    expect(versionInForce([newer, older], Date.UTC(2026, 0, 20))?.id).toBe(1);
    expect(versionInForce([older, newer], Date.UTC(2026, 2, 1))?.id).toBe(2);
    expect(versionInForce([newer], Date.UTC(2020, 0, 1))).toBeUndefined();
  });
});
