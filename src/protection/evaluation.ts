import { errorSumAmps } from './adaptive';
import type { Adaptive } from './adaptive';
import { alphaPlaneUtilisation, alphaPoint } from './alpha-plane';
import type { AlphaPlane, AlphaPoint } from './alpha-plane';
import { isThresholdCharacteristic, thresholdAmps, utilisation } from './characteristic';
import type { ThresholdCharacteristic } from './characteristic';
import { generalisedEquivalent } from './generalised-equivalent';
import type { TerminalPair } from './generalised-equivalent';
import { phaseComparisonUtilisation, phaseDeviationRad } from './phase-comparison';
import type { PhaseComparison } from './phase-comparison';
import type { Phasor } from './phasor';
import { isMagnitudeRestraint, restraintAmps } from './restraint';
import { pairingProblem } from './scheme';
import type { Conditions, Scheme } from './scheme';
import { differentialAmps, magnitudeSumAmps } from './terminal-currents';

/** The two currents of one phase that a characteristic weighs against each other, amperes rms primary. */
export interface MeasuredBalance {
  readonly differentialAmps: number;
  readonly restraintAmps: number;
}

/** Where one phase lies in the region of a scheme that has no threshold over restraint. */
export type RegionPoint =
  | ({ readonly kind: 'alpha-plane' } & AlphaPoint)
  /** deviation of the two currents from opposition, radians from 0 to π */
  | { readonly kind: 'phase-comparison'; readonly deviationRad: number };

/**
 * Where one phase stands under a scheme of any kind: amperes rms primary, and the utilisation as a ratio. The
 * scheme operates exactly when that is 1 or more.
 */
export interface Evaluated {
  readonly differentialAmps: number;
  /** undefined for a scheme that forms no restraint current */
  readonly restraintAmps: number | undefined;
  readonly thresholdAmps: number | undefined;
  readonly utilisation: number;
  /** undefined for a scheme with a threshold, and where a current is too small to have a place in the region */
  readonly region: RegionPoint | undefined;
}

/** Why a phase can't be evaluated, as a whole sentence. */
export interface NotComputable {
  readonly notComputable: string;
}

export type Evaluation = Evaluated | NotComputable;

/** Whether a result of this room is a result, and not the reason why there is none. */
export function isComputable<T extends object>(result: T | NotComputable): result is T {
  return !('notComputable' in result);
}

/**
 * One phase under a scheme of any kind, from the currents of all its terminals in service (amperes rms primary,
 * positive into the line, common time reference). For an adaptive scheme they come in the order of its
 * transformer errors: see `schemeAtTerminals`. What the scheme can't be evaluated for comes back as a reason.
 * Throws for no terminals and for a current that is not finite; an incomplete snapshot must not come here.
 */
export function evaluation(scheme: Scheme, currents: readonly Phasor[], conditions: Conditions): Evaluation {
  const { characteristic, restraint } = scheme;
  switch (characteristic.kind) {
    case 'two-slope':
      if (!isMagnitudeRestraint(restraint)) return unpaired(scheme);
      return overThreshold(characteristic, {
        differentialAmps: differentialAmps(currents),
        restraintAmps: restraintAmps(restraint, currents),
      });
    case 'adaptive':
      if (restraint.kind !== 'error-sum') return unpaired(scheme);
      return adaptiveEvaluation(characteristic, currents, conditions);
    case 'alpha-plane':
      return alphaPlaneEvaluation(characteristic, currents);
    case 'phase-comparison':
      return phaseComparisonEvaluation(characteristic, currents);
  }
}

/**
 * One phase from the magnitudes that a terminal itself computed, for lines whose historian holds nothing else. The
 * restraint is taken as reported: that it follows the scheme's convention can't be told from magnitudes. A scheme
 * with a region in place of a threshold needs phasors and says so. Throws for a magnitude that is negative or not
 * finite.
 */
