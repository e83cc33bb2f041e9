import type { ReviewCloud } from '../../contract/review';
import { perPhase, PHASES, type PerPhase, type PhaseName } from '../../protection/phase';
import type { ReviewPlace } from '../../view/review-place';

const COLUMNS = 72;
const ROWS = 48;

type Grid = Pick<ReviewCloud, 'x' | 'y' | 'cells'>;

/** Where the phases lay, collected before the extent of the grid is known. */
export interface Places {
  add(phase: PhaseName, place: ReviewPlace): void;
  /** counts over one grid for all phases, from the least to the greatest of each measure */
  grid(): Grid;
}

export function createPlaces(): Places {
  const found: PerPhase<{ x: number[]; y: number[] }> = perPhase(() => ({ x: [], y: [] }));
  return {
    add(phase, { x, y }) {
      found[phase].x.push(x);
      found[phase].y.push(y);
    },
    grid() {
      const x = axis(
        PHASES.map((phase) => found[phase].x),
        COLUMNS,
      );
      const y = axis(
        PHASES.map((phase) => found[phase].y),
        ROWS,
      );
      if (x === null || y === null) return { x: null, y: null, cells: perPhase(() => []) };
      return { x, y, cells: perPhase((phase) => cells(found[phase], x, y)) };
    },
  };
}

type Axis = NonNullable<Grid['x']>;

function axis(series: readonly (readonly number[])[], count: number): Axis | null {
  let least = Infinity;
  let most = -Infinity;
  for (const values of series)
    for (const value of values) {
      if (value < least) least = value;
      if (value > most) most = value;
    }
  if (least > most) return null;
  // one place, or places that differ by rounding alone, still have a cell to stand in
  const width = Math.max(most - least, Math.max(Math.abs(most), 1) * 1e-6);
  return { least, step: width / count };
}

function cells(
  { x, y }: { x: readonly number[]; y: readonly number[] },
  across: Axis,
  up: Axis,
): [number, number, number][] {
  const counts = new Uint32Array(COLUMNS * ROWS);
  for (let index = 0; index < x.length; index += 1) {
    const column = Math.min(COLUMNS - 1, Math.floor((x[index]! - across.least) / across.step));
    const row = Math.min(ROWS - 1, Math.floor((y[index]! - up.least) / up.step));
    counts[row * COLUMNS + column]! += 1;
  }
  const filled: [number, number, number][] = [];
  counts.forEach((count, index) => {
    if (count > 0) filled.push([index % COLUMNS, Math.floor(index / COLUMNS), count]);
  });
  return filled;
}
