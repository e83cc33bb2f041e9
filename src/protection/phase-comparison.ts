import type { TerminalPair } from './generalised-equivalent';
import { magnitude } from './phasor';
import type { SettingProblem } from './setting-problem';

/**
 * Phase comparison of two terminals: the scheme operates where their currents deviate from opposition by the
 * tolerance angle or more, while the current at both ends has reached the release current.
 */
export interface PhaseComparison {
  readonly kind: 'phase-comparison';
  /** tolerated deviation from 180°, degrees */
  readonly toleranceDeg: number;
  /** least current at both ends, amperes rms primary */
  readonly releaseAmps: number;
}

/**
 * How far two currents are from standing in opposition, radians: 0 where they are exactly opposed, as a through
 * current's are, up to π where they are in phase. Swapping them leaves it, to the last digit. `undefined` where
 * either is zero and has no direction.
 */
export function phaseDeviationRad({ local, remote }: TerminalPair): number | undefined {
  if (magnitude(local) === 0 || magnitude(remote) === 0) return undefined;
  const along = local.re * remote.re + local.im * remote.im;
  const across = local.im * remote.re - local.re * remote.im;
  return Math.atan2(Math.abs(across), -along);
}

/**
 * Utilisation as a ratio: min(min|I_k|/release, deviation/tolerance). An end without current leaves it 0: such a
 * scheme then releases nothing, however strong the other end's current is.
 */
export function phaseComparisonUtilisation(settings: PhaseComparison, pair: TerminalPair): number {
  const leastAmps = Math.min(magnitude(pair.local), magnitude(pair.remote));
  const deviationRad = phaseDeviationRad(pair);
  if (deviationRad === undefined) return 0;
  const toleranceRad = (settings.toleranceDeg * Math.PI) / 180;
  return Math.min(leastAmps / settings.releaseAmps, deviationRad / toleranceRad);
}

/** Everything that is wrong with the settings, at once; empty when they can be evaluated. */
export function phaseComparisonProblems(settings: PhaseComparison): readonly SettingProblem[] {
  const problems: SettingProblem[] = [];
  if (!(settings.toleranceDeg > 0 && settings.toleranceDeg <= 180)) {
    const problem = 'The tolerance angle must be a number of degrees above 0, up to 180.';
    problems.push({ field: 'toleranceDeg', problem });
  }
  if (!(settings.releaseAmps > 0 && settings.releaseAmps < Infinity)) {
    const problem = 'The release current must be a number of amperes above 0.';
    problems.push({ field: 'releaseAmps', problem });
  }
  return problems;
}
