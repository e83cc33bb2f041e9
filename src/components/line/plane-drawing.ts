import type { PhasePlace, PlanePlace, PlaneShape } from '../../view/plane-shape';
import type { ChartInk } from '../charts/chart-ink';

/** Everything the plane draws, in the unit shown. */
export interface PlaneDrawing extends Omit<PlaneShape, 'points'> {
  readonly ink: ChartInk;
  readonly points: readonly PlaneMark[];
  /** values are not live: marks are outlines */
  readonly faded: boolean;
  readonly names: { readonly restraint: string; readonly differential: string };
  /** where snapshots lay, the denser the darker */
  readonly cloud?: readonly CloudPatch[];
  /** where a prediction goes, with the word at its end */
  readonly path?: { readonly places: readonly PlanePlace[]; readonly label: string };
}

/** A rectangle of the plane; `density` from 0 to 1. */
export interface CloudPatch {
  readonly from: PlanePlace;
  readonly to: PlanePlace;
  readonly density: number;
}

export type PlaneMark = PhasePlace & {
  readonly letter: string;
  readonly colour: string;
  /** what the tooltip says, line by line */
  readonly lines: readonly string[];
};
