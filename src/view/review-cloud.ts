import type { ReviewCloud } from '../contract/review';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import type { ReviewPlace } from './review-place';

/** A cell of the cloud: its corners in the plane's measures, how many snapshots lay in it, and how dense it is to be drawn. */
export interface CloudCell {
  readonly from: ReviewPlace;
  readonly to: ReviewPlace;
  readonly count: number;
  /** 0 above nothing to 1 for the fullest cell, by the logarithm: a place visited once must still be seen */
  readonly density: number;
}

/** The cells of one phase, or of all of them added up. */
export function cloudCells(
  cloud: Pick<ReviewCloud, 'x' | 'y' | 'cells'>,
  shown: PhaseName | 'all',
): CloudCell[] {
  const { x, y } = cloud;
  if (x === null || y === null) return [];
  const counts = new Map<string, [number, number, number]>();
  for (const phase of PHASES) {
    if (shown !== 'all' && shown !== phase) continue;
    for (const [column, row, count] of cloud.cells[phase]) {
      const known = counts.get(`${column} ${row}`)?.[2] ?? 0;
      counts.set(`${column} ${row}`, [column, row, known + count]);
    }
  }
  const most = Math.max(0, ...[...counts.values()].map(([, , count]) => count));
  return [...counts.values()].map(([column, row, count]) => ({
    from: { x: x.least + column * x.step, y: y.least + row * y.step },
    to: { x: x.least + (column + 1) * x.step, y: y.least + (row + 1) * y.step },
    count,
    density: Math.log1p(count) / Math.log1p(most),
  }));
}

/** How the cloud came about, in a sentence. */
export function cloudWords(cloud: ReviewCloud, period: string): string {
  if (cloud.reason !== null) return `No cloud of ${period}: ${cloud.reason}`;
  const thinned =
    cloud.everyNth === 1
      ? ''
      : `, of which one in ${cloud.everyNth} was computed anew (${cloud.countedCount})`;
  const left =
    cloud.otherConventionCount === 0
      ? ''
      : `; ${cloud.otherConventionCount} judged under another convention are left out`;
  return `Shaded: ${cloud.qualifiedCount} qualified of ${cloud.snapshotCount} snapshots of ${period}${thinned}${left}`;
}
