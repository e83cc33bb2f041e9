import type { PhaseName } from '../protection/phase';
import { type CompositionSums, shapeOf } from '../standing/composition-sums';
import { unpackSums } from '../store/composition-packing';
import type { LevelRow } from '../store/levels';

const DAY_MS = 86_400_000;

/** The composition's sums of one phase's rows, by the day they belong to. */
export interface SummedDay {
  readonly day: number;
  readonly sums: CompositionSums;
}

/** Of rows with another set of terminals, or without the voltage that the newest have, nothing can be added: they are left out. */
export function summedDays(rows: readonly LevelRow[], phase: PhaseName): SummedDay[] {
  const days = rows.flatMap((row) => {
    const sums = row.phase === phase ? unpackSums(row.sums) : undefined;
    return sums === undefined ? [] : [{ day: row.start.getTime() / DAY_MS, sums }];
  });
  const newest = days.at(-1);
  if (newest === undefined) return [];
  const wanted = shapeOf(newest.sums);
  return days.filter(({ sums }) => {
    const shape = shapeOf(sums);
    return shape.terminalCount === wanted.terminalCount && shape.hasVoltage === wanted.hasVoltage;
  });
}

export const dateOfDay = (day: number): string => new Date(day * DAY_MS).toISOString().slice(0, 10);
