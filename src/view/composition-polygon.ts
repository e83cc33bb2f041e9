import type { PolygonOnWire } from '../contract/composition';
import { magnitude, sum } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import { sideLabelPlaces } from './composition-labels';
import type { PixelPoint, PixelSide, SideLabelPlace } from './composition-labels';
import { phasorFit } from './line-phasor-sum';
import type { PhasorFit } from './line-phasor-sum';

/** The causes in the order in which they are laid head to tail. */
export const POLYGON_CAUSES = ['charging', 'leakage', 'ratio', 'angle', 'rest'] as const;
export type PolygonCause = (typeof POLYGON_CAUSES)[number];

export interface PolygonBox {
  readonly width: number;
  readonly height: number;
}

/** A composition as a drawing, in pixels. */
export interface PolygonPicture {
  readonly sides: readonly (PixelSide & { readonly cause: PolygonCause })[];
  /** from the start to where the causes lead: the differential */
  readonly whole: PixelSide;
  readonly labels: readonly SideLabelPlace<PolygonCause | 'differential'>[];
}

const START: Phasor = { re: 0, im: 0 };
/** Room for labels beside what is drawn. */
const MARGIN = 24;
const SIDE_ROOM = 22;
/** A side shorter than this is not named: its figure stands in the table. */
const NAMED_PX = 3;
/** Leakage under this share of the differential, or not told from nothing, is drawn and not named. */
const LEAKAGE_SHARE_LEAST = 0.05;

export const causePhasor = (polygon: PolygonOnWire, cause: PolygonCause | 'differential'): Phasor => {
  const [re, im] = polygon[`${cause}Amps`];
  return { re, im };
};

/** The magnitude of a cause, amperes. */
export const causeAmps = (polygon: PolygonOnWire, cause: PolygonCause | 'differential'): number =>
  magnitude(causePhasor(polygon, cause));

/** Whether leakage or tapped load is worth a word: told from nothing, and not lost in the rest. */
export function leakageMatters(
  polygon: PolygonOnWire,
  leakage: { readonly low: number; readonly high: number } | null,
): boolean {
  if (leakage === null || (leakage.low <= 0 && leakage.high >= 0)) return false;
  return causeAmps(polygon, 'leakage') >= LEAKAGE_SHARE_LEAST * causeAmps(polygon, 'differential');
}

function corners(polygon: PolygonOnWire): Phasor[] {
  const reached: Phasor[] = [START];
  for (const cause of POLYGON_CAUSES) reached.push(sum([reached.at(-1)!, causePhasor(polygon, cause)]));
  return reached;
}

/** One scale and place for all these polygons, so that they can be laid side by side and compared. */
export function polygonFit(polygons: readonly PolygonOnWire[], { width, height }: PolygonBox): PhasorFit {
  const fit = phasorFit(polygons.flatMap(corners), {
    width: width - 2 * SIDE_ROOM,
    height,
    margin: MARGIN,
  });
  return {
    pixelsPerAmp: fit.pixelsPerAmp,
    place: (point) => {
      const { x, y } = fit.place(point);
      return { x: x + SIDE_ROOM, y };
    },
  };
}

/** The causes head to tail, and their names where they collide with nothing. */
export function polygonPicture(
  polygon: PolygonOnWire,
  { fit, box, words }: { fit: PhasorFit; box: PolygonBox; words: Partial<Record<string, string>> },
): PolygonPicture {
  const points = corners(polygon).map((corner) => fit.place(corner));
  const sides = POLYGON_CAUSES.map((cause, index) => ({
    cause,
    from: points[index]!,
    to: points[index + 1]!,
  }));
  const whole = { from: points[0]!, to: points[points.length - 1]! };
  const named = [...sides.map(({ cause, ...side }) => ({ id: cause, side })), wholeNamed(whole)].filter(
    ({ id, side }) => words[id] !== undefined && lengthPx(side) >= NAMED_PX,
  );
  return {
    sides,
    whole,
    labels: sideLabelPlaces(
      named.map(({ id, side }) => ({ id, words: words[id]!, beside: side })),
      { sides: [...sides, whole], kept: [whole.to, whole.from] as PixelPoint[], box },
    ),
  };
}

const wholeNamed = (side: PixelSide): { id: PolygonCause | 'differential'; side: PixelSide } => ({
  id: 'differential',
  side,
});

const lengthPx = ({ from, to }: PixelSide): number => Math.hypot(to.x - from.x, to.y - from.y);
