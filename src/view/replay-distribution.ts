import type { Distribution } from '../contract/replay';
import type { LineTable } from './line-table';
import { PHASES, type PhaseName } from './phase';
import type { PhaseLetters } from './site-custom';

/** A point of a curve: utilisation in per cent, share of the evaluated snapshots in per cent. */
export type SharePoint = readonly [utilisation: number, share: number];

const HISTOGRAM_BARS_MOST = 60;
const WIDER = [1, 2, 4, 10, 20] as const;

export const total = (counts: readonly number[]): number => counts.reduce((sum, count) => sum + count, 0);
/** Bin edges as they are written: multiples of the width are not exact. */
const percent = (bin: number, binRatio: number): number => Number((100 * bin * binRatio).toPrecision(10));

/**
 * Which share of the snapshots stood at or above each utilisation. A falling staircase that ends at the last
 * share above zero, so that it can be drawn over a logarithmic scale; empty when nothing was evaluated.
 */
export function shareAtOrAbove(counts: readonly number[], binRatio: number): SharePoint[] {
  const all = total(counts);
  if (all === 0) return [];
  const points: SharePoint[] = [];
  let above = all;
  for (const [bin, count] of counts.entries()) {
    if (above === 0) break;
    points.push([percent(bin, binRatio), (100 * above) / all]);
    above -= count;
  }
  return points;
}

/** The last bin with a count in it, over several distributions; -1 when there is none. */
export const lastBin = (distributions: readonly (readonly number[])[]): number =>
  Math.max(-1, ...distributions.map((counts) => counts.findLastIndex((count) => count > 0)));

/**
 * A histogram as the corners of its outline, in bins wide enough that there are few. `span` is the first and the
 * last bin drawn.
 */
export function histogramOutline(
  counts: readonly number[],
  { binRatio, span }: { binRatio: number; span: readonly [number, number] },
): SharePoint[] {
  const all = total(counts);
  if (all === 0) return [];
  const joined = barWidth(span);
  const first = Math.floor(span[0] / joined) * joined;
  const points: SharePoint[] = [[percent(first, binRatio), 0]];
  for (let bin = first; bin <= span[1]; bin += joined) {
    const share = (100 * total(counts.slice(bin, bin + joined))) / all;
    points.push([percent(bin, binRatio), share], [percent(bin + joined, binRatio), share]);
  }
  const end = points[points.length - 1]!;
  return [...points, [end[0], 0]];
}

/** How many bins are joined to one bar, so that no more than some sixty are drawn. */
export const barWidth = ([first, last]: readonly [number, number]): number =>
  WIDER.find((joined) => (last - first + 1) / joined <= HISTOGRAM_BARS_MOST) ?? 20;

/** From the first to the last bin that holds anything on either side. */
export function spanOf({ recorded, replayed }: Distribution): readonly [number, number] {
  const all = PHASES.flatMap((phase) => [recorded[phase], replayed[phase]]);
  const firsts = all.map((counts) => counts.findIndex((count) => count > 0)).filter((bin) => bin >= 0);
  return [firsts.length === 0 ? 0 : Math.min(...firsts), Math.max(0, lastBin(all))];
}

/** The counts behind the drawing: one row a bin that holds anything. */
export function distributionTable(distribution: Distribution, letters: PhaseLetters): LineTable {
  const { binRatio, recorded, replayed } = distribution;
  const last = recorded.a.length - 1;
  const columnsOf = (phase: PhaseName) => [
    { kind: 'figure' as const, head: `${letters[phase]}, these`, digits: 0 },
    { kind: 'figure' as const, head: `${letters[phase]}, recorded`, digits: 0 },
  ];
  const rows = recorded.a.flatMap((_, bin) => {
    const counts = PHASES.flatMap((phase) => [replayed[phase][bin] ?? 0, recorded[phase][bin] ?? 0]);
    if (total(counts) === 0) return [];
    return [[percent(bin, binRatio), bin === last ? null : percent(bin + 1, binRatio), ...counts]];
  });
  return {
    caption: 'Snapshots by utilisation, per phase, with these settings and with the recorded ones',
    columns: [
      { kind: 'figure', head: 'from, %', digits: 1 },
      { kind: 'figure', head: 'to below, %', digits: 1 },
      ...PHASES.flatMap(columnsOf),
    ],
    rows,
  };
}
