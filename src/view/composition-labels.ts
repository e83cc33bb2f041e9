/** Words beside the sides of a drawing, placed so that no two lie on each other and as few as can be on a side. */

export interface PixelPoint {
  readonly x: number;
  readonly y: number;
}

export interface PixelSide {
  readonly from: PixelPoint;
  readonly to: PixelPoint;
}

/** Words that want to stand beside a side. */
export interface SideLabel<Id extends string = string> {
  readonly id: Id;
  readonly words: string;
  readonly beside: PixelSide;
}

/** Where the words stand, by their middle; a leader joins them to their side where they had to move away. */
export interface SideLabelPlace<Id extends string = string> extends PixelPoint {
  readonly id: Id;
  readonly words: string;
  readonly leader: PixelSide | undefined;
}

interface Box {
  readonly width: number;
  readonly height: number;
}

interface Rectangle extends PixelPoint {
  readonly halfWidth: number;
  readonly halfHeight: number;
}

/** Barlow at 12 px is narrower than this on average. */
const CHARACTER_PX = 6;
const HALF_HEIGHT_PX = 7.5;
/** Room kept between two labels, and between a label and the edge. */
const GAP_PX = 3;
const EDGE_PX = 2;
/** Words further from their side than this are joined to it. */
const LEADER_BEYOND_PX = 11;
const ALONG = [0.5, 0.35, 0.65, 0.15, 0.85];
const AWAY_PX = [6, 12, 22, 36, 52];
const GRID_PX = 7;
const CROSSING_COST = 60;
/** Words nearer to another side than to their own would be taken for its name. */
const CONFUSED_COST = 9;

/**
 * Places for all the labels, the shortest side first since it has the least room. `kept` are rectangles that no
 * label may cover, such as a marker.
 */
export function sideLabelPlaces<Id extends string>(
  labels: readonly SideLabel<Id>[],
  { sides, kept, box }: { sides: readonly PixelSide[]; kept: readonly PixelPoint[]; box: Box },
): SideLabelPlace<Id>[] {
  const taken: Rectangle[] = kept.map(({ x, y }) => ({ x, y, halfWidth: 7, halfHeight: 7 }));
  const ordered = [...labels].sort((one, other) => lengthOf(one.beside) - lengthOf(other.beside));
  const found = ordered.map((label) => {
    const place = bestPlace(label, { sides, taken, box });
    taken.push(place);
    return { id: label.id, words: label.words, x: place.x, y: place.y, leader: leaderOf(label, place) };
  });
  return labels.map(({ id }) => found.find((place) => place.id === id)!);
}

interface Surroundings {
  readonly sides: readonly PixelSide[];
  readonly taken: readonly Rectangle[];
  readonly box: Box;
}

function bestPlace(label: SideLabel, { sides, taken, box }: Surroundings): Rectangle {
  const halfWidth = (label.words.length * CHARACTER_PX) / 2;
  const rectangle = ({ x, y }: PixelPoint): Rectangle => ({ x, y, halfWidth, halfHeight: HALF_HEIGHT_PX });
  const isFree = (place: Rectangle) =>
    isInside(place, box) && taken.every((other) => !overlap(place, other, GAP_PX));
  const others = sides.filter((side) => !isSame(side, label.beside));
  const cost = (place: Rectangle) => {
    const own = gapTo(label.beside, place);
    return (
      CROSSING_COST * sides.filter((side) => crosses(side, place)).length +
      CONFUSED_COST * others.filter((side) => gapTo(side, place) < own).length +
      own
    );
  };
  const near = besideSide(label.beside, halfWidth).map(rectangle).filter(isFree);
  const open = near.some((place) => sides.every((side) => !crosses(side, place)))
    ? near
    : [...near, ...gridOf(box).map(rectangle).filter(isFree)];
  const [first] = open
    .map((place) => ({ place, cost: cost(place) }))
    .sort((one, other) => one.cost - other.cost);
  // A box too small for its labels: better on each other than nowhere.
  return first?.place ?? rectangle({ x: box.width / 2, y: box.height / 2 });
}

