import type { CompositionOnWire } from '../contract/composition';
import type { StandingVerdict, StepOnWire } from '../contract/standing';
import type { Creep } from '../contract/warning';
import { pickupAmps } from '../protection/characteristic';
import type { PhaseName } from '../protection/phase';
import { type Composition, composition } from '../standing/composition';
import { totalOf, throughLoad } from '../standing/composition-sums';
import { watchedCreep } from '../standing/creep-watch';
import { standingLevel24h } from '../standing/level';
import { typicalPoint } from '../standing/operating-point';
import { ascending, quantileSorted } from '../standing/quantile';
import { levelsAtReferenceLoad } from '../standing/reference-level';
import { compositionOnWire } from '../view/composition-on-wire';
import { dateOfDay, type SummedDay, summedDays } from '../view/day-sums';
import { compensatedMillisiemens } from '../view/line-zone';
import { creepOnWire } from './creep-on-wire';
import { likelyCause } from './likely-cause';
import { dailyLevels, lastDayOf, type LineHistory, rowsOf } from './line-history';
import { emergencyUtilisation, expectedLevelAmps } from './line-model-of';
import { phaseStep } from './phase-step';
import { type RosterLine, type SchemeVersion, versionInForce } from './roster';

const DAY_MS = 86_400_000;
/** The composition of today is that of the last month; the one before is a month that ended two months ago. */
const COMPOSED_DAYS = 30;
const BEFORE_DAYS = 60;
const HORIZON_DAYS = 365;
const UTILISATION_DAYS = 7;

/** Which phase is looked at, by what marks, and what an earlier look found, if there was one. */
export interface PhaseLook {
  readonly phase: PhaseName;
  readonly nearRatio: number;
  readonly frequencyHz: number;
  readonly earlier: Pick<StandingVerdict, 'step' | 'computedAt'> | undefined;
}

/** What the levels of one phase say at a moment. Pure: everything comes from the rows. */
export function phaseVerdict(line: RosterLine, history: LineHistory, look: PhaseLook): StandingVerdict {
  const { phase, nearRatio, frequencyHz } = look;
  const { nowMs } = history;
  const version = versionInForce(line, nowMs);
  const pickup = version && pickupAmps(version.scheme.characteristic);
  const levelAmps = standingLevel24h(mediansOf(lastDayOf(history, phase)));
  const step = phaseStep(line, history, { phase, earlier: look.earlier });
  const markDays = knownMarks(line, step);
  const compensated = compensatedMillisiemens(line.register, {
    isCompensated: version?.zone?.charging !== undefined,
    frequencyHz,
  });
  const days = summedDays(history.days, phase, compensated);
  const windows = composedWindows(line, days, { nowMs, frequencyHz, markDays, compensated, step });
  const drift = drifts(line, history, { phase, pickup, nearRatio, now: windows.now, markDays, days });
  const separated = windows.now.composition.kind === 'separated' ? windows.now.composition : undefined;
  const counted = driftThatCounts({ ...drift, composition: windows.now.onWire });
  const hasMoved = counted !== undefined || step !== null;
  const { cause, terminal } = likelyCause(windows.now.onWire, hasMoved ? windows.before : null);
  return {
    line: line.key,
    phase,
    computedAt: new Date(nowMs).toISOString(),
    levelAmps: levelAmps ?? null,
    pickupAmps: pickup ?? null,
    shareOfPickup: levelAmps === undefined || pickup === undefined ? null : levelAmps / pickup,
    expectedAmps: expectedOf(line, history, { phase, version, frequencyHz }) ?? null,
    utilisationP95: utilisationP95(history, phase) ?? null,
    emergencyUtilisation:
      (version && separated && emergencyUtilisation(line.register, version, separated)) ?? null,
    composition: windows.now.onWire,
    compositionBefore: windows.before,
    creep: drift.creep,
    creepAtReference: drift.creepAtReference,
    step: step && { ...step, ...stepCause(windows) },
    likelyCause: cause,
    causeTerminal: terminal,
    near: counted?.near ?? null,
    pickup: counted?.pickup ?? null,
  };
}

/** A drift with the growth of load counts only where the load can't be taken out of it. */
export function driftThatCounts({
  creep,
  creepAtReference,
  composition: told,
}: Pick<StandingVerdict, 'creep' | 'creepAtReference' | 'composition'>): Creep | undefined {
  return told.kind === 'separated' ? creepAtReference?.creep : (creep ?? undefined);
}

