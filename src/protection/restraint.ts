import type { Phasor } from './phasor';
import type { SettingProblem } from './setting-problem';
import { greatestMagnitudeAmps, magnitudeSumAmps } from './terminal-currents';

/**
 * A restraint current that follows from the magnitudes of the terminals' currents alone. `factor` is
 * dimensionless; ½ is common practice.
 */
export type MagnitudeRestraint =
  { readonly kind: 'scaled-sum'; readonly factor: number } | { readonly kind: 'maximum' };

/**
 * How the restraint current of a phase is formed from its terminals' currents. The trade has no single
 * convention, and the same settings mean something else under another one: it is recorded with the scheme and
 * shown beside every figure that depends on it. The `error-sum` has its figures in the adaptive
 * characteristic; a scheme with a region in place of a threshold has `none`.
 */
export type Restraint = MagnitudeRestraint | { readonly kind: 'error-sum' } | { readonly kind: 'none' };

/** Whether a restraint follows from magnitudes alone. */
export function isMagnitudeRestraint(restraint: Restraint): restraint is MagnitudeRestraint {
  return restraint.kind === 'scaled-sum' || restraint.kind === 'maximum';
}

/**
 * Restraint current in amperes rms primary: k·Σ|I| for `scaled-sum`, max|I| for `maximum`. Throws when there
 * is no terminal.
 */
export function restraintAmps(restraint: MagnitudeRestraint, currents: readonly Phasor[]): number {
  switch (restraint.kind) {
    case 'scaled-sum':
      return restraint.factor * magnitudeSumAmps(currents);
    case 'maximum':
      return greatestMagnitudeAmps(currents);
  }
}

/** The convention in a few words, to stand beside a figure. */
export function restraintConvention(restraint: Restraint): string {
  switch (restraint.kind) {
    case 'scaled-sum':
      return `${factorInFront(restraint.factor)}sum of magnitudes`;
    case 'maximum':
      return 'greatest magnitude';
    case 'error-sum':
      return 'pickup and sum of errors';
    case 'none':
      return 'no restraint current';
  }
}

/** Everything that is wrong with a restraint, at once; empty when it can be evaluated. */
export function restraintProblems(restraint: Restraint): readonly SettingProblem[] {
  if (restraint.kind !== 'scaled-sum') return [];
  if (restraint.factor > 0 && restraint.factor <= 1) return [];
  return [{ field: 'factor', problem: 'The restraint factor must be a number above 0, up to 1.' }];
}

function factorInFront(factor: number): string {
  if (factor === 1) return '';
  return factor === 0.5 ? '½ ' : `${factor} × `;
}
