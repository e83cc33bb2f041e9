import { describe, expect, test } from 'vitest';
import type { Scheme } from '../../src/protection/scheme';
import { evaluated } from './evaluated';
import { FAULT_CASES, KINDS, SCHEMES } from './fault-cases';
import type { Kind } from './fault-cases';
import { adaptiveVerdict, alphaPlaneVerdict, phaseComparisonVerdict, twoSlopeVerdict } from './fault-theory';
import type { Ends, Verdict } from './fault-theory';

const productVerdict = (scheme: Scheme, ends: Ends): Verdict =>
  evaluated(scheme, ends).utilisation >= 1 ? 'operates' : 'restrains';

/** Theory's verdict with every level of the settings moved by a factor: one that it changes is too close to call. */
function theoryVerdict(kind: Kind, ends: Ends, factor: number): Verdict {
  switch (kind) {
    case 'two-slope': {
      const { characteristic } = SCHEMES[kind];
      const { pickupAmps, slope1, slope2 } = characteristic;
      const moved = { pickupAmps: factor * pickupAmps, slope1: factor * slope1, slope2: factor * slope2 };
      return twoSlopeVerdict({ ...characteristic, ...moved }, ends);
    }
    case 'adaptive': {
      const { characteristic } = SCHEMES[kind];
      return adaptiveVerdict({ ...characteristic, pickupAmps: factor * characteristic.pickupAmps }, ends);
    }
    case 'alpha-plane': {
      const { pickupAmps, radius, angleDeg } = SCHEMES[kind].characteristic;
      const moved = { pickupAmps: factor * pickupAmps, radius: factor * radius, angleDeg: factor * angleDeg };
      return alphaPlaneVerdict({ kind, ...moved }, ends);
    }
    case 'phase-comparison': {
      const { toleranceDeg, releaseAmps } = SCHEMES[kind].characteristic;
      const moved = { toleranceDeg: factor * toleranceDeg, releaseAmps: factor * releaseAmps };
      return phaseComparisonVerdict({ kind, ...moved }, ends);
    }
  }
}

describe.each(FAULT_CASES)('$what, phase $phase: $because', ({ ends, verdicts }) => {
  test.each(KINDS)('%s does as theory says', (kind) => {
    expect(productVerdict(SCHEMES[kind], ends)).toBe(verdicts[kind]);
  });

  test.each(KINDS)('theory is clear about it for %s', (kind) => {
    for (const factor of [0.9, 1, 1.1]) expect(theoryVerdict(kind, ends, factor)).toBe(verdicts[kind]);
  });
});
