import type { SettingsVersion } from '../contract/settings-version';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import { classLimitModel, measuredModel } from '../protection/line-model';
import type { LineModel, LineUnderLoad } from '../protection/line-model';
import type { PhaseName } from '../protection/phase';
import { phasor } from '../protection/phasor';
import { snapshotMismatch } from '../protection/snapshot-mismatch';
import { leastMagnitudeAmps } from '../protection/terminal-currents';
import { zonePhases } from '../protection/zone';
import { compensatedMillisiemens } from './line-zone';
import { MISMATCH_BASES } from './review-basis';
import type { MismatchBasis } from './review-basis';
import { reviewClasses } from './review-classes';
import { composedResponse } from './review-composition';
import type { ReviewCompositions } from './review-composition';
import { reviewZone, susceptanceMillisiemens, terminalsInService } from './review-line';
import type { ReviewLine } from './review-line';
import { FROM_MAGNITUDES_ALONE } from './review-now';
import type { ReviewSnapshot } from './review-now';

/** What a prediction is made from. */
export interface ModelInput {
  readonly line: ReviewLine;
  readonly recorded: Pick<SettingsVersion, 'chargingCompensation'>;
  readonly snapshot: ReviewSnapshot | NotComputable;
  readonly compositions: ReviewCompositions;
}

/** A line's answer to load, and what its mismatches come from. */
export interface ReviewModel {
  readonly model: LineModel;
  readonly basis: MismatchBasis;
  /** the basis, as a sentence */
  readonly words: string;
  /** why it is not the one that was asked for, in sentences; none where it is */
  readonly obstacles: readonly string[];
}

type Told = Pick<ReviewModel, 'model' | 'words'> | NotComputable;

/** Under a smaller load the differential says little of the mismatch. */
const LOADED_RATIO = 0.2;

export const NO_CAPACITANCE =
  'The register does not hold the line’s capacitance, so its charging current can’t be told.';

/** The model of one phase by the basis that is asked for, else by the next one that can be had. */
export function reviewModel(
  input: ModelInput,
  { phase, basis }: { phase: PhaseName; basis: MismatchBasis },
): ReviewModel | NotComputable {
  if (terminalsInService(input.line).length < 2)
    return { notComputable: 'A through current needs two terminals in service.' };
  // one and the same obstacle can stand in the way of two of them
  const obstacles = new Set<string>();
  for (const each of MISMATCH_BASES.slice(MISMATCH_BASES.indexOf(basis))) {
    const told = MODELS[each](input, phase);
    if (isComputable(told)) return { ...told, basis: each, obstacles: [...obstacles] };
    obstacles.add(told.notComputable);
  }
  return { notComputable: [...obstacles].join(' ') };
}

const MODELS: Readonly<Record<MismatchBasis, (input: ModelInput, phase: PhaseName) => Told>> = {
  composition: composedModel,
  snapshot: snapshotModel,
  'class limits': classModel,
};

function composedModel({ line, recorded, snapshot, compositions }: ModelInput, phase: PhaseName): Told {
  const response = composedResponse(line, compositions[phase]);
  if (!isComputable(response)) return response;
  const compensated = compensatedMillisiemens(line, {
    isCompensated: recorded.chargingCompensation,
    frequencyHz: line.nominalFrequencyHz,
  });
  const words =
    compensated > 0 && hasFallenBack(snapshot)
      ? `${response.words} Charging is taken as compensated, though just now it is not.`
      : response.words;
  return { model: measuredModel(underLoad(line, compensated), response), words };
}

function snapshotModel({ line, recorded, snapshot }: ModelInput, phase: PhaseName): Told {
  if (line.goesBy === 'reported') return { notComputable: FROM_MAGNITUDES_ALONE };
  const susceptance = susceptanceMillisiemens(line);
  if (susceptance === undefined) return { notComputable: NO_CAPACITANCE };
  if (!isComputable(snapshot)) return silent('there is no snapshot with phasors of all ends now');
  const { terminals, sent, zone } = snapshot;
  if (terminals.length !== 2)
    return silent(`one snapshot can’t part the mismatches of ${terminals.length} terminals`);
  const judged = zone[phase];
  if (leastMagnitudeAmps(judged.currents) < LOADED_RATIO * line.ratingAmps)
    return silent('the line carries under 20 % of its rating now');
  const uncharged = zonePhases(reviewZone(line, { chargingCompensation: true }), sent)[phase];
  const mismatch = snapshotMismatch(uncharged, judged);
  if (mismatch === undefined)
    return silent('no terminal gives a valid voltage of the line, by which charging could be parted from it');
  return {
    model: measuredModel(underLoad(line, recorded.chargingCompensation ? susceptance : 0), {
      admittanceMillisiemens: phasor(0, susceptance),
      mismatches: [mismatch],
    }),
    words: 'Mismatch of the two ends measured in the present snapshot, charging by line constants.',
  };
}

function classModel({ line, recorded, snapshot }: ModelInput): Told {
  const susceptance = susceptanceMillisiemens(line);
  if (susceptance === undefined) return { notComputable: NO_CAPACITANCE };
  const classes = reviewClasses(line);
  if (!isComputable(classes)) return classes;
  const isCompensated = recorded.chargingCompensation && !hasFallenBack(snapshot);
  return {
    model: classLimitModel(underLoad(line, isCompensated ? susceptance : 0), {
      susceptanceMillisiemens: susceptance,
      classes,
    }),
    words: 'Mismatches from the transformers’ classes at opposite limits, not measured.',
  };
}

const silent = (why: string): NotComputable => ({
  notComputable: `The present snapshot does not tell the mismatches: ${why}.`,
});

function underLoad(line: ReviewLine, compensated: number): LineUnderLoad {
  return {
    terminalCount: terminalsInService(line).length,
    voltageKv: line.voltageKv,
    compensatedMillisiemens: compensated,
  };
}

/** Whether the compensation that is recorded was left out of this snapshot, for want of voltages. */
function hasFallenBack(snapshot: ModelInput['snapshot']): boolean {
  return isComputable(snapshot) && snapshot.zone.a.compensation?.state === 'fallback';
}
