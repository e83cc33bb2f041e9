import type { Condition } from '../contract/condition';
import type { Creep, WarningCause, WarningKind } from '../contract/warning';
import { pickupAmps } from '../protection/characteristic';
import type { PerPhase } from '../protection/phase';
import { lineCondition } from '../warnings/condition';
import {
  judgeEvaluated,
  judgeUnderTest,
  judgeUnseen,
  type Judgement,
  unjudged,
  utilisationCause,
} from '../warnings/judgement';
import type { WarningLimits } from '../warnings/limits';
import { standingLevelCause } from '../warnings/standing-level';
import { allBreakersOpen, type ComputedSnapshot, isUnderTest } from './computed-snapshot';
import { type RosterLine, versionInForce } from './roster';

/** A warning that has just risen or returned, to be written with the batch that showed it. */
export type WarningChange =
  | { turn: 'opens'; kind: WarningKind; cause: WarningCause; atMs: number }
  | { turn: 'returns'; kind: WarningKind; atMs: number };

/** What the hourly look at a line's standing levels found. */
export interface StandingFindings {
  readonly levelAmps: PerPhase<number | undefined>;
  readonly creep: readonly Creep[];
  /** a step up that is recent and large enough to be told, if there is one */
  readonly step: WarningCause | undefined;
}

/** Keeps watch over one line: the newest snapshot, the judgement, and the warnings that stand. */
export interface LineWatch {
  line: RosterLine;
  newest: ComputedSnapshot | undefined;
  readonly standing: Set<WarningKind>;
  judgement: Judgement;
  findings: StandingFindings | undefined;
  /** the hour that was current when the level rows were last brought up to date */
  caughtUpMs: number | undefined;
  readonly watchedSinceMs: number;
}

export function lineWatch(line: RosterLine, standing: ReadonlySet<WarningKind>, nowMs: number): LineWatch {
  return {
    line,
    newest: undefined,
    standing: new Set(standing),
    judgement: unjudged(standing),
    findings: undefined,
    caughtUpMs: undefined,
    watchedSinceMs: nowMs,
  };
}

const isJudged = ({ line }: LineWatch): boolean => line.inService && line.obstacle === undefined;

export function conditionOf(watch: LineWatch): Condition {
  const { line, newest, standing } = watch;
  return lineCondition({
    standing,
    notEvaluated: line.obstacle !== undefined || newest?.unevaluable?.by === 'register',
    outOfService: !line.inService || (newest !== undefined && allBreakersOpen(newest)),
  });
}

/** Takes a snapshot, if it is the newest, and says which warnings turn by it. */
export function watchSnapshot(
  watch: LineWatch,
  snapshot: ComputedSnapshot,
  { nowMs, limits }: { nowMs: number; limits: WarningLimits },
): WarningChange[] {
  if (watch.newest !== undefined && snapshot.atMs <= watch.newest.atMs)
    return correctedNewest(watch, snapshot);
  watch.newest = snapshot;
  const { points, atMs } = snapshot;
  if (!isJudged(watch) || points === undefined) return [];
  // what a terminal under test sends is shown, and raises nothing
  if (isUnderTest(snapshot)) watch.judgement = judgeUnderTest(watch.judgement, { atMs, nowMs }, limits);
  else watch.judgement = judgeEvaluated(watch.judgement, { atMs, nowMs, points }, limits);
  return turns(watch, atMs, {
    near: () => nearCause(watch, snapshot, limits),
    over: () => utilisationCause(points, 1),
  });
}

/** A late measurement completed the newest instant: its figures are corrected, the judgement stands. */
function correctedNewest(watch: LineWatch, snapshot: ComputedSnapshot): WarningChange[] {
  if (snapshot.atMs === watch.newest?.atMs) watch.newest = snapshot;
  return [];
}

/** Judges the passing of time on a line that is not seen. */
export function watchTime(watch: LineWatch, nowMs: number, limits: WarningLimits): WarningChange[] {
  if (!isJudged(watch)) return turns(watch, nowMs, {});
  watch.judgement = judgeUnseen(watch.judgement, { nowMs, sinceMs: watch.watchedSinceMs }, limits);
  return turns(watch, nowMs, { blind: () => blindCause(watch, nowMs, limits) });
}

/** Takes the hourly findings: standing level against the pickup, and creep. */
export function watchFindings(
  watch: LineWatch,
  findings: StandingFindings,
  { atMs, limits }: { atMs: number; limits: WarningLimits },
): WarningChange[] {
  watch.findings = findings;
  const creep = findings.creep.find(({ verdict }) => verdict === 'creep');
  return turns(watch, atMs, {
    near: () => standingNear(watch, atMs, limits),
    rising: () => (creep === undefined ? findings.step : { basis: 'creep', creep }),
  });
}

type Causes = Partial<Record<WarningKind, () => WarningCause | undefined>>;

/** Compares what stands with what should, and names the cause of what rises now. */
function turns(watch: LineWatch, atMs: number, causes: Causes): WarningChange[] {
  const changes: WarningChange[] = [];
  for (const kind of ['over', 'near', 'rising', 'blind'] as const) {
    const should = shouldStand(watch, kind, causes);
    if (should === watch.standing.has(kind)) continue;
    const cause = should ? causes[kind]?.() : undefined;
    if (should && cause === undefined) continue;
    if (cause === undefined) watch.standing.delete(kind);
    else watch.standing.add(kind);
    changes.push(
      cause === undefined ? { turn: 'returns', kind, atMs } : { turn: 'opens', kind, cause, atMs },
    );
  }
  return changes;
}

function shouldStand(watch: LineWatch, kind: WarningKind, causes: Causes): boolean {
  if (!isJudged(watch)) return false;
  switch (kind) {
    case 'over':
    case 'blind':
      return watch.judgement[kind].active;
    case 'near':
      // not looked at by this call: it stands as it stood
      if (causes.near === undefined) return watch.standing.has('near');
      return watch.judgement.near.active || causes.near() !== undefined;
    case 'rising':
      if (causes.rising === undefined) return watch.standing.has('rising');
      return causes.rising() !== undefined;
  }
}

function nearCause(
  watch: LineWatch,
  snapshot: ComputedSnapshot,
  limits: WarningLimits,
): WarningCause | undefined {
  if (watch.judgement.near.active && snapshot.points !== undefined)
    return utilisationCause(snapshot.points, limits.nearRatio);
  return standingNear(watch, snapshot.atMs, limits);
}

function standingNear(watch: LineWatch, atMs: number, limits: WarningLimits): WarningCause | undefined {
  const version = versionInForce(watch.line, atMs);
  if (watch.findings === undefined || version === undefined) return undefined;
  const pickup = pickupAmps(version.scheme.characteristic);
  // a phase comparison has no pickup for the differential current: its utilisation alone speaks
  if (pickup === undefined) return undefined;
  return standingLevelCause(watch.findings.levelAmps, pickup, {
    nearRatio: limits.nearRatio,
    returnBand: limits.returnBand,
    standing: watch.standing.has('near'),
  });
}

function blindCause(watch: LineWatch, nowMs: number, limits: WarningLimits): WarningCause {
  const { newest, line } = watch;
  const heard = newest !== undefined && nowMs - newest.atMs < limits.blindAfterMs;
  if (heard && newest.unevaluable?.by === 'feed') return newest.unevaluable.cause;
  return { basis: 'terminal silent', terminals: [...line.expected] };
}