export function evaluationFromReported(
  { characteristic }: Pick<Scheme, 'characteristic'>,
  reported: MeasuredBalance,
): Evaluation {
  if (isThresholdCharacteristic(characteristic)) return overThreshold(characteristic, reported);
  return {
    notComputable:
      'This scheme weighs phasors against each other, and this line’s feed holds magnitudes alone.',
  };
}

/**
 * Through current of one phase in amperes: half the sum of the magnitudes at all terminals.
 *
 * With two terminals this is the mean of both ends. With any number, and terminals in phase or in opposition
 * as on a loaded line, what enters the zone leaves it again, so that half the sum is the flow through it.
 * Throws when there is no terminal.
 */
export function throughAmps(currents: readonly Phasor[]): number {
  return magnitudeSumAmps(currents) / 2;
}

function overThreshold(characteristic: ThresholdCharacteristic, balance: MeasuredBalance): Evaluated {
  const threshold = thresholdAmps(characteristic, balance.restraintAmps);
  return {
    differentialAmps: balance.differentialAmps,
    restraintAmps: balance.restraintAmps,
    thresholdAmps: threshold,
    utilisation: utilisation(balance.differentialAmps, threshold),
    region: undefined,
  };
}

function adaptiveEvaluation(
  characteristic: Adaptive,
  currents: readonly Phasor[],
  { frequencyHz }: Conditions,
): Evaluation {
  const stated = characteristic.ctErrors.length;
  if (stated !== currents.length) {
    const there = `the settings state transformer errors for ${stated} of them`;
    return { notComputable: `This snapshot has ${currents.length} terminals, and ${there}.` };
  }
  const restraint = errorSumAmps(characteristic, currents, frequencyHz);
  const differential = differentialAmps(currents);
  return {
    differentialAmps: differential,
    restraintAmps: restraint,
    thresholdAmps: restraint,
    utilisation: utilisation(differential, restraint),
    region: undefined,
  };
}

function alphaPlaneEvaluation(characteristic: AlphaPlane, currents: readonly Phasor[]): Evaluation {
  const differential = finiteDifferentialAmps(currents);
  if (currents.length < 2) {
    return {
      notComputable: 'The alpha plane sets at least two terminals’ currents in relation; one is there.',
    };
  }
  const pair = pairOf(currents) ?? generalisedEquivalent(currents);
  const point = alphaPoint(characteristic, pair);
  return {
    differentialAmps: differential,
    restraintAmps: undefined,
    thresholdAmps: undefined,
    utilisation: alphaPlaneUtilisation(characteristic, differential, point),
    region: point && { kind: 'alpha-plane', ratio: point.ratio, angleRad: point.angleRad },
  };
}

function phaseComparisonEvaluation(characteristic: PhaseComparison, currents: readonly Phasor[]): Evaluation {
  const differential = finiteDifferentialAmps(currents);
  const pair = pairOf(currents);
  if (pair === undefined) {
    const count = currents.length;
    return {
      notComputable: `A phase comparison weighs two terminals’ currents; ${count} ${count === 1 ? 'is' : 'are'} there.`,
    };
  }
  const deviationRad = phaseDeviationRad(pair);
  return {
    differentialAmps: differential,
    restraintAmps: undefined,
    thresholdAmps: undefined,
    utilisation: phaseComparisonUtilisation(characteristic, pair),
    region: deviationRad === undefined ? undefined : { kind: 'phase-comparison', deviationRad },
  };
}

function pairOf(currents: readonly Phasor[]): TerminalPair | undefined {
  const [local, remote] = currents;
  if (local === undefined || remote === undefined || currents.length !== 2) return undefined;
  return { local, remote };
}

function finiteDifferentialAmps(currents: readonly Phasor[]): number {
  const differential = differentialAmps(currents);
  if (Number.isFinite(differential)) return differential;
  throw new RangeError('A line is evaluated from finite currents, which these are not.');
}

function unpaired(scheme: Scheme): NotComputable {
  return {
    notComputable: pairingProblem(scheme) ?? 'The recorded restraint does not go with the characteristic.',
  };
}
