import type { LineSummary } from '../../src/contract/lines';
import type { Creep, Warning } from '../../src/contract/warning';
import type { SiteCustom } from '../../src/view/site-custom';

export const AT = '2026-12-01T13:32:08.000Z';
export const AT_MS = Date.parse(AT);

export const SITE: SiteCustom = {
  phaseLetters: { a: 'L1', b: 'L2', c: 'L3' },
  timeZone: 'Europe/Berlin',
  nearRatio: 0.7,
};

export const NOTHING_COMPUTED = {
  differentialAmps: null,
  restraintAmps: null,
  thresholdAmps: null,
  utilisation: null,
};

export const phaseAt = (utilisation: number, thresholdAmps = 100) => ({
  differentialAmps: utilisation * thresholdAmps,
  restraintAmps: 400,
  thresholdAmps,
  utilisation,
});

export function lineWith(change: Partial<LineSummary> = {}): LineSummary {
  return {
    key: 'skelder-hask',
    name: 'Skelder – Hask',
    substations: [
      { key: 'skelder', name: 'Skelder' },
      { key: 'hask', name: 'Hask' },
    ],
    voltageKv: 110,
    kind: 'overhead',
    lengthKm: 18.4,
    goesBy: 'phasors',
    ratingAmps: 800,
    emergencyRatingAmps: 960,
    owner: null,
    seriesCompensated: false,
    inZoneTransformer: null,
    pickupAmps: 60,
    chargingAmps: 6,
    at: AT,
    condition: 'settled',
    reason: null,
    phases: { a: phaseAt(0.1), b: phaseAt(0.2), c: phaseAt(0.15) },
    throughAmps: 400,
    throughRatio: 0.5,
    compensation: 'none',
    settingsVersion: 1,
    lastDay: { a: null, b: null, c: null },
    dailyLevels: [],
    creep: [],
    warnings: [],
    ...change,
  };
}

export const blindLine = (change: Partial<LineSummary> = {}): LineSummary =>
  lineWith({
    condition: 'blind',
    reason: 'Hask has sent nothing.',
    phases: { a: NOTHING_COMPUTED, b: NOTHING_COMPUTED, c: NOTHING_COMPUTED },
    throughAmps: null,
    throughRatio: null,
    ...change,
  });

export function warningWith(change: Partial<Warning> = {}): Warning {
  return {
    id: 1,
    line: 'skelder-hask',
    lineName: 'Skelder – Hask',
    kind: 'near',
    state: 'unacknowledged',
    cause: {
      basis: 'utilisation',
      phase: 'c',
      utilisation: 0.76,
      limit: 0.7,
      differentialAmps: 46,
      thresholdAmps: 61,
    },
    openedAt: '2026-12-01T13:28:08.000Z',
    returnedAt: null,
    acknowledgedAt: null,
    acknowledgedBy: null,
    note: null,
    changedAt: '2026-12-01T13:28:08.000Z',
    ...change,
  };
}

export const CREEP: Creep = {
  phase: 'b',
  verdict: 'creep',
  slopeAmpsPerMonth: 3.4,
  slopeLowAmpsPerMonth: 2.9,
  slopeHighAmpsPerMonth: 3.9,
  pTwoSided: 0.0004,
  days: 60,
  levelNowAmps: 38,
  near: { earliest: '2026-12-28', likely: '2027-01-19', latest: '2027-03-04' },
  pickup: { earliest: '2027-05-01', likely: '2027-06-19', latest: null },
};
