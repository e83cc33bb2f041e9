import type { Cause, CausePlace, StandingVerdict, StepOnWire } from '../../contract/standing';
import { perPhase, type PhaseName } from '../../protection/phase';
import { compositionStep, type CompositionStep } from '../../standing/composition-step';
import { type HourlyLevel, hoursAtLoad, loadResponse } from '../../standing/load-response';
import { movedTerminal, type UnbalanceSides } from '../../standing/moved-terminal';
import type { MovedTerm } from '../../standing/moved-term';
import { median } from '../../standing/quantile';
import { stepVerdict } from '../../standing/step';
import { unpackSums } from '../../store/composition-packing';
import type { LevelRow } from '../../store/levels';
import { alikeWindows } from '../../view/day-sums';
import { inSpan, type Span, type SummedWindow, unbalanceSides } from './cause-place';
import { type LineHistory, rowsOf } from './line-history';
import type { RosterLine } from '../roster';
import { pathChangeStarts } from './standing-marks';

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
  const pathChangeHours = pathChangeStarts(rows).map((atMs) => atMs / HOUR_MS);
  const nowHour = history.nowMs / HOUR_MS;
  const all = Math.floor(rows.length / LOOK_HOURS);
  const sinceHours = earlier === undefined ? Infinity : nowHour - Date.parse(earlier.computedAt) / HOUR_MS;
  const looks = Math.min(all, 1 + Math.floor(sinceHours / LOOK_HOURS));
  let step = earlier?.step ?? null;
  for (let look = looks - 1; look >= 0; look -= 1) {
    const since = step === null ? -Infinity : Date.parse(step.at) / HOUR_MS;
    const within = rows.filter(({ start }) => {
      const hour = start.getTime() / HOUR_MS;
      return hour > since && hour < nowHour - look * LOOK_HOURS;
    });
    const found = stepOfSums(within, pathChangeHours) ?? stepOfLevels(within, rows);
    if (found !== undefined) step = stepOnWire(line, history, { phase, found, pathChangeHours });
  }
  return step;
}

interface FoundStep {
  readonly atHour: number;
  readonly composition: CompositionStep | undefined;
}

function stepOfSums(rows: readonly LevelRow[], pathChangeHours: readonly number[]): FoundStep | undefined {
  const sums = alikeWindows(summedHours(rows)).map(({ at, sums: own }) => ({ hour: at, sums: own }));
  const found = sums.length === 0 ? undefined : compositionStep(sums, { pathChangeHours });
  return found?.kind === 'step' ? { atHour: found.atHour, composition: found } : undefined;
}

/**
 * For a feed of magnitudes alone: a step of the levels, at one load where all its hours tell what load does to them,
 * since the load cycle hides most steps of a level.
 */
function stepOfLevels(rows: readonly LevelRow[], all: readonly LevelRow[]): FoundStep | undefined {
  if (all.some(({ sums }) => sums !== null)) return undefined;
  const response = loadResponse(hoursOf(all));
  const hours = hoursOf(rows);
  if (hours.length === 0) return undefined;
  const found = stepVerdict(
    response === undefined
      ? hours.map(({ hour, levelAmps }) => ({ hour, value: levelAmps }))
      : hoursAtLoad(hours, response),
  );
  return found.kind === 'step' ? { atHour: found.atHour, composition: undefined } : undefined;
}

const hoursOf = (rows: readonly LevelRow[]): HourlyLevel[] =>
  rows.flatMap(({ start, medianAmps, meanThroughAmps }) =>
    medianAmps === null || meanThroughAmps === null
      ? []
      : [{ hour: start.getTime() / HOUR_MS, levelAmps: medianAmps, throughAmps: meanThroughAmps }],
  );

const CAUSES: Readonly<Record<'charging' | 'leakage' | 'ratio' | 'angle', Cause>> = {
  charging: 'charging',
  leakage: 'rest',
  ratio: 'ratio mismatch',
  angle: 'angle mismatch',
};

function stepOnWire(
  line: RosterLine,
  history: LineHistory,
  {
    phase,
    found: { atHour, composition },
    pathChangeHours,
  }: { phase: PhaseName; found: FoundStep; pathChangeHours: readonly number[] },
): StepOnWire {
  const hour = Math.floor(atHour);
  const before = { from: hour - SIDE_HOURS, to: hour };
  const now = { from: hour + 1, to: hour + 1 + SIDE_HOURS };
  const levelIn = (span: Span): number => {
    const levels = rowsOf(history.hours, phase).map(({ start, medianAmps }) => ({
      at: start.getTime() / HOUR_MS,
      medianAmps,
    }));
    return median(inSpan(levels, span).flatMap(({ medianAmps }) => medianAmps ?? [])) ?? 0;
  };
  const moved = composition?.moved;
  const sides = () =>
    unbalanceSides(
      perPhase((each) => summedHours(rowsOf(history.hours, each))),
      { phase, now, before },
    );
  return {
    at: new Date(hour * HOUR_MS).toISOString(),
    fromAmps: levelIn(before),
    toAmps: levelIn(now),
    cause: moved === undefined ? 'not told' : CAUSES[moved.term],
    place: moved === undefined ? null : placeOf(line, moved, sides),
    // one phase’s hours do not say; the days around the step will
    isTime: false,
    channelPathChanged:
      composition?.pointsToChannel ?? pathChangeHours.some((changed) => Math.abs(changed - atHour) <= 1),
  };
}

/** With three terminals and more the best explanation names one; with two, the unbalance of the phases may. */
function placeOf(
  line: RosterLine,
  { term, terminal, change }: MovedTerm,
  sides: () => UnbalanceSides,
): CausePlace | null {
  const [first, second] = line.expected;
  if (terminal === undefined || first === undefined || second === undefined) return null;
  if (line.expected.length > 2) return { terminal: line.expected[terminal] ?? second, against: null };
  const moved = movedTerminal([change], term === 'ratio' ? sides() : undefined);
  if (moved?.kind !== 'terminal') return { terminal: second, against: first };
  return { terminal: line.expected[moved.terminal] ?? second, against: null };
}

/** The sums of some hour rows, hours counted from the epoch. */
const summedHours = (rows: readonly LevelRow[]): SummedWindow[] =>
  rows.flatMap((row) => {
    const sums = unpackSums(row.sums);
    return sums === undefined ? [] : [{ at: row.start.getTime() / HOUR_MS, sums }];
  });
