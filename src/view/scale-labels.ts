/** Labels under a scale, placed so that no two of them collide at the given width or any greater one. */

export interface ScaleLabel {
  readonly words: string;
  /** place on the scale, 0 to 1 */
  readonly at: number;
  /** the anchors it may take, dearest first */
  readonly anchors: readonly LabelAnchor[];
}
export type LabelAnchor = 'start' | 'middle' | 'end';
export interface PlacedLabel {
  readonly words: string;
  readonly at: number;
  readonly anchor: LabelAnchor;
  readonly row: number;
}

/** Barlow at 12 px is narrower than this on average; the reserve keeps words apart. */
const CHARACTER_PX = 6.2;
const GAP_PX = 8;

interface Span {
  readonly row: number;
  readonly from: number;
  readonly to: number;
}

function spanOf(
  label: ScaleLabel,
  anchor: LabelAnchor,
  { widthPx, row }: { widthPx: number; row: number },
): Span {
  const wide = label.words.length * CHARACTER_PX;
  const x = label.at * widthPx;
  const from = anchor === 'start' ? x : anchor === 'end' ? x - wide : x - wide / 2;
  return { row, from, to: from + wide };
}

/** Places labels in the order given: earlier ones have the better place. A label that fits nowhere in two rows begins a third. */
export function placedLabels(labels: readonly ScaleLabel[], widthPx: number): PlacedLabel[] {
  const taken: Span[] = [];
  return labels.map((label) => {
    for (let row = 0; ; row += 1) {
      for (const anchor of label.anchors) {
        const span = spanOf(label, anchor, { widthPx, row });
        const inside = span.from >= -GAP_PX && span.to <= widthPx + GAP_PX;
        const free = taken.every(
          (other) => other.row !== row || span.to + GAP_PX <= other.from || span.from >= other.to + GAP_PX,
        );
        if (!free || (!inside && row < 3)) continue;
        taken.push(span);
        return { words: label.words, at: label.at, anchor, row };
      }
    }
  });
}
