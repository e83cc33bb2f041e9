/** A mark on a drawing, in its pixels. */
export interface LabelledMark<Name extends string = string> {
  readonly name: Name;
  readonly x: number;
  readonly y: number;
}

/** Where a mark's label goes; a label that had to move away from its mark is joined to it by a leader. */
export interface LabelPlace<Name extends string = string> extends LabelledMark<Name> {
  readonly labelX: number;
  readonly labelY: number;
  readonly side: 'left' | 'right';
  readonly leader: boolean;
}

interface LabelBox {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

const GAP = 13;
const LINE_HEIGHT = 16;
const NEIGHBOURHOOD = 46;

/**
 * Places one-letter labels beside marks so that no two lie on each other and none leaves the box: marks that
 * stand close share a column of labels beside them, in the order in which they stand.
 */
export function labelPlaces<Name extends string>(
  marks: readonly LabelledMark<Name>[],
  box: LabelBox,
): LabelPlace<Name>[] {
  return clusters(marks).flatMap((cluster) => columnPlaces(cluster, box));
}

function clusters<Name extends string>(marks: readonly LabelledMark<Name>[]): LabelledMark<Name>[][] {
  const found: LabelledMark<Name>[][] = [];
  for (const mark of marks) {
    const touching = found.filter((cluster) => cluster.some((other) => areNear(mark, other)));
    for (const cluster of touching) found.splice(found.indexOf(cluster), 1);
    found.push([...touching.flat(), mark]);
  }
  return found;
}

function areNear(one: LabelledMark, other: LabelledMark): boolean {
  return Math.abs(one.x - other.x) < NEIGHBOURHOOD && Math.abs(one.y - other.y) < NEIGHBOURHOOD;
}

function columnPlaces<Name extends string>(
  cluster: readonly LabelledMark<Name>[],
  box: LabelBox,
): LabelPlace<Name>[] {
  const rightmost = Math.max(...cluster.map((mark) => mark.x));
  const side = rightmost + 2 * GAP > box.right ? 'left' : 'right';
  const labelX = side === 'right' ? rightmost + GAP : Math.min(...cluster.map((mark) => mark.x)) - GAP;
  const ordered = [...cluster].sort((one, other) => one.y - other.y);
  const wanted = ordered.map((mark) => mark.y);
  const middle = wanted.reduce((total, y) => total + y, 0) / wanted.length;
  const apart = wanted.every((y, index) => index === 0 || y - wanted[index - 1]! >= LINE_HEIGHT);
  const height = LINE_HEIGHT * (ordered.length - 1);
  const top = within(middle - height / 2, box.top + LINE_HEIGHT / 2, box.bottom - LINE_HEIGHT / 2 - height);
  return ordered.map((mark, index) => {
    const labelY = apart ? mark.y : top + index * LINE_HEIGHT;
    const moved = Math.abs(labelY - mark.y) > 4 || Math.abs(labelX - mark.x) > GAP + 4;
    return { ...mark, labelX, labelY, side, leader: moved };
  });
}

function within(value: number, least: number, most: number): number {
  return Math.max(least, Math.min(value, most));
}

/** Half of the room that a word of the drawing needs, and half of what a mark with its letter takes. */
const WORD_REACH = { x: 60, y: 18 };

/** The first of the places wished for at which a word lies on no mark; undefined when all are taken. */
export function wordPlace(
  candidates: readonly { readonly x: number; readonly y: number }[],
  marks: readonly LabelledMark[],
): { readonly x: number; readonly y: number } | undefined {
  return candidates.find(({ x, y }) =>
    marks.every((mark) => Math.abs(mark.x - x) > WORD_REACH.x || Math.abs(mark.y - y) > WORD_REACH.y),
  );
}
