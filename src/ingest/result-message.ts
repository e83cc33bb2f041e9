import type { Condition } from '../contract/condition';
import type { PhaseResult, Result } from '../contract/result';
import type { WarningCause } from '../contract/warning';
import type { Evaluated } from '../protection/evaluation';
import { perPhase } from '../protection/phase';
import { terminalOnWire } from '../view/terminal-on-wire';
import type { ComputedSnapshot } from './computed-snapshot';
import type { RosterLine } from './roster';

const SILENT = 'Nothing has come from this line since the instant shown.';
const NOTHING: PhaseResult = {
  differentialAmps: null,
  restraintAmps: null,
  thresholdAmps: null,
  utilisation: null,
};

/** The result of a line as it is published; `snapshot` is undefined while nothing has been heard of the line. */
export function resultMessage(
  line: RosterLine,
  snapshot: ComputedSnapshot | undefined,
  { condition, nowMs }: { condition: Condition; nowMs: number },
): Result {
  // a line that has fallen silent altogether: its last figures say nothing of now
  const isSilent = condition === 'blind' && snapshot?.points !== undefined;
  const through = isSilent ? undefined : snapshot?.throughAmps;
  const points = isSilent ? undefined : snapshot?.points;
  return {
    line: line.key,
    at: snapshot === undefined ? null : new Date(snapshot.atMs).toISOString(),
    publishedAt: new Date(nowMs).toISOString(),
    condition,
    reason:
      reasonOf(line, snapshot) ??
      (isSilent ? SILENT : condition === 'out of service' ? 'Every breaker of the line is open.' : null),
    phases: perPhase((phase) => (points === undefined ? NOTHING : phaseResult(points[phase]))),
    throughAmps: through ?? null,
    throughRatio: through === undefined ? null : through / line.ratingAmps,
    compensation: snapshot?.compensation ?? 'none',
    settingsVersion: snapshot?.version?.id ?? null,
    // a terminal that nothing is expected from is not missing
    terminals: [...line.terminals.values()]
      .filter(({ key }) => line.expected.includes(key) || snapshot?.measurements.has(key) === true)
      .map(({ key }) => terminalOnWire(key, snapshot?.measurements.get(key))),
  };
}

export const phaseResult = (point: Evaluated): PhaseResult => ({
  differentialAmps: point.differentialAmps,
  restraintAmps: point.restraintAmps ?? null,
  thresholdAmps: point.thresholdAmps ?? null,
  utilisation: point.utilisation,
});

function reasonOf(line: RosterLine, snapshot: ComputedSnapshot | undefined): string | null {
  if (line.obstacle !== undefined) return line.obstacle;
  if (!line.inService) return 'The register says that this line is out of service.';
  if (snapshot === undefined) return 'Nothing has been heard of this line yet.';
  const { unevaluable } = snapshot;
  if (unevaluable === undefined) return null;
  return unevaluable.by === 'register' ? unevaluable.reason : feedReason(line, unevaluable.cause);
}

/** A sentence for a cause that keeps a line from being evaluated. */
function feedReason(line: RosterLine, cause: WarningCause): string | null {
  switch (cause.basis) {
    case 'terminal silent':
      return `${named(line, cause.terminals)} sent nothing for this instant, so no differential can be computed.`;
    case 'validity':
      return `${named(line, cause.terminals)} marks its measurement invalid, so no differential is computed from it.`;
    case 'clock':
      return `The clock of ${named(line, cause.terminals)} runs free, so its phasors have no common time with the others.`;
    case 'utilisation':
    case 'standing level':
    case 'creep':
    case 'step':
      return null;
  }
}

const named = (line: RosterLine, terminals: readonly string[]): string =>
  terminals.map((key) => line.terminals.get(key)?.substationName ?? key).join(' and ');
