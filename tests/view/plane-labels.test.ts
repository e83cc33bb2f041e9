import { describe, expect, it } from 'vitest';
import { labelPlaces, wordPlace } from '../../src/view/plane-labels';

const BOX = { left: 0, right: 400, top: 0, bottom: 300 };

describe('labels of marks', () => {
  it('marks on one spot get labels that do not touch, joined by leaders', () => {
    const places = labelPlaces(
      [
        { name: 'A', x: 200, y: 150 },
        { name: 'B', x: 200, y: 150 },
        { name: 'C', x: 201, y: 151 },
      ],
      BOX,
    );
    const heights = places.map((place) => place.labelY).sort((one, other) => one - other);
    expect(heights[1]! - heights[0]!).toBeGreaterThanOrEqual(16);
    expect(heights[2]! - heights[1]!).toBeGreaterThanOrEqual(16);
    expect(places.filter((place) => place.leader).length).toBeGreaterThanOrEqual(2);
  });

  it('a mark on its own has its label beside it and no leader', () => {
    const [place] = labelPlaces([{ name: 'A', x: 100, y: 80 }], BOX);
    expect(place).toMatchObject({ labelY: 80, side: 'right', leader: false });
  });

  it('labels keep the order in which their marks stand', () => {
    const places = labelPlaces(
      [
        { name: 'low', x: 100, y: 104 },
        { name: 'high', x: 100, y: 100 },
      ],
      BOX,
    );
    const of = (name: string) => places.find((place) => place.name === name)!.labelY;
    expect(of('high')).toBeLessThan(of('low'));
  });

  it('at the right edge labels stand to the left, at the bottom they stay inside', () => {
    const places = labelPlaces(
      [
        { name: 'A', x: 396, y: 298 },
        { name: 'B', x: 396, y: 299 },
      ],
      BOX,
    );
    expect(places.every((place) => place.side === 'left' && place.labelY <= 300)).toBe(true);
  });

  it('a word goes where no mark is, and nowhere when all places are taken', () => {
    const marks = [{ name: 'A', x: 100, y: 100 }];
    expect(
      wordPlace(
        [
          { x: 110, y: 105 },
          { x: 300, y: 100 },
        ],
        marks,
      ),
    ).toEqual({ x: 300, y: 100 });
    expect(wordPlace([{ x: 110, y: 105 }], marks)).toBeUndefined();
  });
});
