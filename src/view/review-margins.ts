import type { SettingsVersion } from '../contract/settings-version';
import { pickupAmps } from '../protection/characteristic';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import { predictedCurrents } from '../protection/line-model';
import type { LineModel } from '../protection/line-model';
import { loadability } from '../protection/loadability';
import type { Loadability } from '../protection/loadability';
import { perPhase, PHASES } from '../protection/phase';
import type { PerPhase, PhaseName } from '../protection/phase';
import { pickupWindow } from '../protection/pickup-window';
import type { PickupWindow } from '../protection/pickup-window';
import { sensitivity } from '../protection/sensitivity';
import type { Sensitivity } from '../protection/sensitivity';
import { reviewScheme } from './review-line';
import type { MismatchBasis } from './review-basis';
import { reviewModel } from './review-model';
import type { ModelInput, ReviewModel } from './review-model';

type Recorded = Pick<SettingsVersion, 'characteristic' | 'restraint' | 'chargingCompensation'>;

interface MarginInput extends ModelInput {
  readonly recorded: Recorded;
}

/** Loadability of one phase, and what its mismatches come from. */
export type ReviewLoadability = Loadability &
  Pick<ReviewModel, 'words' | 'obstacles'> & { readonly from: MismatchBasis };

/** How much load each phase's scheme lets the line carry. */
export function reviewLoadability(
  input: MarginInput,
  { basis, lagDeg }: { basis: MismatchBasis; lagDeg: number },
): PerPhase<ReviewLoadability | NotComputable> {
  const { line, recorded } = input;
  const scheme = reviewScheme(line, recorded);
  const lagRad = (lagDeg * Math.PI) / 180;
  const range = { frequencyHz: line.nominalFrequencyHz, lagRadLeast: -lagRad, lagRadMost: lagRad };
  const byModel = new Map<string, Loadability | NotComputable>();
  return perPhase((phase) => {
    const found = reviewModel(input, { phase, basis });
    if (!isComputable(found)) return found;
    // by class limits the three phases are one calculation
    const known = JSON.stringify(found.model);
    const load = byModel.get(known) ?? loadability({ scheme, model: found.model, range }, line);
    byModel.set(known, load);
    return isComputable(load)
      ? { ...load, words: found.words, obstacles: found.obstacles, from: found.basis }
      : load;
  });
}

/** The phase whose prediction at emergency rating is the worst; undefined when none can be made. */
export function worstLoadability(
  phases: PerPhase<ReviewLoadability | NotComputable>,
): { readonly phase: PhaseName; readonly load: ReviewLoadability } | undefined {
  return PHASES.flatMap((phase) => {
    const load = phases[phase];
    return isComputable(load) ? [{ phase, load }] : [];
  }).reduce<{ phase: PhaseName; load: ReviewLoadability } | undefined>(
    (worst, each) =>
      worst === undefined || each.load.atEmergency.utilisation > worst.load.atEmergency.utilisation
        ? each
        : worst,
    undefined,
  );
}

export const INFEEDS = ['one end', 'all ends'] as const;
export type Infeed = (typeof INFEEDS)[number];

/** Least internal fault seen with no load, and over the present load of each phase. */
export interface ReviewSensitivity {
  readonly noLoad: Sensitivity | NotComputable;
  readonly presentLoad: PerPhase<Sensitivity | NotComputable>;
}

export function reviewSensitivity(input: MarginInput, fedFrom: Infeed): ReviewSensitivity {
  const { line, recorded, snapshot } = input;
  const scheme = reviewScheme(line, recorded);
  const { voltageKv, nominalFrequencyHz: frequencyHz } = line;
  const model = reviewModel(input, { phase: 'a', basis: 'class limits' });
  const noLoad = isComputable(model)
    ? sensitivity(scheme, { currents: chargingOnly(model.model), voltageKv, frequencyHz, fedFrom })
    : model;
  const presentLoad = perPhase((phase) =>
    isComputable(snapshot)
      ? sensitivity(scheme, { currents: snapshot.zone[phase].currents, voltageKv, frequencyHz, fedFrom })
      : snapshot,
  );
  return { noLoad, presentLoad };
}

function chargingOnly(model: LineModel) {
  return predictedCurrents(model, [], { throughAmps: 0, lagRad: 0 });
}

/** The window for the recorded pickup, or why there is none. */
export function reviewPickupWindow(
  { line, recorded }: Pick<MarginInput, 'line' | 'recorded'>,
  { multiple, uncompensatedAmps }: { multiple: number; uncompensatedAmps: number | undefined },
): (PickupWindow & { readonly pickupAmps: number }) | NotComputable {
  const pickup = pickupAmps(recorded.characteristic);
  if (pickup === undefined) {
    return {
      notComputable:
        'A phase comparison has a release current at each end and no pickup for the differential current.',
    };
  }
  if (uncompensatedAmps === undefined) {
    return {
      notComputable:
        'The expected standing level can’t be told, and with it the lower bound: see what is missing above.',
    };
  }
  const window = pickupWindow(pickup, {
    uncompensatedStandingAmps: uncompensatedAmps,
    multiple,
    leastInternalFaultAmps: line.leastInternalFaultAmps ?? undefined,
  });
  return { ...window, pickupAmps: pickup };
}
