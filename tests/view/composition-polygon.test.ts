import { describe, expect, it } from 'vitest';
import type { PolygonOnWire } from '../../src/contract/composition';
import { leakageMatters, polygonFit, polygonPicture } from '../../src/view/composition-polygon';
import { polygonWords } from '../../src/view/composition-why';
import { estimate, separatedWith } from './sample-compositions';

const BOX = { width: 320, height: 218 };
const AMPS = { unit: 'amperes', ratingAmps: 800 } as const;
const plain = separatedWith();

/** Mulberry32, so that every run sees the same polygons. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

function someComposition(random: () => number) {
  const phasor = (most: number): [number, number] => {
    const [amps, angle] = [most * random() ** 2, 2 * Math.PI * random()];
    return [amps * Math.cos(angle), amps * Math.sin(angle)];
  };
  const parts = [phasor(40), phasor(6), phasor(60), phasor(30), phasor(10)] as const;
  const total = (at: 0 | 1) => parts.reduce((sum, part) => sum + part[at], 0);
  const polygon: PolygonOnWire = {
    chargingAmps: parts[0],
    leakageAmps: parts[1],
    ratioAmps: parts[2],
    angleAmps: parts[3],
    restAmps: parts[4],
    differentialAmps: [total(0), total(1)],
  };
  return separatedWith({ polygon, leakageAmps: estimate(3, 0.5) });
}

function drawn(composition: ReturnType<typeof separatedWith>) {
  const polygon = composition.polygon!;
  return polygonPicture(polygon, {
    fit: polygonFit([polygon], BOX),
    box: BOX,
    words: polygonWords(composition, AMPS),
  });
}

describe('the polygon', () => {
  it('lays the causes head to tail, and their sum leads from the start to their end', () => {
    const { sides, whole } = drawn(plain);
    sides.slice(1).forEach((side, index) => expect(side.from).toEqual(sides[index]!.to));
    expect(whole.from).toEqual(sides[0]!.from);
    expect(whole.to.x).toBeCloseTo(sides.at(-1)!.to.x, 6);
    expect(whole.to.y).toBeCloseTo(sides.at(-1)!.to.y, 6);
  });

  it('what leads by a quarter turn points up on the screen', () => {
    const [charging] = drawn(plain).sides;
    expect(charging!.to.y).toBeLessThan(charging!.from.y);
    expect(charging!.to.x).toBeCloseTo(charging!.from.x, 6);
  });

  it('two polygons at one scale keep their lengths in proportion', () => {
    const half: PolygonOnWire = {
      chargingAmps: [0, 7],
      leakageAmps: [0, 0],
      ratioAmps: [0, 0],
      angleAmps: [0, 0],
      restAmps: [0, 0],
      differentialAmps: [0, 7],
    };
    const fit = polygonFit([plain.polygon!, half], BOX);
    const height = (polygon: PolygonOnWire) => {
      const [side] = polygonPicture(polygon, { fit, box: BOX, words: {} }).sides;
      return side!.from.y - side!.to.y;
    };
    expect(height(plain.polygon!)).toBeCloseTo(2 * height(half), 0);
  });

  it('leakage that can’t be told from nothing is not named', () => {
    expect(leakageMatters(plain.polygon!, plain.leakageAmps)).toBe(false);
    expect(polygonWords(plain, AMPS)).not.toHaveProperty('leakage');
    const leaking = { ...plain.polygon!, leakageAmps: [9, 0] as [number, number] };
    expect(leakageMatters(leaking, estimate(9, 1))).toBe(true);
    expect(leakageMatters(leaking, null)).toBe(false);
  });

  it('no two labels lie on each other and none leaves the drawing, over 300 polygons', () => {
    const random = seeded(87);
    for (let round = 0; round < 300; round += 1) {
      const { labels } = drawn(someComposition(random));
      const boxes = labels.map(({ x, y, words }) => ({ x, y, halfWidth: words.length * 3, halfHeight: 7.5 }));
      for (const [index, one] of boxes.entries()) {
        expect(one.x - one.halfWidth, `round ${round}`).toBeGreaterThanOrEqual(0);
        expect(one.x + one.halfWidth, `round ${round}`).toBeLessThanOrEqual(BOX.width);
        expect(one.y - one.halfHeight, `round ${round}`).toBeGreaterThanOrEqual(0);
        expect(one.y + one.halfHeight, `round ${round}`).toBeLessThanOrEqual(BOX.height);
        for (const other of boxes.slice(index + 1)) {
          const apart =
            Math.abs(one.x - other.x) >= one.halfWidth + other.halfWidth ||
            Math.abs(one.y - other.y) >= one.halfHeight + other.halfHeight;
          expect(apart, `labels collide in round ${round}`).toBe(true);
        }
      }
    }
  });

  it('a composition without any current draws nothing that is not a number', () => {
    const nothing = Object.fromEntries(
      Object.keys(plain.polygon!).map((name) => [name, [0, 0]]),
    ) as unknown as PolygonOnWire;
    const { sides, labels } = drawn(separatedWith({ polygon: nothing }));
    expect(JSON.stringify(sides)).not.toMatch(/null|NaN/);
    expect(labels).toEqual([]);
  });
});
