import type { SettingsVersion } from '../contract/settings-version';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import { classLimitModel, measuredModel } from '../protection/line-model';
import type { LineModel } from '../protection/line-model';
import type { PhaseName } from '../protection/phase';
import { conjugate, magnitude, multiply, phasor, scale, sum } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import { zonePhases } from '../protection/zone';
import { reviewClasses } from './review-classes';
import { reviewZone, susceptanceMillisiemens, terminalsInService } from './review-line';
import type { ReviewLine } from './review-line';
import type { ReviewSnapshot } from './review-now';

/** Where a prediction takes the mismatches of the terminals from. */
export const MISMATCH_BASES = ['snapshot', 'class limits'] as const;
export type MismatchBasis = (typeof MISMATCH_BASES)[number];

/** A line's answer to load, and what its mismatches come from, in words. */
export interface ReviewModel {
  readonly model: LineModel;
  readonly basis: MismatchBasis;
  readonly words: string;
}

type Recorded = Pick<SettingsVersion, 'chargingCompensation'>;
type Snapshot = ReviewSnapshot | NotComputable;

/** Under a smaller load the differential says little of the mismatch. */
const LOADED_RATIO = 0.2;

/** The model of one phase; mismatches from the present snapshot where that is asked for and can be done, else from the classes. */
export function reviewModel(
  line: ReviewLine,
  recorded: Recorded,
  { phase, snapshot, basis }: { phase: PhaseName; snapshot: Snapshot; basis: MismatchBasis },
): ReviewModel | NotComputable {
  const susceptance = susceptanceMillisiemens(line);
  if (susceptance === undefined) return { notComputable: NO_CAPACITANCE };
  const compensated = recorded.chargingCompensation && !hasFallenBack(snapshot);
  const under = {
    terminalCount: terminalsInService(line).length,
    voltageKv: line.voltageKv,
    compensatedMillisiemens: compensated ? susceptance : 0,
  };
  if (under.terminalCount < 2) return { notComputable: 'A through current needs two terminals in service.' };
  const why = basis === 'class limits' ? undefined : snapshotObstacle(line, snapshot);
  if (basis === 'snapshot' && why === undefined && isComputable(snapshot)) {
    const mismatch = snapshotMismatch(line, recorded, { phase, snapshot });
    if (mismatch !== undefined) {
      return {
        model: measuredModel(under, {
          admittanceMillisiemens: phasor(0, susceptance),
          mismatches: [mismatch],
        }),
        basis: 'snapshot',
        words: 'Mismatch of the two ends measured in the present snapshot, charging by line constants.',
      };
    }
  }
  const classes = reviewClasses(line);
  if (!isComputable(classes)) return classes;
  return {
    model: classLimitModel(under, { susceptanceMillisiemens: susceptance, classes }),
    basis: 'class limits',
    words: `Mismatches from the transformers’ classes at opposite limits, not measured${why === undefined ? '' : `: ${why}`}.`,
  };
}

export const NO_CAPACITANCE =
  'The register does not hold the line’s capacitance, so its charging current can’t be told.';

/** Whether the compensation that is recorded was left out of this snapshot, for want of voltages. */
function hasFallenBack(snapshot: Snapshot): boolean {
  return isComputable(snapshot) && snapshot.zone.a.compensation?.state === 'fallback';
}

/** Why the present snapshot does not give the mismatch, in the middle of a sentence; undefined when it does. */
function snapshotObstacle(line: ReviewLine, snapshot: Snapshot): string | undefined {
  if (!isComputable(snapshot)) return 'there is no snapshot with phasors of all ends now';
  const count = snapshot.terminals.length;
  if (count !== 2) return `one snapshot can’t part the mismatches of ${count} terminals`;
  const loaded = loadAmps(snapshot) >= LOADED_RATIO * line.ratingAmps;
  if (!loaded) return 'the line carries under 20 % of its rating now';
  if (snapshot.sent.every(({ voltagesKv }) => voltagesKv === undefined))
    return 'no terminal gives a valid voltage, by which charging could be parted from it';
  return undefined;
}

function loadAmps({ zone }: ReviewSnapshot): number {
  return Math.min(...zone.a.currents.map(magnitude));
}

/**
 * E of terminal 2 against terminal 1 from one snapshot: what is left of the differential without the charging that
 * the voltages drive, over the current of terminal 2. Undefined when the charging could not be parted from it.
 */
export function snapshotMismatch(
  line: ReviewLine,
  recorded: Recorded,
  { phase, snapshot }: { phase: PhaseName; snapshot: ReviewSnapshot },
): Phasor | undefined {
  const without = zonePhases(reviewZone(line, { chargingCompensation: true }), snapshot.sent)[phase];
  if (without.compensation?.state !== 'compensated') return undefined;
  const seen = recorded.chargingCompensation ? without.currents[1] : snapshot.zone[phase].currents[1];
  if (seen === undefined || magnitude(seen) === 0) return undefined;
  return scale(multiply(sum(without.currents), conjugate(seen)), 1 / magnitude(seen) ** 2);
}
