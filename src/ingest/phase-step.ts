import type { Cause, StandingVerdict, StepOnWire } from '../contract/standing';
import type { PhaseName } from '../protection/phase';
import { compositionStep, type CompositionStep } from '../standing/composition-step';
import { stepVerdict } from '../standing/step';
import { median } from '../standing/quantile';
import { unpackSums } from '../store/composition-packing';
import type { LevelRow } from '../store/levels';
import { type LineHistory, rowsOf } from './line-history';
import type { RosterLine } from './roster';

const HOUR_MS = 3_600_000;
/** A step is looked for in the last days of a series; this is how far each earlier look lies before the next. */
const LOOK_HOURS = 72;
/** Levels on either side of a step are those of this many hours. */
const SIDE_HOURS = 48;

/**
 * The newest step of one phase's standing level. What came before a step is never taken as ordinary for what comes
 * after it: hours are looked through from the oldest on, each look beginning after the last step found. After an
 * earlier look only what has come since is looked at, with some days of overlap.
 */
export function phaseStep(
  line: RosterLine,
  history: LineHistory,
  { phase, earlier }: { phase: PhaseName; earlier: Pick<StandingVerdict, 'step' | 'computedAt'> | undefined },
): StepOnWire | null {
  const rows = rowsOf(history.hours, phase);
  const pathChangeHours = pathChanges(rows);
  const nowHour = history.nowMs / HOUR_MS;
  const all = Math.floor(rows.length / LOOK_HOURS);
  const sinceHours = earlier === undefined ? Infinity : nowHour - Date.parse(earlier.computedAt) / HOUR_MS;
  const looks = Math.min(all, 1 + Math.floor(sinceHours / LOOK_HOURS));
  let step = earlier?.step ?? null;
  for (let look = looks - 1; look >= 0; look -= 1) {
    const since = step === null ? -Infinity : Date.parse(step.at) / HOUR_MS;
    const found = stepWithin(
      rows.filter(({ start }) => {
        const hour = start.getTime() / HOUR_MS;
        return hour > since && hour < nowHour - look * LOOK_HOURS;
      }),
      pathChangeHours,
    );
    if (found !== undefined) step = stepOnWire(line, found, { rows, pathChangeHours });
  }
  return step;
}

interface FoundStep {
  readonly atHour: number;
  readonly composition: CompositionStep | undefined;
}

function stepWithin(rows: readonly LevelRow[], pathChangeHours: readonly number[]): FoundStep | undefined {
  const sums = rows.flatMap((row) => {
    const unpacked = unpackSums(row.sums);
    return unpacked === undefined ? [] : [{ hour: row.start.getTime() / HOUR_MS, sums: unpacked }];
  });
  if (sums.length > 0) {
    const found = compositionStep(sums, { pathChangeHours });
    return found.kind === 'step' ? { atHour: found.atHour, composition: found } : undefined;
  }
  const levels = rows.flatMap(({ start, medianAmps }) =>
    medianAmps === null ? [] : [{ hour: start.getTime() / HOUR_MS, value: medianAmps }],
  );
  const found = levels.length === 0 ? undefined : stepVerdict(levels);
  return found?.kind === 'step' ? { atHour: found.atHour, composition: undefined } : undefined;
}

/** Hours at whose start the channel's path is another than in the hour before. */
function pathChanges(rows: readonly LevelRow[]): number[] {
  const told = rows.filter(({ channelPath }) => channelPath !== null);
  return told.flatMap(({ start, channelPath }, index) =>
    index > 0 && told[index - 1]!.channelPath !== channelPath ? [start.getTime() / HOUR_MS] : [],
  );
}

const CAUSES: Readonly<Record<'charging' | 'leakage' | 'ratio' | 'angle', Cause>> = {
  charging: 'charging',
  leakage: 'rest',
  ratio: 'ratio mismatch',
  angle: 'angle mismatch',
};

function stepOnWire(
  line: RosterLine,
  { atHour, composition }: FoundStep,
  { rows, pathChangeHours }: { rows: readonly LevelRow[]; pathChangeHours: readonly number[] },
): StepOnWire {
  const hour = Math.floor(atHour);
  const levelOf = (from: number, to: number): number =>
    median(
      rows.flatMap(({ start, medianAmps }) => {
        const at = start.getTime() / HOUR_MS;
        return at >= from && at < to && medianAmps !== null ? [medianAmps] : [];
      }),
    ) ?? 0;
  const moved = composition?.moved;
  return {
    at: new Date(hour * HOUR_MS).toISOString(),
    fromAmps: levelOf(hour - SIDE_HOURS, hour),
    toAmps: levelOf(hour + 1, hour + 1 + SIDE_HOURS),
    cause: moved === undefined ? 'not told' : CAUSES[moved.term],
    terminal: moved?.terminal === undefined ? null : (line.expected[moved.terminal] ?? null),
    channelPathChanged:
      composition?.pointsToChannel ?? pathChangeHours.some((changed) => Math.abs(changed - atHour) <= 1),
  };
}
