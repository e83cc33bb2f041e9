import { describe, test } from 'vitest';
import { restraintAmpsAtThreshold, thresholdAmps } from '../../src/protection/characteristic';
import { expectFigure } from './tolerance';

// Reference points worked out by hand outside the project from the two definitions of a two-slope
// characteristic: pickup 0.2, slopes 0.3 and 0.7, knee 2.
const SETTINGS = { kind: 'two-slope', pickupAmps: 0.2, slope1: 0.3, kneeAmps: 2, slope2: 0.7 } as const;

const POINTS = [
  { slopeStart: 'from-zero', restraint: 0.5, threshold: 0.2 },
  { slopeStart: 'from-zero', restraint: 1, threshold: 0.3 },
  { slopeStart: 'from-zero', restraint: 2, threshold: 0.6 },
  { slopeStart: 'from-zero', restraint: 3, threshold: 1.3 },
  { slopeStart: 'from-zero', restraint: 5, threshold: 2.7 },
  { slopeStart: 'from-pickup', restraint: 0.5, threshold: 0.35 },
  { slopeStart: 'from-pickup', restraint: 1, threshold: 0.5 },
  { slopeStart: 'from-pickup', restraint: 2, threshold: 0.8 },
  { slopeStart: 'from-pickup', restraint: 3, threshold: 1.5 },
  { slopeStart: 'from-pickup', restraint: 5, threshold: 2.9 },
] as const;

describe('two-slope characteristic', () => {
  test.each(POINTS)('$slopeStart: restraint $restraint meets threshold $threshold', (point) => {
    const characteristic = { ...SETTINGS, slopeStart: point.slopeStart };
    expectFigure(thresholdAmps(characteristic, point.restraint), {
      value: point.threshold,
      tolerance: 1e-12,
    });
  });

  const rising = POINTS.filter((point) => point.threshold > SETTINGS.pickupAmps);
  test.each(rising)('$slopeStart: threshold $threshold is met at restraint $restraint', (point) => {
    const characteristic = { ...SETTINGS, slopeStart: point.slopeStart };
    const restraint = restraintAmpsAtThreshold(characteristic, point.threshold);
    expectFigure(restraint, { value: point.restraint, tolerance: 1e-12 });
  });
});
