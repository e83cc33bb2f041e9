import type { StandingMark, StepOnWire } from '../../contract/standing';
import type { PhaseName } from '../../protection/phase';
import { shapeOf } from '../../standing/composition-sums';
import { unpackSums } from '../../store/composition-packing';
import type { LevelRow } from '../../store/levels';
import { dateOfDay } from '../../view/day-sums';
import { type LineHistory, rowsOf } from './line-history';
import type { RosterLine } from '../roster';

const DAY_MS = 86_400_000;

/** A mark by its day since the epoch. */
export interface MarkDay {
  readonly day: number;
  readonly kind: StandingMark['kind'];
}

/**
 * What parts a phase's history, newest first: a change of settings, of the channel's path or of the terminals,
 * recorded work, and the step that was found. No trend and no composition is taken across these days.
 */
export function standingMarks(
  line: RosterLine,
  history: LineHistory,
  { phase, step }: { phase: PhaseName; step: StepOnWire | null },
): MarkDay[] {
  const rows = rowsOf(history.days, phase);
  const firstDay = (rows[0]?.start.getTime() ?? history.nowMs) / DAY_MS;
  const marks: MarkDay[] = [
    ...line.versions
      .slice(1)
      .map(({ fromMs }) => ({ day: dayOf(fromMs), kind: 'settings changed' }) as const),
    ...pathChangeStarts(rows).map((atMs) => ({ day: dayOf(atMs), kind: 'channel path changed' }) as const),
    ...terminalChangeDays(rows).map((day) => ({ day, kind: 'terminals changed' }) as const),
    ...history.works.map(
      ({ doneOn }) => ({ day: dayOf(Date.parse(doneOn)), kind: 'work recorded' }) as const,
    ),
    ...(step === null ? [] : [{ day: dayOf(Date.parse(step.at)), kind: 'step' } as const]),
  ];
  return marks
    .filter(({ day }) => day >= firstDay && day * DAY_MS <= history.nowMs)
    .sort((one, other) => other.day - one.day);
}

const dayOf = (atMs: number): number => Math.floor(atMs / DAY_MS);

export const markOnWire = ({ day, kind }: MarkDay): StandingMark => ({ on: dateOfDay(day), kind });

/** Starts of the rows in which a channel goes another path than in the row before. */
export function pathChangeStarts(rows: readonly LevelRow[]): number[] {
  const known = new Map<string, string>();
  return rows.flatMap(({ start, channelPath }) => {
    let isChanged = false;
    // a terminal that says nothing for a while has not changed its path by that
    for (const told of channelPath?.split(' ') ?? []) {
      const [terminal, path] = told.split(':') as [string, string];
      isChanged ||= known.has(terminal) && known.get(terminal) !== path;
      known.set(terminal, path);
    }
    return isChanged ? [start.getTime()] : [];
  });
}

/** Days from which the line has another number of terminals than the day before. */
function terminalChangeDays(rows: readonly LevelRow[]): number[] {
  const counted = rows.flatMap(({ start, sums }) => {
    const unpacked = unpackSums(sums);
    return unpacked === undefined ? [] : [{ day: dayOf(start.getTime()), ...shapeOf(unpacked) }];
  });
  return counted.flatMap(({ day, terminalCount }, index) =>
    index > 0 && counted[index - 1]!.terminalCount !== terminalCount ? [day] : [],
  );
}
