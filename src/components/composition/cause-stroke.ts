import type { PolygonCause } from '../../view/composition-polygon';

/** How a cause's side is drawn: told apart by its stroke, in the drawing and beside its name. */
export interface CauseStroke {
  readonly width: number;
  readonly dash: string | undefined;
}

export const CAUSE_STROKES: Readonly<Record<PolygonCause | 'differential', CauseStroke>> = {
  charging: { width: 2, dash: undefined },
  leakage: { width: 2, dash: '1 3' },
  ratio: { width: 4, dash: undefined },
  angle: { width: 2.5, dash: '9 3 2 3' },
  rest: { width: 2.5, dash: '2.5 2.5' },
  differential: { width: 1.25, dash: '5 4' },
};
