import type { MarginScatter } from '../contract/margins';
import type { LineTable } from './line-table';
import type { PhaseName } from './phase';
import type { PhaseLetters } from './site-custom';

/** A phase in the scatter: shares of its pickup, as ratios. */
export interface ScatterPoint {
  readonly key: string;
  readonly lineName: string;
  readonly phase: PhaseName;
  readonly chargingShare: number;
  readonly mismatchShare: number;
  readonly shareOfPickup: number | null;
}

/** The points to draw: of each line the phase whose two causes reach furthest together, or all of them. */
export function scatterPoints(scatter: MarginScatter, which: 'worst' | 'all'): ScatterPoint[] {
  const points = scatter.points.map(([place, phase, chargingShare, mismatchShare, shareOfPickup]) => {
    const [key, lineName] = scatter.lines[place]!;
    return { key, lineName, phase, chargingShare, mismatchShare, shareOfPickup };
  });
  if (which === 'all') return points;
  const worst = new Map<string, ScatterPoint>();
  for (const point of points) {
    const known = worst.get(point.key);
    if (known === undefined || reach(point) > reach(known)) worst.set(point.key, point);
  }
  return [...worst.values()];
}

/** Both causes at right angles, as they stand at a power factor of one; a share of the pickup. */
export const reach = ({ chargingShare, mismatchShare }: ScatterPoint): number =>
  Math.hypot(chargingShare, mismatchShare);

/** The figures behind the scatter, those that reach furthest first; each leads to its line, as its point does. */
export function scatterTable(points: readonly ScatterPoint[], letters: PhaseLetters): LineTable {
  const furthestFirst = points.toSorted((one, other) => reach(other) - reach(one));
  return {
    caption: 'Charging and mismatch as shares of the pickup, %',
    columns: [
      { kind: 'text', head: 'line' },
      { kind: 'text', head: 'phase' },
      { kind: 'figure', head: 'charging, % of pickup', digits: 1 },
      { kind: 'figure', head: 'mismatch, % of pickup', digits: 1 },
      { kind: 'figure', head: 'standing level, % of pickup', digits: 1 },
    ],
    rows: furthestFirst.map((point) => [
      point.lineName,
      letters[point.phase],
      100 * point.chargingShare,
      100 * point.mismatchShare,
      point.shareOfPickup === null ? null : 100 * point.shareOfPickup,
    ]),
    links: furthestFirst.map(({ key }) => `/lines/${key}`),
  };
}

/** The end of both axes: a round share that holds every point and the near mark. */
export function scatterMax(points: readonly ScatterPoint[], nearRatio: number): number {
  const furthest = points.reduce(
    (most, { chargingShare, mismatchShare }) => Math.max(most, chargingShare, mismatchShare),
    nearRatio,
  );
  return Math.ceil(furthest * 10.5) / 10;
}

/** A quarter circle of a share, from one axis to the other. */
export function quarterCircle(share: number): [number, number][] {
  const steps = 32;
  return Array.from({ length: steps + 1 }, (_, step) => {
    const angle = (step / steps) * (Math.PI / 2);
    return [share * Math.cos(angle), share * Math.sin(angle)];
  });
}
