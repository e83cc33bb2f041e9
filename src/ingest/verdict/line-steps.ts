import type { StandingVerdict, StepOnWire } from '../../contract/standing';
import { type PerPhase, PHASES, type PhaseName } from '../../protection/phase';
import type { CompositionSums } from '../../standing/composition-sums';
import { type MomentValue, residueSeries, stepMoment } from '../../standing/step-moment';
import type { Store } from '../../store/client';
import { unpackSums } from '../../store/composition-packing';
import { type LevelRow, readLevels } from '../../store/levels';
import { alikeWindows } from '../../view/day-sums';
import { type LineHistory, rowsOf } from './line-history';
import { phaseStep } from './phase-step';
import type { RosterLine } from '../roster';
import { RUNG_MS } from '../rungs/rung';

/** Minutes are looked at for so many hours on either side of the hour in which a step was seen. */
const AROUND_HOURS = 3;
/** What was ordinary before a step is taken from so many hours. */
const BEFORE_HOURS = 7 * 24;

/** The newest step of every phase; a new one is looked for in the minute rows, as long as there are any. */
export async function lineSteps(
  store: Store,
  line: RosterLine,
  { history, earlier }: { history: LineHistory; earlier: readonly StandingVerdict[] },
): Promise<PerPhase<StepOnWire | null>> {
  const steps: Record<PhaseName, StepOnWire | null> = { a: null, b: null, c: null };
  for (const phase of PHASES) {
    const known = earlier.find((verdict) => verdict.phase === phase);
    const step = phaseStep(line, history, { phase, earlier: known });
    const isNew = step !== null && step.at !== known?.step?.at;
    steps[phase] = isNew
      ? atItsMinute(step, history, await minutesAround(store, line.id, { step, phase }))
      : step;
  }
  return steps;
}

async function minutesAround(
  store: Store,
  lineId: number,
  { step, phase }: { step: StepOnWire; phase: PhaseName },
): Promise<LevelRow[]> {
  const hourMs = Date.parse(step.at);
  const rows = await readLevels(store, 'minute', {
    lineIds: [lineId],
    from: new Date(hourMs - AROUND_HOURS * RUNG_MS.hour),
    to: new Date(hourMs + (AROUND_HOURS + 1) * RUNG_MS.hour),
  });
  return rowsOf(rows, phase);
}

/** The step with the minute in which it came, where the phase's minute rows around it tell. */
export function atItsMinute(
  step: StepOnWire,
  history: LineHistory,
  minutes: readonly LevelRow[],
): StepOnWire {
  const phase = minutes[0]?.phase;
  if (phase === undefined) return step;
  const untilMs = minutes[0]!.start.getTime();
  const before = rowsOf(history.hours, phase).flatMap((row) => {
    const startMs = row.start.getTime();
    const sums =
      startMs < untilMs && startMs >= untilMs - BEFORE_HOURS * RUNG_MS.hour && unpackSums(row.sums);
    return sums ? [sums] : [];
  });
  const atMs = stepMoment(before.length === 0 ? levelSeries(minutes) : residues(minutes, before));
  return atMs === undefined ? step : { ...step, at: new Date(atMs).toISOString() };
}

function residues(minutes: readonly LevelRow[], before: readonly CompositionSums[]): MomentValue[] {
  const windows = minutes.flatMap((row) => {
    const sums = unpackSums(row.sums);
    return sums === undefined ? [] : [{ at: row.start.getTime(), sums }];
  });
  // only windows of one shape add: those before count as far as they are like the minutes
  const alike = alikeWindows([...before.map((sums) => ({ at: undefined, sums })), ...windows]);
  return residueSeries(
    alike.flatMap(({ at, sums }) => (at === undefined ? [] : [{ at, sums }])),
    alike.flatMap(({ at, sums }) => (at === undefined ? [sums] : [])),
  );
}

/** For a feed without phasors: the levels alone. */
const levelSeries = (minutes: readonly LevelRow[]): MomentValue[] =>
  minutes.flatMap(({ start, medianAmps }) =>
    medianAmps === null ? [] : [{ at: start.getTime(), value: { re: medianAmps, im: 0 } }],
  );
