import type { Condition } from '../contract/condition';
import type { LineSummary } from '../contract/lines';
import { severityRank } from './condition-words';
import { PHASES, type PhaseName } from './phase';

type Judged = Pick<LineSummary, 'condition' | 'phases' | 'lastDay' | 'creep' | 'pickupAmps' | 'warnings'>;

/**
 * The condition that a single phase earns: the line's colour goes to the phase that has it and to no other. Never
 * worse than the line's own, because a line's condition waits out short excursions and a phase's figures do not.
 */
export function phaseCondition(line: Judged, phase: PhaseName, nearRatio: number): Condition {
  if (line.phases[phase].utilisation === null)
    return line.condition === 'settled' ? 'blind' : quietOf(line.condition);
  if (hasRaised(line, phase)) return line.condition;
  const earned = (['over', 'near', 'rising'] as const).filter((condition) =>
    EARNS[condition](line, phase, nearRatio),
  );
  return earned.find((condition) => severityRank(condition) >= severityRank(line.condition)) ?? 'settled';
}

type Earns = (line: Judged, phase: PhaseName, nearRatio: number) => boolean;

const EARNS: Readonly<Record<'over' | 'near' | 'rising', Earns>> = {
  over: (line, phase) => (line.phases[phase].utilisation ?? 0) >= 1,
  near: (line, phase, nearRatio) => {
    const standingAmps = line.lastDay[phase]?.standingAmps ?? 0;
    const byLevel = line.pickupAmps !== null && standingAmps >= nearRatio * line.pickupAmps;
    return byLevel || (line.phases[phase].utilisation ?? 0) >= nearRatio;
  },
  rising: (line, phase) => line.creep.some((creep) => creep.phase === phase && creep.verdict === 'creep'),
};

/** Whether the phase raised the warning that stands for the line's condition: it keeps it until the warning goes. */
const hasRaised = (line: Judged, phase: PhaseName): boolean =>
  line.warnings.some(({ kind, returnedAt, cause }) => {
    if (kind !== line.condition || returnedAt !== null) return false;
    if (cause.basis === 'creep') return cause.creep.phase === phase;
    return 'phase' in cause && cause.phase === phase;
  });

const quietOf = (condition: Condition): Condition =>
  condition === 'not evaluated' || condition === 'out of service' ? condition : 'blind';

/** The phase with the highest utilisation; undefined when none can be computed. */
export function worstPhase(line: Pick<LineSummary, 'phases'>): PhaseName | undefined {
  let worst: PhaseName | undefined;
  for (const phase of PHASES) {
    const { utilisation } = line.phases[phase];
    if (utilisation === null) continue;
    if (worst === undefined || utilisation > line.phases[worst].utilisation!) worst = phase;
  }
  return worst;
}

/** The highest utilisation of the three phases, as a ratio; undefined when none can be computed. */
export function worstUtilisation(line: Pick<LineSummary, 'phases'>): number | undefined {
  const phase = worstPhase(line);
  return phase === undefined ? undefined : line.phases[phase].utilisation!;
}
