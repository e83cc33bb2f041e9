import type { LineSummary } from '../contract/lines';
import { severityRank } from './condition-words';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import { phaseCondition } from './phase-condition';

/** Which phases the trend shows. */
export type TrendPhase = PhaseName | 'all';

/** The phase as the page's address holds it; undefined where it names none. */
export function phaseFromAddress(value: string | null): TrendPhase | undefined {
  return value === 'all' ? 'all' : PHASES.find((phase) => phase === value);
}

/** The phase worth looking at first: the one in the worst condition, among equals the highest standing level. */
export function worstStandingPhase(line: LineSummary, nearRatio: number): PhaseName {
  const rank = (phase: PhaseName) => severityRank(phaseCondition(line, phase, nearRatio));
  const level = (phase: PhaseName) =>
    line.lastDay[phase]?.standingAmps ?? line.phases[phase].differentialAmps ?? -1;
  return [...PHASES].sort((one, other) => rank(one) - rank(other) || level(other) - level(one))[0] ?? 'a';
}
