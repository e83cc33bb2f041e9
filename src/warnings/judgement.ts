import type { WarningCause, WarningKind } from '../contract/warning';
import type { Evaluated } from '../protection/evaluation';
import { PHASES, type PerPhase, type PhaseName } from '../protection/phase';
import { AT_REST, type Hysteresis, STANDING, stepHysteresis } from './hysteresis';
import type { WarningLimits } from './limits';

/** What the worker remembers of a line between two sights of it. */
export interface Judgement {
  readonly near: Hysteresis;
  readonly over: Hysteresis;
  readonly blind: Hysteresis;
  /** instant of the newest snapshot that could be evaluated */
  readonly evaluatedAtMs: number | undefined;
}

export const unjudged = (standing: ReadonlySet<WarningKind>): Judgement => ({
  near: standing.has('near') ? STANDING : AT_REST,
  over: standing.has('over') ? STANDING : AT_REST,
  blind: standing.has('blind') ? STANDING : AT_REST,
  evaluatedAtMs: undefined,
});

/** The phase that stands nearest to its threshold. */
export function worstPhase(points: PerPhase<Evaluated>): PhaseName {
  return PHASES.reduce((worst, phase) =>
    points[phase].utilisation > points[worst].utilisation ? phase : worst,
  );
}

/** A snapshot's instant, and the instant at which it is looked at: far apart while a backlog is being caught up with. */
interface SeenAt {
  readonly atMs: number;
  readonly nowMs: number;
}

/** Judges a snapshot that could be evaluated. Delays count in snapshot instants, so a replayed hour judges as it did live. */
export function judgeEvaluated(
  judgement: Judgement,
  sight: SeenAt & { points: PerPhase<Evaluated> },
  limits: WarningLimits,
): Judgement {
  const { atMs, points } = sight;
  const utilisation = points[worstPhase(points)].utilisation;
  const against = (mark: number) => ({
    atMs,
    raise: utilisation >= mark,
    clear: utilisation < mark - limits.returnBand,
  });
  return {
    near: stepHysteresis(judgement.near, against(limits.nearRatio), limits.near),
    over: stepHysteresis(judgement.over, against(1), limits.over),
    blind: seenAgain(judgement.blind, sight, limits),
    evaluatedAtMs: atMs,
  };
}

/** Takes note that the line was seen, without judging its figures: a terminal under test sends no evidence. */
export function judgeUnderTest(judgement: Judgement, sight: SeenAt, limits: WarningLimits): Judgement {
  return {
    ...judgement,
    blind: seenAgain(judgement.blind, sight, limits),
    evaluatedAtMs: sight.atMs,
  };
}

/** Only what was just sampled ends blindness: a line that is an hour behind is still not seen. */
function seenAgain(blind: Hysteresis, { atMs, nowMs }: SeenAt, limits: WarningLimits): Hysteresis {
  return stepHysteresis(
    blind,
    { atMs, raise: false, clear: nowMs - atMs < limits.blindAfterMs },
    limits.blind,
  );
}

/** Judges the passing of time without an evaluable snapshot: a line is blind when that has lasted. */
export function judgeUnseen(
  judgement: Judgement,
  { nowMs, sinceMs }: { nowMs: number; sinceMs: number },
  limits: WarningLimits,
): Judgement {
  // either way: after a clock was set back, what was last seen lies ahead of now, and what comes is refused
  const unseenMs = Math.abs(nowMs - Math.max(judgement.evaluatedAtMs ?? 0, sinceMs));
  if (unseenMs < limits.blindAfterMs) return judgement;
  return {
    ...judgement,
    blind: stepHysteresis(judgement.blind, { atMs: nowMs, raise: true, clear: false }, limits.blind),
  };
}

/** The cause by which utilisation raises near or over. */
export function utilisationCause(points: PerPhase<Evaluated>, limit: number): WarningCause {
  const phase = worstPhase(points);
  const { utilisation, differentialAmps, thresholdAmps } = points[phase];
  return {
    basis: 'utilisation',
    phase,
    utilisation,
    limit,
    differentialAmps,
    thresholdAmps: thresholdAmps ?? null,
  };
}
