import type { StandingVerdict, StepOnWire } from '../../contract/standing';
import { perPhase, type PhaseName } from '../../protection/phase';
import { summedDays } from '../../view/day-sums';
import { causePlace, type SummedPhases } from './cause-place';
import { causeWindows, type Moved } from './cause-windows';
import { type ComposedWindow, composedWindow, type Composing } from './composed-window';
import { likelyCause } from './likely-cause';
import { type LineHistory, rowsOf } from './line-history';
import type { MarkDay } from './standing-marks';

const DAY_MS = 86_400_000;

interface CauseLook {
  readonly phase: PhaseName;
  /** the composition of today */
  readonly now: ComposedWindow;
  readonly marks: readonly MarkDay[];
  readonly step: StepOnWire | null;
  readonly hasDrift: boolean;
}

/**
 * Why a standing level is what it is: what moved with a drift or else with the newest step, or else its largest part;
 * and where. The step is told by the days around it, surer than the hours, once there are days enough.
 */
export function standingCause(
  composing: Composing,
  history: LineHistory,
  { phase, now, marks, step, hasDrift }: CauseLook,
): Pick<StandingVerdict, 'likelyCause' | 'causePlace' | 'causeIsTime' | 'step'> {
  const phases = perPhase((each) =>
    summedDays(history.days, each, 0).map(({ day, sums }) => ({ at: day, sums })),
  );
  const spans = spansOf(composing, history, { phase, marks });
  const told = (moved: Moved) => toldBy(composing, { phase, phases, windows: causeWindows(moved, spans) });
  const stepMove = step === null ? undefined : told(stepOf(step, marks));
  const move = hasDrift ? told({ kind: 'drift' }) : stepMove;
  const found = move ?? toldOf(composing, { phase, phases, now, before: undefined });
  return {
    likelyCause: found.cause,
    causePlace: found.place,
    causeIsTime: found.isTime,
    step: step && { ...step, ...stepMove },
  };
}

/** Today, and the first day that no mark parts from it. */
function spansOf(
  { days }: Composing,
  { nowMs, days: rows }: LineHistory,
  { phase, marks }: { phase: PhaseName; marks: readonly MarkDay[] },
): { today: number; sinceDay: number } {
  const today = Math.floor(nowMs / DAY_MS);
  const firstRow = rowsOf(rows, phase)[0];
  const firstDay = days[0]?.day ?? (firstRow === undefined ? today : firstRow.start.getTime() / DAY_MS);
  const newestMark = marks.find(({ day }) => day < today)?.day ?? -Infinity;
  return { today, sinceDay: Math.max(firstDay, newestMark + 1) };
}

const stepOf = (step: StepOnWire, marks: readonly MarkDay[]): Moved => {
  const stepDay = Math.floor(Date.parse(step.at) / DAY_MS);
  return { kind: 'step', stepDay, markDayBefore: marks.find(({ day }) => day < stepDay)?.day };
};

interface Told {
  readonly cause: StandingVerdict['likelyCause'];
  readonly place: StandingVerdict['causePlace'];
  readonly isTime: boolean;
}

/** Undefined where one of the windows is not separable. */
function toldBy(
  composing: Composing,
  {
    phase,
    phases,
    windows,
  }: { phase: PhaseName; phases: SummedPhases; windows: ReturnType<typeof causeWindows> },
): Told | undefined {
  if (windows === undefined) return undefined;
  const [now, before] = [windows.now, windows.before].map((range) => composedWindow(composing, range));
  if (now!.onWire.kind !== 'separated' || before!.onWire.kind !== 'separated') return undefined;
  return toldOf(composing, { phase, phases, now: now!, before });
}

function toldOf(
  { line }: Composing,
  {
    phase,
    phases,
    now,
    before,
  }: { phase: PhaseName; phases: SummedPhases; now: ComposedWindow; before: ComposedWindow | undefined },
): Told {
  const cause = likelyCause(now, before);
  return { cause, ...causePlace(line, phases, { phase, cause, now: now.range, before: before?.range }) };
}
