import type { Work } from '../../contract/works';
import type { PhaseName } from '../../protection/phase';
import type { DailyLevel } from '../../standing/creep';
import type { Store } from '../../store/client';
import { type HourOfLoad, type LevelRow, readHoursOfLoad, readLevels } from '../../store/levels';
import { readWorksOfLine } from '../../store/works';
import { RUNG_MS, rungStart } from '../rungs/rung';

const DAY_MS = RUNG_MS.day;

/** How far back a look at the standing levels reaches. */
export const HISTORY_DAYS = { drift: 365, step: 60 } as const;

/** The level rows that a look at a line's standing levels goes by. */
export interface LineHistory {
  readonly nowMs: number;
  /** hour rows of the last weeks, oldest first */
  readonly hours: readonly LevelRow[];
  /** day rows of the last year without today: its level would be that of a part of the load cycle */
  readonly days: readonly LevelRow[];
  /** hours of the last year with level and load alone: only for a line whose composition may not be had */
  readonly hoursOfLoad: readonly HourOfLoad[];
  /** recorded works that were not withdrawn */
  readonly works: readonly Pick<Work, 'doneOn' | 'terminal'>[];
}

export async function readLineHistory(
  store: Store,
  lineId: number,
  { nowMs, withLoad }: { nowMs: number; withLoad: boolean },
): Promise<LineHistory> {
  const lineIds = [lineId];
  const [hours, days, works, hoursOfLoad] = await Promise.all([
    readLevels(store, 'hour', {
      lineIds,
      from: new Date(rungStart('hour', nowMs) - HISTORY_DAYS.step * DAY_MS),
      to: new Date(rungStart('hour', nowMs)),
    }),
    readLevels(store, 'day', {
      lineIds,
      from: new Date(rungStart('day', nowMs) - HISTORY_DAYS.drift * DAY_MS),
      to: new Date(rungStart('day', nowMs)),
    }),
    readWorksOfLine(store, lineId),
    withLoad
      ? readHoursOfLoad(store, {
          lineId,
          from: new Date(rungStart('day', nowMs) - HISTORY_DAYS.drift * DAY_MS),
          to: new Date(rungStart('day', nowMs)),
        })
      : [],
  ]);
  return { nowMs, hours, days, works, hoursOfLoad };
}

export const rowsOf = (rows: readonly LevelRow[], phase: PhaseName): LevelRow[] =>
  rows.filter((row) => row.phase === phase);

/** The hour rows of the last day. */
export const lastDayOf = ({ hours, nowMs }: LineHistory, phase: PhaseName): LevelRow[] =>
  rowsOf(hours, phase).filter(({ start }) => start.getTime() >= nowMs - DAY_MS);

/** Daily standing levels, days counted from the epoch; days without a qualified snapshot are left out. */
export const dailyLevels = (rows: readonly LevelRow[]): DailyLevel[] =>
  rows.flatMap(({ start, medianAmps }) =>
    medianAmps === null ? [] : [{ day: start.getTime() / DAY_MS, levelAmps: medianAmps }],
  );
