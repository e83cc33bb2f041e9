import type { AlphaPlane } from '../protection/alpha-plane';
import type { PhaseComparison } from '../protection/phase-comparison';
import type { CloudCell } from './review-cloud';
import type { ReviewPlace } from './review-place';

/** A place in a disc of radius 1 around the origin, y upwards. */
export interface DiscPlace {
  readonly x: number;
  readonly y: number;
}

/** How a plane of magnitude and angle is laid into a disc. */
export interface PolarPlane {
  /** the disc's edge: the greatest magnitude shown, in the plane's own measure */
  readonly most: number;
  place(place: ReviewPlace): DiscPlace;
  /** where the scheme restrains, as a closed outline */
  readonly restrains: readonly DiscPlace[];
  /** circles of one magnitude, with their words */
  readonly circles: readonly { readonly radius: number; readonly label: string }[];
}

const DEG = Math.PI / 180;
const ARC_STEPS = 90;

/**
 * The alpha plane with log-radial distance: |k| = 1 lies half way out, and 1/|k| as far inside it as |k| outside,
 * so that swapping the ends mirrors the drawing. What lies beyond the edge or within the centre is drawn there.
 */
export function alphaPolar({ radius, angleDeg }: Pick<AlphaPlane, 'radius' | 'angleDeg'>): PolarPlane {
  const most = radius ** 1.3;
  const span = Math.log(most);
  const reach = (lnRatio: number) => Math.min(1, Math.max(0, (lnRatio + span) / (2 * span)));
  const place = ({ x, y }: ReviewPlace) => polar(reach(x), Math.PI + y * DEG);
  const half = angleDeg / 2;
  const inner = reach(-Math.log(radius));
  const outer = reach(Math.log(radius));
  return {
    most,
    place,
    restrains: [
      ...arc(outer, { from: Math.PI - half * DEG, to: Math.PI + half * DEG }),
      ...arc(inner, { from: Math.PI + half * DEG, to: Math.PI - half * DEG }),
    ],
    circles: [
      { radius: inner, label: `1/${plain(radius)}` },
      { radius: 0.5, label: '1' },
      { radius: outer, label: plain(radius) },
    ],
  };
}

/**
 * The phase sector: the smaller current of both ends as distance, its deviation from opposition as the angle from
 * the left. The upper half alone: which end leads does not matter to the scheme.
 */
export function sectorPolar(
  { toleranceDeg, releaseAmps }: Pick<PhaseComparison, 'toleranceDeg' | 'releaseAmps'>,
  reachAmps: number,
): PolarPlane {
  const most = Math.max(reachAmps, 1.5 * releaseAmps);
  const reach = (amps: number) => Math.min(1, Math.max(0, amps / most));
  const release = reach(releaseAmps);
  const edge = Math.PI - toleranceDeg * DEG;
  return {
    most,
    place: ({ x, y }) => polar(reach(x), Math.PI - y * DEG),
    restrains: [
      { x: -1, y: 0 },
      ...arc(1, { from: Math.PI, to: edge }),
      ...arc(release, { from: edge, to: 0 }),
    ],
    circles: [
      { radius: release, label: `${plain(releaseAmps)} A` },
      { radius: 1, label: `${plain(most)} A` },
    ],
  };
}

/** A cell of the cloud as four corners of the disc. */
export function cellOutline(plane: PolarPlane, { from, to }: CloudCell): DiscPlace[] {
  return [
    plane.place(from),
    plane.place({ x: to.x, y: from.y }),
    plane.place(to),
    plane.place({ x: from.x, y: to.y }),
  ];
}

/** A square piece of the disc that is shown: its middle and half its side. */
export interface DiscWindow {
  readonly middle: DiscPlace;
  readonly half: number;
}

export const WHOLE_DISC: DiscWindow = { middle: { x: 0, y: 0 }, half: 1.08 };
const HALF_LEAST = 0.004;

/** The piece of the disc around these places, with room around them. */
export function discWindow(places: readonly DiscPlace[]): DiscWindow {
  if (places.length === 0) return WHOLE_DISC;
  const range = (values: readonly number[]) => {
    let [least, most] = [Infinity, -Infinity];
    for (const value of values) [least, most] = [Math.min(least, value), Math.max(most, value)];
    return { middle: (least + most) / 2, width: most - least };
  };
  const across = range(places.map(({ x }) => x));
  const up = range(places.map(({ y }) => y));
  const half = Math.max(HALF_LEAST, 0.7 * Math.max(across.width, up.width));
  return half > WHOLE_DISC.half ? WHOLE_DISC : { middle: { x: across.middle, y: up.middle }, half };
}

function polar(radius: number, angleRad: number): DiscPlace {
  return { x: radius * Math.cos(angleRad), y: radius * Math.sin(angleRad) };
}

function arc(radius: number, { from, to }: { from: number; to: number }): DiscPlace[] {
  return Array.from({ length: ARC_STEPS + 1 }, (_, index) =>
    polar(radius, from + ((to - from) * index) / ARC_STEPS),
  );
}

const plain = (value: number): string => String(Number(value.toPrecision(4)));
