import type { CompositionOnWire } from '../../src/contract/composition';
import type { StandingVerdict } from '../../src/contract/standing';
import type { MismatchOnWire, SeparatedOnWire } from '../../src/view/composition-words';
import { AT, CREEP } from './sample-lines';

export const estimate = (value: number, half: number) => ({ value, low: value - half, high: value + half });

export const mismatchWith = (change: Partial<MismatchOnWire> = {}): MismatchOnWire => ({
  terminal: 'hask',
  against: 'skelder',
  ratio: estimate(0.049, 0.003),
  ratioBudget: 'beyond',
  angleDeg: estimate(-0.52, 0.08),
  angleBudget: 'within',
  asymmetryMs: estimate(-0.058, 0.009),
  ...change,
});

/** Charging upwards, ratio to the right, a little angle and rest: 12 + 27 − 5j … as on the sketch. */
export const separatedWith = (change: Partial<SeparatedOnWire> = {}): SeparatedOnWire => ({
  kind: 'separated',
  from: '2026-11-01',
  to: '2026-12-01',
  days: 30,
  snapshotCount: 1980,
  polygon: {
    chargingAmps: [0, 14],
    leakageAmps: [0.1, 0],
    ratioAmps: [27, 2],
    angleAmps: [1, 5],
    restAmps: [2, 2],
    differentialAmps: [30.1, 23],
  },
  chargingAmps: estimate(14, 0.8),
  expectedChargingAmps: 13.8,
  leakageAmps: estimate(0.1, 0.4),
  // at 110 kV between phases
  admittance: { leftMillisiemens: [0.0016, 0.2204], compensatedMillisiemens: 0 },
  mismatches: [mismatchWith()],
  residualRmsAmps: 0.8,
  condition: 41.6,
  ...change,
});

export const notSeparable: CompositionOnWire = {
  kind: 'not separable',
  from: '2026-11-01',
  to: '2026-12-01',
  days: 4,
  snapshotCount: 800,
  reason: 'Four days can’t be told from chance; seven are needed.',
};

export const verdictWith = (change: Partial<StandingVerdict> = {}): StandingVerdict => ({
  line: 'skelder-hask',
  phase: 'b',
  computedAt: AT,
  levelAmps: 38,
  pickupAmps: 60,
  shareOfPickup: 0.63,
  expectedAmps: 15,
  utilisationP95: 0.4,
  emergencyUtilisation: 0.58,
  composition: separatedWith(),
  compositionBefore: separatedWith({
    chargingAmps: estimate(14.1, 0.9),
    mismatches: [mismatchWith({ ratio: estimate(0.02, 0.003) })],
  }),
  creep: CREEP,
  creepAtReference: {
    creep: { ...CREEP, slopeAmpsPerMonth: 0.9, slopeLowAmpsPerMonth: 0.6, slopeHighAmpsPerMonth: 1.2 },
    referenceThroughAmps: 412,
  },
  loadTakenOutBy: 'composition',
  measuredCounts: false,
  loadDependence: null,
  emergencyCreep: null,
  marks: [],
  driftSince: null,
  step: null,
  likelyCause: 'ratio mismatch',
  causePlace: { terminal: 'hask', against: null },
  causeIsTime: false,
  near: { earliest: '2027-03-04', likely: '2027-04-20', latest: '2027-06-11' },
  pickup: { earliest: '2028-01-04', likely: '2028-06-20', latest: null },
  ...change,
});
