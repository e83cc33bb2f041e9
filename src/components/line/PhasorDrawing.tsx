import { useId } from 'react';
import type { PhasorPicture } from '../../view/line-phasor-picture';

interface Props {
  readonly picture: PhasorPicture;
  readonly width: number;
  readonly height: number;
  readonly label: string;
  /** the differential's colour as a text utility */
  readonly ink: string;
}

/** Arrows of the terminals' currents, told apart by their stroke, and the dashed arrow of what is left over. */
const STROKES = [undefined, '7 3', '2 3', '10 3 2 3', '5 2 1 2', '1 2'];

export function PhasorDrawing({ picture, width, height, label, ink }: Props) {
  const id = useId();
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${width} ${height}`}
      className="block w-full border border-hairline"
    >
      <defs>
        <ArrowHead id={`${id}-head`} />
      </defs>
      {picture.arrows.map((arrow, index) => (
        <line
          key={arrow.terminal}
          x1={arrow.from.x}
          y1={arrow.from.y}
          x2={arrow.to.x}
          y2={arrow.to.y}
          stroke={index % 2 === 0 ? 'var(--ink)' : 'var(--ink-2)'}
          strokeWidth={1.75}
          strokeDasharray={STROKES[index]}
          markerEnd={`url(#${id}-head)`}
        />
      ))}
      <circle cx={picture.start.x} cy={picture.start.y} r={3} fill="var(--panel)" stroke="var(--ink)" />
      {picture.differential !== undefined && (
        <line
          className={ink}
          x1={picture.differential.from.x}
          y1={picture.differential.from.y}
          x2={picture.differential.to.x}
          y2={picture.differential.to.y}
          stroke="currentColor"
          strokeWidth={2.5}
          markerEnd={`url(#${id}-head)`}
        />
      )}
    </svg>
  );
}

function ArrowHead({ id }: { id: string }) {
  return (
    <marker
      id={id}
      viewBox="0 0 10 10"
      refX="9"
      refY="5"
      markerWidth="9"
      markerHeight="9"
      markerUnits="userSpaceOnUse"
      orient="auto"
    >
      <path d="M0 1.4 9.4 5 0 8.6Z" fill="context-stroke" />
    </marker>
  );
}

/** The stroke of a terminal's arrow, to stand beside its name. */
export function StrokeSample({ index }: { index: number }) {
  return (
    <svg width="26" height="8" viewBox="0 0 26 8" aria-hidden="true" className="shrink-0">
      <line
        x1="0"
        y1="4"
        x2="26"
        y2="4"
        stroke={index % 2 === 0 ? 'var(--ink)' : 'var(--ink-2)'}
        strokeWidth="1.75"
        strokeDasharray={STROKES[index]}
      />
    </svg>
  );
}
