import { thresholdAmps, utilisation } from './characteristic';
import type { Characteristic } from './characteristic';
import type { Phasor } from './phasor';
import { restraintAmps } from './restraint';
import type { Restraint } from './restraint';
import { differentialAmps, magnitudeSumAmps } from './terminal-currents';

/** What a line's phases are judged by: the recorded characteristic and the convention of its restraint. */
export interface Scheme {
  readonly characteristic: Characteristic;
  readonly restraint: Restraint;
}

/** The two currents of one phase that a characteristic weighs against each other, amperes rms primary. */
export interface MeasuredBalance {
  readonly differentialAmps: number;
  readonly restraintAmps: number;
}

/**
 * Where one phase stands: its currents, the threshold at that restraint (amperes rms primary), and the
 * utilisation as a ratio. The scheme operates exactly when the utilisation is 1 or more.
 */
export interface OperatingPoint extends MeasuredBalance {
  readonly thresholdAmps: number;
  readonly utilisation: number;
}

/**
 * The operating point of one phase, recomputed from the currents of all its terminals (amperes rms primary,
 * positive into the line, common time reference). Throws for no terminals and for a current that is not
 * finite; an incomplete snapshot has no operating point and must not come here.
 */
export function operatingPoint(scheme: Scheme, currents: readonly Phasor[]): OperatingPoint {
  return operatingPointFromReported(scheme, {
    differentialAmps: differentialAmps(currents),
    restraintAmps: restraintAmps(scheme.restraint, currents),
  });
}

/**
 * The operating point of one phase from the magnitudes that a terminal itself computed, for lines whose
 * historian holds nothing else. The restraint is taken as reported: that it follows the scheme's convention
 * can't be told from magnitudes. Throws for a magnitude that is negative or not finite.
 */
export function operatingPointFromReported(scheme: Scheme, reported: MeasuredBalance): OperatingPoint {
  const threshold = thresholdAmps(scheme.characteristic, reported.restraintAmps);
  return {
    differentialAmps: reported.differentialAmps,
    restraintAmps: reported.restraintAmps,
    thresholdAmps: threshold,
    utilisation: utilisation(reported.differentialAmps, threshold),
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