function besideSide({ from, to }: PixelSide, halfWidth: number): PixelPoint[] {
  const length = lengthOf({ from, to });
  const normal =
    length === 0 ? { x: 0, y: -1 } : { x: (to.y - from.y) / length, y: (from.x - to.x) / length };
  const reach = Math.abs(normal.x) * halfWidth + Math.abs(normal.y) * HALF_HEIGHT_PX;
  return ALONG.flatMap((share) =>
    AWAY_PX.flatMap((away) =>
      [1, -1].map((turn) => ({
        x: from.x + share * (to.x - from.x) + turn * normal.x * (reach + away),
        y: from.y + share * (to.y - from.y) + turn * normal.y * (reach + away),
      })),
    ),
  );
}

function gridOf({ width, height }: Box): PixelPoint[] {
  const points: PixelPoint[] = [];
  for (let x = 0; x <= width; x += GRID_PX) for (let y = 0; y <= height; y += GRID_PX) points.push({ x, y });
  return points;
}

const lengthOf = ({ from, to }: PixelSide): number => Math.hypot(to.x - from.x, to.y - from.y);

function isInside({ x, y, halfWidth, halfHeight }: Rectangle, { width, height }: Box): boolean {
  return (
    x - halfWidth >= EDGE_PX &&
    x + halfWidth <= width - EDGE_PX &&
    y - halfHeight >= EDGE_PX &&
    y + halfHeight <= height - EDGE_PX
  );
}

function overlap(one: Rectangle, other: Rectangle, gap: number): boolean {
  return (
    Math.abs(one.x - other.x) < one.halfWidth + other.halfWidth + gap &&
    Math.abs(one.y - other.y) < one.halfHeight + other.halfHeight + gap
  );
}

/** Whether a side runs through a rectangle: the part of it inside both pairs of edges is not empty. */
function crosses({ from, to }: PixelSide, { x, y, halfWidth, halfHeight }: Rectangle): boolean {
  let enters = 0;
  let leaves = 1;
  for (const [start, run, middle, half] of [
    [from.x, to.x - from.x, x, halfWidth],
    [from.y, to.y - from.y, y, halfHeight],
  ] as const) {
    if (run === 0) {
      if (Math.abs(start - middle) > half) return false;
      continue;
    }
    const one = (middle - half - start) / run;
    const other = (middle + half - start) / run;
    enters = Math.max(enters, Math.min(one, other));
    leaves = Math.min(leaves, Math.max(one, other));
  }
  return enters < leaves;
}

const isSame = (one: PixelSide, other: PixelSide): boolean =>
  one.from.x === other.from.x &&
  one.from.y === other.from.y &&
  one.to.x === other.to.x &&
  one.to.y === other.to.y;

/** How far a rectangle is from a side, going by points along it. */
function gapTo({ from, to }: PixelSide, { x, y, halfWidth, halfHeight }: Rectangle): number {
  return Math.min(
    ...ALONG.map((share) =>
      Math.hypot(
        Math.max(0, Math.abs(from.x + share * (to.x - from.x) - x) - halfWidth),
        Math.max(0, Math.abs(from.y + share * (to.y - from.y) - y) - halfHeight),
      ),
    ),
  );
}

function leaderOf({ beside }: SideLabel, place: Rectangle): PixelSide | undefined {
  const { from, to } = beside;
  const squared = (to.x - from.x) ** 2 + (to.y - from.y) ** 2;
  const along = (place.x - from.x) * (to.x - from.x) + (place.y - from.y) * (to.y - from.y);
  const share = squared === 0 ? 0.5 : Math.max(0.15, Math.min(0.85, along / squared));
  const foot = { x: from.x + share * (to.x - from.x), y: from.y + share * (to.y - from.y) };
  const edge = {
    x: Math.max(place.x - place.halfWidth, Math.min(foot.x, place.x + place.halfWidth)),
    y: Math.max(place.y - place.halfHeight, Math.min(foot.y, place.y + place.halfHeight)),
  };
  const isFar = Math.hypot(edge.x - foot.x, edge.y - foot.y) > LEADER_BEYOND_PX;
  return isFar ? { from: foot, to: edge } : undefined;
}
