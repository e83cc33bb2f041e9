import { describe, expect, it } from 'vitest';
import { cloudCells, cloudWords } from '../../src/view/review-cloud';
import { fromOpposition, reviewPlace } from '../../src/view/review-place';
import { alphaPolar, discWindow, sectorPolar, WHOLE_DISC } from '../../src/view/review-polar';
import { pathPieces } from '../../src/view/review-region';
import { cloudTable } from '../../src/view/review-tables';
import { SITE } from './sample-lines';

const CLOUD = {
  line: 'x',
  from: '2026-11-30T00:00:00.000Z',
  to: '2026-12-01T00:00:00.000Z',
  settingsVersion: 1,
  plane: 'restraint' as const,
  reason: null,
  snapshotCount: 50,
  qualifiedCount: 40,
  otherConventionCount: 4,
  everyNth: 1,
  countedCount: 36,
  x: { least: 100, step: 10 },
  y: { least: 4, step: 0.5 },
  cells: {
    a: [[0, 0, 9] as [number, number, number]],
    b: [[0, 0, 1] as [number, number, number]],
    c: [[2, 1, 1] as [number, number, number]],
  },
};

describe('the cloud', () => {
  it('adds up the phases in one grid, and shows one of them alone', () => {
    expect(cloudCells(CLOUD, 'all').map(({ count }) => count)).toEqual([10, 1]);
    expect(cloudCells(CLOUD, 'b').map(({ count }) => count)).toEqual([1]);
  });

  it('the fullest cell is drawn fully and a single snapshot can still be seen', () => {
    const [full, single] = cloudCells(CLOUD, 'all');
    expect(full?.density).toBe(1);
    expect(single?.density).toBeGreaterThan(0.2);
  });

  it('a cell spans a step of each measure', () => {
    expect(cloudCells(CLOUD, 'c')[0]).toMatchObject({ from: { x: 120, y: 4.5 }, to: { x: 130, y: 5 } });
  });

  it('says what was counted and what was left out', () => {
    expect(cloudWords(CLOUD, 'the last 24 h')).toBe(
      'Shaded: 40 qualified of 50 snapshots of the last 24 h; 4 judged under another convention are left out',
    );
    expect(cloudWords({ ...CLOUD, everyNth: 3, otherConventionCount: 0 }, 'the last 24 h')).toContain(
      'one in 3 was computed anew (36)',
    );
    expect(cloudWords({ ...CLOUD, reason: 'No snapshot of this period qualified.' }, 'the last hour')).toBe(
      'No cloud of the last hour: No snapshot of this period qualified.',
    );
  });

  it('its table has the fullest cell first, with the convention in every row', () => {
    const table = cloudTable(CLOUD, { letters: SITE.phaseLetters, convention: 'two-slope' });
    expect(table?.rows[0]).toEqual(['L1', 100, 110, 4, 4.5, 9, 'two-slope']);
  });
});

describe('a place on a plane', () => {
  const shared = {
    differentialAmps: 8,
    restraintAmps: undefined,
    thresholdAmps: undefined,
    utilisation: 0.1,
  };
  const phasors = [
    { re: 300, im: 0 },
    { re: -290, im: 0 },
  ];

  it('of the alpha plane is the logarithm of |k| and the angle from 180°', () => {
    const region = { kind: 'alpha-plane' as const, ratio: Math.E, angleRad: -Math.PI + 0.1 };
    const place = reviewPlace({ ...shared, region }, phasors);
    expect(place?.x).toBeCloseTo(1, 12);
    expect(place?.y).toBeCloseTo((0.1 * 180) / Math.PI, 12);
  });

  it('of a phase comparison is the smaller current and the deviation', () => {
    const region = { kind: 'phase-comparison' as const, deviationRad: Math.PI / 6 };
    const place = reviewPlace({ ...shared, region }, phasors);
    expect(place?.x).toBe(290);
    expect(place?.y).toBeCloseTo(30, 12);
  });

  it('is none where a current is too small to have one', () => {
    expect(reviewPlace({ ...shared, region: undefined }, phasors)).toBeUndefined();
  });

  it('either side of 180° is told by the sign', () => {
    expect(fromOpposition(Math.PI)).toBe(0);
    expect(fromOpposition(Math.PI - 0.2)).toBeCloseTo(-0.2, 12);
    expect(fromOpposition(-Math.PI + 0.2)).toBeCloseTo(0.2, 12);
  });
});

describe('a plane in a disc', () => {
  const alpha = alphaPolar({ radius: 6, angleDeg: 195 });

  it('a through current lies at the left, half way out', () => {
    const place = alpha.place({ x: 0, y: 0 });
    expect(place.x).toBeCloseTo(-0.5, 12);
    expect(place.y).toBeCloseTo(0, 12);
  });

  it('swapping the ends mirrors the distance about |k| = 1', () => {
    const [out, back] = [alpha.place({ x: 0.8, y: 0 }), alpha.place({ x: -0.8, y: 0 })];
    expect(-out.x - 0.5).toBeCloseTo(0.5 + back.x, 12);
  });

  it('what lies beyond the edge is drawn on it', () => {
    expect(alpha.place({ x: 50, y: 0 }).x).toBeCloseTo(-1, 12);
  });

  it('the region’s border is where |k| is the radius and the angle half the opening', () => {
    const corner = alpha.place({ x: Math.log(6), y: -97.5 });
    expect(alpha.restrains[0]?.x).toBeCloseTo(corner.x, 12);
    expect(alpha.restrains[0]?.y).toBeCloseTo(corner.y, 12);
  });

  it('of a phase comparison has opposed currents at the left and its upper half alone', () => {
    const sector = sectorPolar({ toleranceDeg: 60, releaseAmps: 100 }, 1000);
    expect(sector.place({ x: 500, y: 0 }).x).toBeCloseTo(-0.5, 12);
    expect(sector.place({ x: 500, y: 90 }).y).toBeCloseTo(0.5, 12);
    expect(sector.restrains.every(({ y }) => y > -1e-9)).toBe(true);
  });

  it('a window around points holds them with room, and is the whole disc where there are none', () => {
    const { middle, half } = discWindow([
      { x: -0.5, y: 0 },
      { x: -0.48, y: 0.04 },
    ]);
    expect(middle.x - half).toBeLessThan(-0.5);
    expect(middle.y + half).toBeGreaterThan(0.04);
    expect(discWindow([])).toBe(WHOLE_DISC);
  });

  it('a predicted path is broken where it leaps across the plane', () => {
    const point = (ratio: number, angleRad: number) => ({
      differentialAmps: 1,
      restraintAmps: undefined,
      thresholdAmps: undefined,
      utilisation: 0.1,
      region: { kind: 'alpha-plane' as const, ratio, angleRad },
      throughAmps: 1,
      lagRad: 0,
    });
    const path = [point(1, 0), point(1, 3), point(1, 3.1)];
    expect(pathPieces({ path }, alpha).map((piece) => piece.length)).toEqual([1, 2]);
  });
});
