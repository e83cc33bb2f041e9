import type { Condition } from '../contract/condition';
import type { LineSummary } from '../contract/lines';
import { DASH, currentText } from './line-figures';
import type { CurrentUnit } from './line-unit';
import { percentOfMarkText, percentText } from './figures';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import { phaseCondition } from './phase-condition';
import type { SiteCustom } from './site-custom';

/** One row of the phases table, in the unit shown; a dash stands where a figure cannot be computed. */
export interface PhaseRow {
  readonly phase: PhaseName;
  readonly letter: string;
  readonly condition: Condition;
  readonly differential: string;
  readonly restraint: string;
  readonly threshold: string;
  readonly utilisation: string;
  readonly standing: string;
  readonly shareOfPickup: string;
}

export function phaseRows(line: LineSummary, unit: CurrentUnit, site: SiteCustom): PhaseRow[] {
  const shown = (amps: number | null) => currentText(amps, unit, line.ratingAmps);
  return PHASES.map((phase) => {
    const { differentialAmps, restraintAmps, thresholdAmps, utilisation } = line.phases[phase];
    const standingAmps = line.lastDay[phase]?.standingAmps ?? null;
    const share = shareOfPickup(standingAmps, line.pickupAmps);
    return {
      phase,
      letter: site.phaseLetters[phase],
      condition: phaseCondition(line, phase, site.nearRatio),
      differential: shown(differentialAmps),
      restraint: shown(restraintAmps),
      threshold: shown(thresholdAmps),
      utilisation: utilisation === null ? DASH : percentOfMarkText(utilisation),
      standing: shown(standingAmps),
      shareOfPickup: share === null ? DASH : percentText(share),
    };
  });
}

function shareOfPickup(standingAmps: number | null, pickupAmps: number | null): number | null {
  if (standingAmps === null || pickupAmps === null || pickupAmps <= 0) return null;
  return standingAmps / pickupAmps;
}

/** Why figures are missing, in a sentence; undefined when none are. */
export function missingFiguresReason(line: LineSummary): string | undefined {
  const present = PHASES.every((phase) => line.phases[phase].utilisation !== null);
  if (present) return undefined;
  if (line.reason !== null) return line.reason;
  return line.at === null
    ? 'Nothing has been heard of this line yet.'
    : 'These figures cannot be computed at present.';
}
