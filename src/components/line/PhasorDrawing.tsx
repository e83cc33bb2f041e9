import type { PhasorPicture } from '../../view/line-phasor-picture';

interface Props {
  readonly picture: PhasorPicture;
  readonly width: number;
  readonly height: number;
  readonly label: string;
  /** the differential's colour as a text utility */
  readonly ink: string;
  readonly faded: boolean;
}

/** Arrows of the terminals' currents, told apart by their stroke, and the dashed arrow of what is left over. */
const STROKES = [undefined, '7 3', '2 3', '10 3 2 3', '5 2 1 2', '1 2'];

export function PhasorDrawing({ picture, width, height, label, ink, faded }: Props) {
  const { arrows, start, differential } = picture;
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${width} ${height}`}
      className="block w-full border border-hairline"
    >
      {arrows.map((arrow, index) => (
        <Arrow
          key={arrow.terminal}
          {...arrow}
          className={faded ? 'text-ink-2' : inkOf(index)}
          width={1.75}
          dash={STROKES[index]}
        />
      ))}
      <circle cx={start.x} cy={start.y} r={3} fill="var(--panel)" stroke="var(--ink)" />
      {differential !== undefined && <Arrow {...differential} className={ink} width={2.5} />}
    </svg>
  );
}

interface ArrowProps {
  readonly from: { readonly x: number; readonly y: number };
  readonly to: { readonly x: number; readonly y: number };
  readonly className: string;
  readonly width: number;
  readonly dash?: string | undefined;
}

/** The head is a shape of its own: not every browser gives a marker the colour of its line. */
function Arrow({ from, to, className, width, dash }: ArrowProps) {
  const angleDeg = (Math.atan2(to.y - from.y, to.x - from.x) * 180) / Math.PI;
  return (
    <g className={className}>
      <line
        x1={from.x}
        y1={from.y}
        x2={to.x}
        y2={to.y}
        stroke="currentColor"
        strokeWidth={width}
        strokeDasharray={dash}
      />
      <path
        d="M0 0 -8.5 3.4 -8.5 -3.4Z"
        transform={`translate(${to.x} ${to.y}) rotate(${angleDeg.toFixed(1)})`}
        fill="currentColor"
      />
    </g>
  );
}

const inkOf = (index: number): string => (index % 2 === 0 ? 'text-ink' : 'text-ink-2');

/** The stroke of a terminal's arrow, to stand beside its name. */
export function StrokeSample({ index }: { index: number }) {
  return (
    <svg width="26" height="8" viewBox="0 0 26 8" aria-hidden="true" className={`shrink-0 ${inkOf(index)}`}>
      <line
        x1="0"
        y1="4"
        x2="26"
        y2="4"
        stroke="currentColor"
        strokeWidth="1.75"
        strokeDasharray={STROKES[index]}
      />
    </svg>
  );
}
