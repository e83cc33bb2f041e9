import type { LineSummary } from '../contract/lines';
import type { AlphaPlane } from '../protection/alpha-plane';
import { isComputable } from '../protection/evaluation';
import type { Evaluation } from '../protection/evaluation';
import type { Loadability, PredictedPoint } from '../protection/loadability';
import type { PerPhase } from '../protection/phase';
import type { PhaseComparison } from '../protection/phase-comparison';
import { ampsText, percentOfMarkText } from './figures';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import type { CloudCell } from './review-cloud';
import type { ReviewSnapshot } from './review-now';
import { reviewPlace } from './review-place';
import type { ReviewPlace } from './review-place';
import type { DiscPlace, PolarPlane } from './review-polar';
import type { PhaseLetters } from './site-custom';

/** A live point on a scheme's region, with its two measures in words. */
export interface RegionMark extends DiscPlace {
  readonly phase: PhaseName;
  readonly words: string;
}

/** The live points; a phase whose currents are too small to have a place is left out. */
export function regionMarks(
  { snapshot, points }: { snapshot: ReviewSnapshot; points: PerPhase<Evaluation> },
  plane: PolarPlane,
): RegionMark[] {
  return PHASES.flatMap((phase) => {
    const found = points[phase];
    if (!isComputable(found) || found.region === undefined) return [];
    const place = reviewPlace(found, snapshot.zone[phase].currents);
    if (place === undefined) return [];
    return [{ phase, ...plane.place(place), words: placeWords(found.region.kind, place) }];
  });
}

function placeWords(kind: 'alpha-plane' | 'phase-comparison', { x, y }: ReviewPlace): string {
  if (kind === 'alpha-plane') return `|k| ${Math.exp(x).toFixed(3)}, ${(180 + y).toFixed(2)}°`;
  return `${y.toFixed(2)}° from opposition, smaller current ${ampsText(x)}`;
}

/** Predictions farther apart than this share of the disc's radius are not joined: the way between is not known. */
const JOINED_MOST = 0.3;

/**
 * The predicted way from no load to emergency rating in pieces that can be drawn as lines. At no load the charging
 * alone flows in at all ends, so that the first step out of it may be a leap across the plane. The through current
 * stands for the smaller end's current.
 */
export function pathPieces({ path }: Pick<Loadability, 'path'>, plane: PolarPlane): DiscPlace[][] {
  const pieces: DiscPlace[][] = [];
  for (const point of path) {
    const found = predictedPlace(point);
    if (found === undefined) continue;
    const place = plane.place(found);
    const last = pieces.at(-1)?.at(-1);
    if (last === undefined || Math.hypot(place.x - last.x, place.y - last.y) > JOINED_MOST) pieces.push([]);
    pieces.at(-1)!.push(place);
  }
  return pieces;
}

function predictedPlace(point: PredictedPoint): ReviewPlace | undefined {
  if (point.region === undefined) return undefined;
  const through = { re: point.throughAmps, im: 0 };
  return reviewPlace(point, [through]);
}

/** What a window around the points shows, in the plane's own measures. */
export function regionSpan(
  kind: 'alpha-plane' | 'phase-comparison',
  cells: readonly Pick<CloudCell, 'from' | 'to'>[],
): string {
  if (cells.length === 0) return 'Around the points of now';
  const least = (of: (cell: (typeof cells)[number]) => number) =>
    cells.reduce((found, cell) => Math.min(found, of(cell)), Infinity);
  const most = (of: (cell: (typeof cells)[number]) => number) => -least((cell) => -of(cell));
  const x = [least(({ from }) => from.x), most(({ to }) => to.x)] as const;
  const y = [least(({ from }) => from.y), most(({ to }) => to.y)] as const;
  if (kind === 'alpha-plane') {
    const [low, high] = x.map((ln) => Math.exp(ln).toFixed(3));
    return `Around the points: |k| from ${low} to ${high}, arg k from ${(180 + y[0]).toFixed(1)}° to ${(180 + y[1]).toFixed(1)}°`;
  }
  return `Around the points: smaller current from ${ampsText(x[0])} to ${ampsText(x[1])}, ${y[0].toFixed(1)}° to ${y[1].toFixed(1)}° from opposition`;
}

/** The plane in a sentence, for whoever does not see it. */
export function regionSentence(
  { phases }: Pick<LineSummary, 'phases'>,
  characteristic: AlphaPlane | PhaseComparison,
  letters: PhaseLetters,
): string {
  const told = PHASES.map(
    (phase) => `phase ${letters[phase]} at ${percentOfMarkText(phases[phase].utilisation)}`,
  ).join(', ');
  const region =
    characteristic.kind === 'alpha-plane'
      ? `restrains for |k| from 1/${characteristic.radius} to ${characteristic.radius} within ${characteristic.angleDeg / 2}° of 180°`
      : `restrains within ${characteristic.toleranceDeg}° of opposition, and below ${ampsText(characteristic.releaseAmps)}`;
  return `The scheme ${region}. Utilisation: ${told}.`;
}
