import type { ReplayPoint } from '../contract/replay';
import type { CharacteristicOnWire } from '../contract/settings-version';
import {
  characteristicPath,
  isThresholdCharacteristic,
  type ThresholdCharacteristic,
} from '../protection/characteristic';
import type { PhaseName } from './phase';

/** Where a drawing has its room, px; the plot lies inside, right of `left` and above `bottom`. */
export interface DrawingRoom {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly bottom: number;
  readonly top: number;
}

export type Pixel = readonly [x: number, y: number];

export interface PhasePoint {
  readonly phase: PhaseName;
  readonly point: ReplayPoint;
}

export interface SideDrawn {
  readonly characteristic: CharacteristicOnWire;
  readonly points: readonly PhasePoint[];
}

export interface ThresholdPicture {
  readonly curves: readonly (readonly Pixel[])[];
  readonly points: readonly (readonly { readonly phase: PhaseName; readonly at: Pixel }[])[];
  readonly restraintTicks: readonly { readonly x: number; readonly label: string }[];
  readonly differentialTicks: readonly { readonly y: number; readonly label: string }[];
}

const TICKS = 5;

/** A step of 1, 2 or 5 times a power of ten that parts a span into about so many. */
export function tickStep(span: number, count: number): number {
  const rough = span / count;
  const power = 10 ** Math.floor(Math.log10(rough));
  return power * ([1, 2, 5, 10].find((step) => step * power >= rough) ?? 10);
}

/**
 * Threshold curves over one pair of axes, in their order, each with the points of its side. The window shows the
 * points and where the curves part, not the far end of a slope. Undefined for schemes without a threshold.
 */
export function thresholdPicture(
  sides: readonly SideDrawn[],
  room: DrawingRoom,
): ThresholdPicture | undefined {
  if (!sides.every(({ characteristic }) => isThresholdCharacteristic(characteristic))) return undefined;
  const kinds = sides.map(({ characteristic }) => characteristic as ThresholdCharacteristic);
  const points = sides.flatMap((side) => side.points.map(({ point }) => point));
  const restraintMax = Math.max(
    ...kinds.map(shownRestraint),
    ...points.map((point) => 1.3 * (point.restraintAmps ?? 0)),
  );
  const paths = kinds.map((kind) => characteristicPath(kind, restraintMax));
  const least = Math.min(...paths.map((path) => path[path.length - 1]!.thresholdAmps));
  const pickupMax = Math.max(...kinds.map(({ pickupAmps }) => pickupAmps));
  const differentialMax =
    1.1 * Math.max(least, 1.4 * pickupMax, ...points.map((point) => 1.15 * point.differentialAmps));
  const x = (amps: number) => room.left + (amps / restraintMax) * (room.width - room.left);
  const y = (amps: number) =>
    room.height - room.bottom - (amps / differentialMax) * (room.height - room.bottom - room.top);
  return {
    curves: paths.map((path) =>
      path.map((point) => [x(point.restraintAmps), y(point.thresholdAmps)] as const),
    ),
    points: sides.map((side) =>
      side.points.flatMap(({ phase, point }) =>
        point.restraintAmps === null
          ? []
          : [{ phase, at: [x(point.restraintAmps), y(point.differentialAmps)] as const }],
      ),
    ),
    restraintTicks: ticks(restraintMax).map((amps) => ({ x: x(amps), label: String(amps) })),
    differentialTicks: ticks(differentialMax).map((amps) => ({ y: y(amps), label: String(amps) })),
  };
}

/** So far that the knee and a stretch of what follows are seen. */
function shownRestraint(characteristic: ThresholdCharacteristic): number {
  if (characteristic.kind === 'adaptive') return 4 * characteristic.pickupAmps;
  const { kneeAmps, pickupAmps } = characteristic;
  return Math.max(1.35 * kneeAmps, 4 * pickupAmps);
}

function ticks(most: number): number[] {
  const step = tickStep(most, TICKS);
  const count = Math.floor(most / step + 1e-9);
  return Array.from({ length: count + 1 }, (_, index) => Number((index * step).toPrecision(10)));
}

export interface RegionPicture {
  readonly centre: Pixel;
  readonly radius: number;
  /** outline of where the scheme restrains */
  readonly restrains: string;
  readonly points: readonly { readonly phase: PhaseName; readonly at: Pixel }[];
  readonly labels: readonly { readonly at: Pixel; readonly text: string }[];
  readonly words: string;
}

/** A scheme with a region in the plane of its ratio or angle. Undefined for one with a threshold. */
export function regionPicture(
  { characteristic, points }: SideDrawn,
  room: DrawingRoom,
): RegionPicture | undefined {
  const radius = (Math.min(room.width - room.left, room.height - room.bottom - room.top) - 60) / 2;
  const centre: Pixel = [(room.left + room.width) / 2, room.top + 30 + radius];
  const place = (share: number, angleDeg: number): Pixel => {
    const angle = (angleDeg * Math.PI) / 180;
    return [centre[0] + share * radius * Math.cos(angle), centre[1] - share * radius * Math.sin(angle)];
  };
  const shared = { centre, radius };
  if (characteristic.kind === 'alpha-plane') {
    const share = ratioShare(characteristic.radius);
    const half = characteristic.angleDeg / 2;
    return {
      ...shared,
      restrains: ringSector(place, {
        inner: share(1 / characteristic.radius),
        outer: share(characteristic.radius),
        half,
      }),
      points: points.flatMap(({ phase, point: { region } }) =>
        region?.kind === 'alpha-plane' ? [{ phase, at: place(share(region.ratio), region.angleDeg) }] : [],
      ),
      labels: [
        { at: place(1.17, 180), text: '180°' },
        { at: place(1.12, 0), text: '0°' },
      ],
      words:
        'ratio of the ends’ currents, distance from the centre logarithmic; inside the outline it restrains',
    };
  }
  if (characteristic.kind === 'phase-comparison')
    return {
      ...shared,
      restrains: ringSector(place, { inner: 0, outer: 1, half: characteristic.toleranceDeg }),
      points: points.flatMap(({ phase, point: { region } }) =>
        region?.kind === 'phase-comparison' ? [{ phase, at: place(0.8, 180 - region.deviationDeg) }] : [],
      ),
      labels: [
        { at: place(1.17, 180), text: '180°' },
        { at: place(1.12, 0), text: '0°' },
      ],
      words: 'angle between the ends’ currents; inside the outline it restrains',
    };
  return undefined;
}

/** Distance from the centre for a ratio: its logarithm, so that swapping the ends mirrors at the ring of 1. */
function ratioShare(radius: number): (ratio: number) => number {
  const reach = 1.6 * Math.log(radius);
  return (ratio) => Math.min(1, Math.max(0, (Math.log(ratio) + reach) / (2 * reach)));
}

function ringSector(
  place: (share: number, angleDeg: number) => Pixel,
  { inner, outer, half }: { inner: number; outer: number; half: number },
): string {
  // drawn as a polygon of short sides: a full turn has no arc of its own
  const steps = Math.max(12, Math.ceil(half / 3));
  const arc = (share: number, backwards: boolean) =>
    Array.from({ length: 2 * steps + 1 }, (_, index) => {
      const turn = (index - steps) / steps;
      return place(share, 180 + half * (backwards ? -turn : turn));
    });
  const outline = [...arc(outer, false), ...(inner > 0 ? arc(inner, true) : [place(0, 180)])];
  return `M${outline.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L')}Z`;
}
