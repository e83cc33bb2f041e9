import type { Characteristic } from '../../src/protection/characteristic';
import type { Scheme } from '../../src/protection/scheme';

/** An adaptive scheme for as many terminals, with errors of their own at each. */
export function adaptiveScheme(terminalCount: number): Scheme {
  return {
    characteristic: {
      kind: 'adaptive',
      pickupAmps: 120,
      ctErrors: Array.from({ length: terminalCount }, (_, index) => ({
        terminal: `t${index}`,
        errorBelow: 0.01 + 0.005 * index,
        errorAbove: 0.08 + 0.01 * index,
        limitAmps: 900 + 100 * index,
      })),
      timeErrorMs: 0.2,
    },
    restraint: { kind: 'error-sum' },
  };
}

export const ALPHA_PLANE: Scheme = {
  characteristic: { kind: 'alpha-plane', pickupAmps: 150, radius: 6, angleDeg: 195 },
  restraint: { kind: 'none' },
};

export const PHASE_COMPARISON: Scheme = {
  characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 200 },
  restraint: { kind: 'none' },
};

export const TWO_SLOPE: Scheme = {
  characteristic: {
    kind: 'two-slope',
    pickupAmps: 150,
    slope1: 0.3,
    kneeAmps: 2000,
    slope2: 0.7,
    slopeStart: 'from-zero',
  },
  restraint: { kind: 'scaled-sum', factor: 0.5 },
};

/** The scheme with every current of its settings times a factor. */
export function scaledScheme({ characteristic, restraint }: Scheme, factor: number): Scheme {
  return { characteristic: scaled(characteristic, factor), restraint };
}

function scaled(characteristic: Characteristic, factor: number): Characteristic {
  switch (characteristic.kind) {
    case 'two-slope': {
      const { pickupAmps, kneeAmps } = characteristic;
      return { ...characteristic, pickupAmps: factor * pickupAmps, kneeAmps: factor * kneeAmps };
    }
    case 'adaptive':
      return {
        ...characteristic,
        pickupAmps: factor * characteristic.pickupAmps,
        ctErrors: characteristic.ctErrors.map((each) => ({ ...each, limitAmps: factor * each.limitAmps })),
      };
    case 'alpha-plane':
      return { ...characteristic, pickupAmps: factor * characteristic.pickupAmps };
    case 'phase-comparison':
      return { ...characteristic, releaseAmps: factor * characteristic.releaseAmps };
  }
}