const mediansOf = (rows: readonly { medianAmps: number | null }[]): number[] =>
  rows.flatMap(({ medianAmps }) => medianAmps ?? []);

interface Composed {
  readonly composition: Composition;
  readonly onWire: CompositionOnWire;
  readonly days: readonly SummedDay[];
}

interface ComposedWindows {
  readonly now: Composed;
  readonly before: CompositionOnWire | null;
  /** the month before a known step, and the days since it, a month at the most */
  readonly beforeStep: CompositionOnWire | undefined;
  readonly sinceStep: CompositionOnWire | undefined;
}

function composedWindows(
  line: RosterLine,
  days: readonly SummedDay[],
  {
    nowMs,
    frequencyHz,
    markDays,
    compensated,
    step,
  }: {
    nowMs: number;
    frequencyHz: number;
    markDays: readonly number[];
    compensated: number;
    step: StepOnWire | null;
  },
): ComposedWindows {
  const today = Math.floor(nowMs / DAY_MS);
  const over = (from: number, to: number): Composed => {
    const within = days.filter(({ day }) => day >= from && day < to);
    const sums = within.map((each) => each.sums);
    const found = composition(sums, { frequencyHz });
    const window = { from: dateOfDay(from), to: dateOfDay(to), sums };
    const onWire = compositionOnWire(found, window, {
      line: line.register,
      frequencyHz,
      compensatedMillisiemens: compensated,
    });
    return { composition: found, onWire, days: within };
  };
  // a mark of the last month parts what it was from what it is: the composition of today begins after it
  const newestMark = Math.max(-Infinity, ...markDays.filter((day) => day < today));
  const before = over(today - BEFORE_DAYS - COMPOSED_DAYS, today - BEFORE_DAYS);
  const stepDay = step === null ? undefined : Math.floor(Date.parse(step.at) / DAY_MS);
  return {
    now: over(Math.max(today - COMPOSED_DAYS, newestMark + 1), today),
    before: before.composition.kind === 'separated' ? before.onWire : null,
    beforeStep: stepDay === undefined ? undefined : over(stepDay - COMPOSED_DAYS, stepDay).onWire,
    sinceStep:
      stepDay === undefined
        ? undefined
        : over(stepDay + 1, Math.min(today, stepDay + 1 + COMPOSED_DAYS)).onWire,
  };
}

/**
 * What moved with a step, by the days on either side of it: surer than the hours around it, once there are days
 * enough. Until then what the hours said stands.
 */
function stepCause({
  beforeStep,
  sinceStep,
}: ComposedWindows): Partial<Pick<StepOnWire, 'cause' | 'terminal'>> {
  if (beforeStep?.kind !== 'separated' || sinceStep?.kind !== 'separated') return {};
  return likelyCause(sinceStep, beforeStep);
}

/** Days that no trend and no composition is fitted across: a step, and a change of what the scheme does with its currents. */
function knownMarks(line: RosterLine, step: StepOnWire | null): number[] {
  const changes = line.versions.slice(1).map(({ fromMs }) => Math.floor(fromMs / DAY_MS));
  return step === null ? changes : [...changes, Math.floor(Date.parse(step.at) / DAY_MS)];
}

/** The drift as measured, and at one and the same load. */
function drifts(
  line: RosterLine,
  history: LineHistory,
  known: {
    phase: PhaseName;
    pickup: number | undefined;
    nearRatio: number;
    now: Composed;
    markDays: readonly number[];
    days: readonly SummedDay[];
  },
): Pick<StandingVerdict, 'creep' | 'creepAtReference'> {
  const { phase, pickup, nearRatio, now, markDays, days } = known;
  if (pickup === undefined || line.obstacle !== undefined) return { creep: null, creepAtReference: null };
  const plan = { pickupAmps: pickup, nearRatio, horizonDays: HORIZON_DAYS, markDays };
  const measured = watchedCreep(dailyLevels(rowsOf(history.days, phase)), plan);
  const creep = creepOnWire(measured.verdict, phase) ?? null;
  const total = totalOf(now.days.map(({ sums }) => sums));
  const point = total && typicalPoint(total);
  if (now.composition.kind !== 'separated' || total === undefined || point === undefined)
    return { creep, creepAtReference: null };
  const levels = levelsAtReferenceLoad(days, now.composition, point);
  const atReference = creepOnWire(watchedCreep(levels, plan).verdict, phase);
  const load = throughLoad(total);
  return {
    creep,
    creepAtReference:
      atReference === undefined || load === undefined
        ? null
        : { creep: atReference, referenceThroughAmps: load.meanAmps },
  };
}

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
