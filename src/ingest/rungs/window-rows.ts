import type { PhaseName } from '../../protection/phase';
import { type CompositionSums, shapeOf, snapshotCount, totalOf } from '../../standing/composition-sums';
import { packSums, unpackSums } from '../../store/composition-packing';
import { groupedBy } from '../../store/grouped';
import type { LevelRow } from '../../store/levels';
import { unpackMeasurements } from '../../store/packing';
import type { SnapshotRow } from '../../store/snapshots';
import type { RosterLine } from '../roster';
import { qualification, rungRows, rungStart } from './rung';
import { snapshotSums } from './snapshot-sums';

/** Raw rows in ascending order, parted where the window of their rung changes. */
export function rowsByWindow(rung: 'minute' | 'hour', rows: readonly SnapshotRow[]): SnapshotRow[][] {
  const windows: SnapshotRow[][] = [];
  let startMs: number | undefined;
  for (const row of rows) {
    const rowStartMs = rungStart(rung, row.at.getTime());
    if (rowStartMs === startMs) windows.at(-1)!.push(row);
    else windows.push([row]);
    startMs = rowStartMs;
  }
  return windows;
}

/** The rows of one window of a line, its composition's sums with them, from raw rows with their phasors. */
export function windowRows(
  line: RosterLine,
  { rung, rows }: { rung: 'minute' | 'hour'; rows: readonly SnapshotRow[] },
  before: SnapshotRow | Parameters<typeof rungRows>[2],
): LevelRow[] {
  const start = new Date(rungStart(rung, rows[0]!.at.getTime()));
  const { qualified } = qualification(rows, before, line.ratingAmps);
  const sums = snapshotSums(line, qualified);
  const channelPath = channelPathOf(rows.at(-1)!);
  return rungRows({ lineId: line.id, start, ratingAmps: line.ratingAmps }, rows, before).map((row) => ({
    ...row,
    sums: sums === undefined ? null : packSums(sums[row.phase]),
    channelPath,
  }));
}

/** The paths of the terminals' channels at an instant, in one word to compare by. */
function channelPathOf(row: SnapshotRow): string | null {
  const paths = unpackMeasurements(row.phasors, row.at).flatMap(({ terminalId, measurement: { channel } }) =>
    channel === undefined ? [] : [`${terminalId}:${channel.path}`],
  );
  return paths.length === 0 ? null : paths.sort().join(' ');
}

/** The path that the newest row of the rung below says. */
export const channelPathBelow = (below: readonly LevelRow[], phase: PhaseName): string | null =>
  below.findLast((row) => row.phase === phase && row.channelPath !== null)?.channelPath ?? null;

/** The minute rows of a stretch of raw rows. */
export function minuteRows(
  line: RosterLine,
  rows: readonly SnapshotRow[],
  before: Parameters<typeof rungRows>[2],
): LevelRow[] {
  let previous = before;
  return rowsByWindow('minute', rows).flatMap((window) => {
    const built = windowRows(line, { rung: 'minute', rows: window }, previous);
    previous = window.at(-1);
    return built;
  });
}

/** The sums of one phase's rows of the rung below; where they differ in what they are of, of those with the most snapshots. */
export function summedBelow(below: readonly LevelRow[], phase: PhaseName): Buffer | null {
  const sums = below.flatMap((row) => (row.phase === phase ? (unpackSums(row.sums) ?? []) : []));
  const totals = [...groupedBy(sums, shapeKey).values()].flatMap((alike) => totalOf(alike) ?? []);
  const [first, ...others] = totals;
  if (first === undefined) return null;
  return packSums(
    others.reduce((most, total) => (snapshotCount(total) > snapshotCount(most) ? total : most), first),
  );
}

const shapeKey = (sums: CompositionSums): string => JSON.stringify(shapeOf(sums));
