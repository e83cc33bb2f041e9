import { describe, expect, it } from 'vitest';
import { planeShape } from '../../src/view/plane-shape';
import { planeWindow } from '../../src/view/plane-window';

const characteristic = {
  kind: 'two-slope',
  pickupAmps: 60,
  slope1: 0.2,
  kneeAmps: 700,
  slope2: 0.6,
  slopeStart: 'from-zero',
} as const;
const near = { extent: 'near the points', emergencyAmps: 1_150, unitAmps: 1 } as const;

describe('the window of the plane', () => {
  it('near the points it still shows where the first slope leaves the pickup', () => {
    const { restraintMax } = planeWindow(characteristic, [{ restraintAmps: 40, differentialAmps: 5 }], near);
    expect(restraintMax).toBeGreaterThan(300);
    expect(restraintMax).toBeLessThan(700);
  });

  it('every point lies inside with room around it', () => {
    const window = planeWindow(characteristic, [{ restraintAmps: 900, differentialAmps: 700 }], near);
    expect(window.restraintMax).toBeGreaterThan(900);
    expect(window.differentialMax).toBeGreaterThan(700);
  });

  it('the whole characteristic reaches past the knee and past the emergency rating', () => {
    const window = planeWindow(characteristic, [], { ...near, extent: 'whole characteristic' });
    expect(window.restraintMax).toBeGreaterThanOrEqual(1.1 * 1_150);
  });

  it('small movements of a point leave the window as it is', () => {
    const at = (restraintAmps: number) =>
      planeWindow(characteristic, [{ restraintAmps, differentialAmps: 20 }], near);
    expect(at(560)).toEqual(at(575));
  });

  it('of an adaptive scheme shows the pickup with room above it', () => {
    const adaptive = { kind: 'adaptive', pickupAmps: 60, ctErrors: [], timeErrorMs: 0 } as const;
    const window = planeWindow(adaptive, [{ restraintAmps: 75, differentialAmps: 8 }], near);
    expect(window.restraintMax).toBeGreaterThanOrEqual(180);
    expect(window.differentialMax).toBeGreaterThanOrEqual(window.restraintMax);
  });

  it('a line without settings and points still has a window', () => {
    const window = planeWindow(undefined, [], near);
    expect(window.restraintMax).toBeGreaterThan(0);
    expect(window.differentialMax).toBeGreaterThan(0);
  });
});

describe('the plane', () => {
  const phase = { differentialAmps: 45, restraintAmps: 450, thresholdAmps: 90, utilisation: 0.5 };
  const silent = { differentialAmps: null, restraintAmps: null, thresholdAmps: null, utilisation: null };
  const line = { phases: { a: phase, b: silent, c: phase }, emergencyRatingAmps: 1_150 };

  it('per unit divides points and threshold by the rating', () => {
    const shape = planeShape(line, {
      characteristic,
      readings: [],
      extent: 'near the points',
      unitAmps: 900,
    });
    expect(shape.points[0]).toEqual({ phase: 'a', restraint: 0.5, differential: 0.05 });
    expect(shape.threshold[0]).toEqual({ restraint: 0, differential: 60 / 900 });
  });

  it('a phase that cannot be computed has no point', () => {
    const shape = planeShape(line, { characteristic, readings: [], extent: 'near the points', unitAmps: 1 });
    expect(shape.points.map((point) => point.phase)).toEqual(['a', 'c']);
  });

  it('the threshold ends at the edge of the window', () => {
    const shape = planeShape(line, { characteristic, readings: [], extent: 'near the points', unitAmps: 1 });
    expect(shape.threshold.at(-1)?.restraint).toBe(shape.window.restraintMax);
  });
});
