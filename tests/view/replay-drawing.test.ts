import { describe, expect, it } from 'vitest';
import type { ReplayPoint } from '../../src/contract/replay';
import type { CharacteristicOnWire } from '../../src/contract/settings-version';
import { regionPicture, thresholdPicture, tickStep } from '../../src/view/replay-drawing';

const room = { width: 440, height: 240, left: 40, bottom: 20, top: 20 };
const slope = (slope1: number): CharacteristicOnWire => ({
  kind: 'two-slope',
  pickupAmps: 100,
  slope1,
  kneeAmps: 1000,
  slope2: 0.6,
  slopeStart: 'from-zero',
});
const point = (change: Partial<ReplayPoint> = {}): ReplayPoint => ({
  at: '2026-03-02T10:00:00.000Z',
  utilisation: 0.5,
  differentialAmps: 60,
  restraintAmps: 500,
  thresholdAmps: 120,
  region: null,
  settingsVersion: null,
  ...change,
});

describe('the drawing of two thresholds', () => {
  it('puts the higher slope above the lower one over the same axes', () => {
    const sides = [0.3, 0.2].map((slope1) => ({ characteristic: slope(slope1), points: [] }));
    const [high, low] = thresholdPicture(sides, room)!.curves;
    expect(high![0]).toEqual(low![0]);
    const [highKnee, lowKnee] = [high!.at(-2)!, low!.at(-2)!];
    expect(highKnee[0]).toBeCloseTo(lowKnee[0], 9);
    expect(highKnee[1]).toBeLessThan(lowKnee[1]);
  });

  it('keeps every point within its room', () => {
    const points = [{ phase: 'a' as const, point: point({ differentialAmps: 4000, restraintAmps: 9000 }) }];
    const drawn = thresholdPicture([{ characteristic: slope(0.3), points }], room)!.points[0]![0]!;
    expect(drawn.at[0]).toBeGreaterThan(room.left);
    expect(drawn.at[0]).toBeLessThan(room.width);
    expect(drawn.at[1]).toBeGreaterThan(room.top);
    expect(drawn.at[1]).toBeLessThan(room.height - room.bottom);
  });

  it('is not made of a scheme that has a region', () => {
    const alpha: CharacteristicOnWire = { kind: 'alpha-plane', pickupAmps: 1, radius: 4, angleDeg: 180 };
    expect(thresholdPicture([{ characteristic: alpha, points: [] }], room)).toBeUndefined();
    expect(regionPicture({ characteristic: slope(0.3), points: [] }, room)).toBeUndefined();
  });
});

describe('the drawing of a region', () => {
  it('places a through current left of the centre, halfway out, and mirrors swapped ends at that ring', () => {
    const alpha: CharacteristicOnWire = { kind: 'alpha-plane', pickupAmps: 1, radius: 4, angleDeg: 180 };
    const at = (ratio: number) => {
      const region = { kind: 'alpha-plane' as const, ratio, angleDeg: 180 };
      const { centre, radius, points } = regionPicture(
        { characteristic: alpha, points: [{ phase: 'a', point: point({ region }) }] },
        room,
      )!;
      return (centre[0] - points[0]!.at[0]) / radius;
    };
    expect(at(1)).toBeCloseTo(0.5, 9);
    expect(at(2) - at(1)).toBeCloseTo(at(1) - at(1 / 2), 9);
  });
});

describe('the ticks of an axis', () => {
  it.each([
    [1000, 200],
    [950, 200],
    [310, 100],
    [42, 10],
    [3, 1],
  ])('part %d in steps of %d', (span, step) => {
    expect(tickStep(span, 5)).toBe(step);
  });
});
