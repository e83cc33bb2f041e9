import type { PhaseName } from '../protection/phase';
import { compensatedSums } from '../standing/compensated-sums';
import { type CompositionSums, shapeOf, snapshotCount } from '../standing/composition-sums';
import { unpackSums } from '../store/composition-packing';
import { groupedBy } from '../store/grouped';
import type { LevelRow } from '../store/levels';

const DAY_MS = 86_400_000;

/** The composition's sums of one phase's rows, by the day they belong to. */
export interface SummedDay {
  readonly day: number;
  readonly sums: CompositionSums;
}

/**
 * The days of one phase that add: of the line's present number of terminals, and with or without a voltage as most of
 * their snapshots are. `compensatedMillisiemens` is what the scheme in force takes out of the differential; 0 for
 * none. Without a voltage nothing could be taken out, and the days stay as they are.
 */
export function summedDays(
  rows: readonly LevelRow[],
  phase: PhaseName,
  compensatedMillisiemens: number,
): SummedDay[] {
  const days = rows.flatMap((row) => {
    const sums = row.phase === phase ? unpackSums(row.sums) : undefined;
    return sums === undefined ? [] : [{ day: row.start.getTime() / DAY_MS, sums }];
  });
  return alikeWindows(days).map(({ day, sums }) => ({
    day,
    sums: (compensatedMillisiemens > 0 ? compensatedSums(sums, compensatedMillisiemens) : undefined) ?? sums,
  }));
}

/** Those whose sums add: of the newest one's number of terminals, and with or without a voltage as most snapshots are. */
export function alikeWindows<Window extends { readonly sums: CompositionSums }>(
  days: readonly Window[],
): Window[] {
  const newest = days.at(-1);
  if (newest === undefined) return [];
  const { terminalCount } = shapeOf(newest.sums);
  const present = days.filter(({ sums }) => shapeOf(sums).terminalCount === terminalCount);
  const groups = groupedBy(present, ({ sums }) => shapeOf(sums).hasVoltage);
  const countOf = (group: readonly Window[] | undefined): number =>
    (group ?? []).reduce((total, { sums }) => total + snapshotCount(sums), 0);
  const isWithVoltage = countOf(groups.get(true)) >= countOf(groups.get(false));
  return groups.get(isWithVoltage) ?? [];
}

export const dateOfDay = (day: number): string => new Date(day * DAY_MS).toISOString().slice(0, 10);
