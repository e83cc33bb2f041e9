import type { LineSummary } from '../contract/lines';
import { characteristicPath } from '../protection/characteristic';
import type { ThresholdCharacteristic } from '../protection/characteristic';
import { perPhase } from '../protection/phase';
import type { PerPhase } from '../protection/phase';
import type { Reading } from './line-readings';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import { tails } from './plane-tail';
import { planeWindow } from './plane-window';
import type { PlaneExtent, PlanePoint, PlaneWindow } from './plane-window';

/** A place on the plane, in the unit shown. */
export interface PlanePlace {
  readonly restraint: number;
  readonly differential: number;
}

export type PhasePlace = PlanePlace & { readonly phase: PhaseName };
export type TailPlace = PlanePlace & { readonly ageRatio: number };

/** What the plane draws, in the unit shown. */
export interface PlaneShape {
  readonly window: PlaneWindow;
  /** corners of the threshold from no restraint to the edge of the window; empty without settings */
  readonly threshold: readonly PlanePlace[];
  readonly points: readonly PhasePlace[];
  readonly tails: PerPhase<readonly (readonly TailPlace[])[]>;
}

interface PlaneContext {
  readonly characteristic: ThresholdCharacteristic | undefined;
  readonly readings: readonly Reading[];
  readonly extent: PlaneExtent;
  /** amperes of one unit: 1 for amperes, the rating for per unit */
  readonly unitAmps: number;
  /** other places that are drawn and that the window has to show */
  readonly also?: readonly PlanePoint[];
}

export function planeShape(
  line: Pick<LineSummary, 'phases' | 'emergencyRatingAmps'>,
  { characteristic, readings, extent, unitAmps, also = [] }: PlaneContext,
): PlaneShape {
  const ways = tails(readings, readings[readings.length - 1]?.atMs ?? 0);
  const now = PHASES.flatMap((phase) => {
    const { restraintAmps, differentialAmps } = line.phases[phase];
    if (restraintAmps === null || differentialAmps === null) return [];
    return [{ phase, restraintAmps, differentialAmps }];
  });
  const everywhere = [...now, ...also, ...PHASES.flatMap((phase) => ways[phase].flat())];
  const { emergencyRatingAmps: emergencyAmps } = line;
  const window = planeWindow(characteristic, everywhere, { extent, emergencyAmps, unitAmps });
  const place = ({ restraintAmps, differentialAmps }: PlanePoint) => ({
    restraint: restraintAmps / unitAmps,
    differential: differentialAmps / unitAmps,
  });
  return {
    window,
    threshold: thresholdPlaces(characteristic, window, unitAmps),
    points: now.map((point) => ({ phase: point.phase, ...place(point) })),
    tails: perPhase((phase) =>
      ways[phase].map((stretch) => stretch.map((point) => ({ ageRatio: point.ageRatio, ...place(point) }))),
    ),
  };
}

function thresholdPlaces(
  characteristic: ThresholdCharacteristic | undefined,
  window: PlaneWindow,
  unitAmps: number,
): PlanePlace[] {
  if (characteristic === undefined) return [];
  return characteristicPath(characteristic, window.restraintMax * unitAmps).map((point) => ({
    restraint: point.restraintAmps / unitAmps,
    differential: point.thresholdAmps / unitAmps,
  }));
}
