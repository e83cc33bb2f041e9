import type { StandingVerdict, StepOnWire } from '../../contract/standing';
import { pickupAmps } from '../../protection/characteristic';
import type { PhaseName } from '../../protection/phase';
import { standingLevel24h } from '../../standing/level';
import { ascending, quantileSorted } from '../../standing/quantile';
import { summedDays } from '../../view/day-sums';
import { compensatedMillisiemens } from '../../view/line-zone';
import { BEFORE_DAYS, COMPOSED_DAYS } from './cause-windows';
import { type ComposedWindow, composedWindow, type Composing } from './composed-window';
import { lastDayOf, type LineHistory, rowsOf } from './line-history';
import { expectedLevelAmps } from './line-model-of';
import { loadDependenceOf } from './load-dependence-of';
import { phaseDrifts } from './phase-drift';
import { countedDrift } from '../../view/counted-drift';
import { type RosterLine, type SchemeVersion, versionInForce } from '../roster';
import { standingCause } from './standing-cause';
import { type MarkDay, markOnWire, standingMarks } from './standing-marks';

const DAY_MS = 86_400_000;
const UTILISATION_DAYS = 7;

/** Which phase is looked at, by what marks, and the newest step of its level. */
export interface PhaseLook {
  readonly phase: PhaseName;
  readonly nearRatio: number;
  readonly frequencyHz: number;
  readonly step: StepOnWire | null;
}

/** What the levels of one phase say at a moment. Pure: everything comes from the rows. */
export function phaseVerdict(line: RosterLine, history: LineHistory, look: PhaseLook): StandingVerdict {
  const { phase, nearRatio, frequencyHz, step } = look;
  const { nowMs } = history;
  const version = versionInForce(line, nowMs);
  const pickup = version && pickupAmps(version.scheme.characteristic);
  const levelAmps = standingLevel24h(mediansOf(lastDayOf(history, phase)));
  const marks = standingMarks(line, history, { phase, step });
  const composing = composingOf(line, history, { phase, version, frequencyHz });
  const { now, before } = composedMonths(composing, { nowMs, marks });
  const drifts = phaseDrifts(composing, history, {
    phase,
    nearRatio,
    pickupAmps: pickup,
    version,
    now,
    marks,
  });
  const counted = countedDrift(drifts);
  const cause = standingCause(composing, history, {
    phase,
    now,
    marks,
    step,
    hasDrift: counted !== undefined,
  });
  return {
    line: line.key,
    phase,
    computedAt: new Date(nowMs).toISOString(),
    levelAmps: levelAmps ?? null,
    pickupAmps: pickup ?? null,
    shareOfPickup: levelAmps === undefined || pickup === undefined ? null : levelAmps / pickup,
    expectedAmps: expectedOf(line, history, { phase, version, frequencyHz }) ?? null,
    utilisationP95: utilisationP95(history, phase) ?? null,
    composition: now.onWire,
    compositionBefore: before.composition.kind === 'separated' ? before.onWire : null,
    loadDependence: loadDependenceOf(composing, history, { phase, now }),
    ...drifts,
    ...cause,
    marks: marks.map(markOnWire),
    near: counted?.near ?? null,
    pickup: counted?.pickup ?? null,
  };
}

function composingOf(
  line: RosterLine,
  history: LineHistory,
  {
    phase,
    version,
    frequencyHz,
  }: { phase: PhaseName; version: SchemeVersion | undefined; frequencyHz: number },
): Composing {
  const compensated = compensatedMillisiemens(line.register, {
    isCompensated: version?.zone?.charging !== undefined,
    frequencyHz,
  });
  const days = summedDays(history.days, phase, compensated);
  return { line, days, frequencyHz, compensatedMillisiemens: compensated };
}

/** The last month, and the one that ended two months ago: each since its newest mark only. */
function composedMonths(
  composing: Composing,
  { nowMs, marks }: { nowMs: number; marks: readonly MarkDay[] },
): { now: ComposedWindow; before: ComposedWindow } {
  const today = Math.floor(nowMs / DAY_MS);
  const month = (to: number) => {
    // a mark parts what was from what is: the composition begins after it
    const newestMark = Math.max(-Infinity, ...marks.map(({ day }) => day).filter((day) => day < to));
    return composedWindow(composing, { from: Math.max(to - COMPOSED_DAYS, newestMark + 1), to });
  };
  return { now: month(today), before: month(today - BEFORE_DAYS) };
}

const mediansOf = (rows: readonly { medianAmps: number | null }[]): number[] =>
  rows.flatMap(({ medianAmps }) => medianAmps ?? []);

function expectedOf(
  line: RosterLine,
  history: LineHistory,
  {
    phase,
    version,
    frequencyHz,
  }: { phase: PhaseName; version: SchemeVersion | undefined; frequencyHz: number },
): number | undefined {
  const through = lastDayOf(history, phase).flatMap(({ meanThroughAmps }) => meanThroughAmps ?? []);
  if (through.length === 0) return undefined;
  return expectedLevelAmps(line.register, {
    throughAmps: through.reduce((total, amps) => total + amps, 0) / through.length,
    isCompensated: version?.zone?.charging !== undefined,
    frequencyHz,
  });
}

/** The 95th percentile of the greatest utilisation of each hour in a week. */
function utilisationP95({ hours, nowMs }: LineHistory, phase: PhaseName): number | undefined {
  const fromMs = nowMs - UTILISATION_DAYS * DAY_MS;
  const greatest = rowsOf(hours, phase).flatMap(({ start, greatestUtilisation }) =>
    start.getTime() >= fromMs && greatestUtilisation !== null ? [greatestUtilisation] : [],
  );
  return quantileSorted(ascending(greatest), 0.95);
}
