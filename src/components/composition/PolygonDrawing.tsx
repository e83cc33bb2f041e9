import type { PolygonBox, PolygonCause, PolygonPicture } from '../../view/composition-polygon';
import type { PhaseName } from '../../view/phase';
import { PhaseMarker } from '../marks/PhaseMarker';
import { CAUSE_STROKES } from './cause-stroke';

interface Props {
  readonly picture: PolygonPicture;
  readonly box: PolygonBox;
  readonly phase: PhaseName;
  readonly label: string;
  /** the colour that the phase has earned, as a text utility; ink otherwise */
  readonly ink: string;
  /** the cause that carries it */
  readonly marked: PolygonCause | undefined;
}

/** The causes of a standing level laid head to tail, and dashed where they lead. */
export function PolygonDrawing({ picture, box, phase, label, ink, marked }: Props) {
  const { sides, whole, labels } = picture;
  return (
    <svg role="img" aria-label={label} viewBox={`0 0 ${box.width} ${box.height}`} className="block w-full">
      {sides.map((side) => (
        <Stroke
          key={side.cause}
          {...side}
          cause={side.cause}
          ink={side.cause === marked ? ink : 'text-ink'}
        />
      ))}
      <Stroke {...whole} cause="differential" ink="text-ink" />
      <circle cx={whole.from.x} cy={whole.from.y} r={3} fill="var(--panel)" stroke="var(--ink)" />
      <g transform={`translate(${whole.to.x} ${whole.to.y})`} className={ink}>
        <PhaseMarker phase={phase} size={5.5} />
      </g>
      {labels.map((place) => (
        <g key={place.id}>
          {place.leader !== undefined && (
            <line
              x1={place.leader.from.x}
              y1={place.leader.from.y}
              x2={place.leader.to.x}
              y2={place.leader.to.y}
              stroke="var(--rule)"
              strokeWidth={0.75}
            />
          )}
          <text
            x={place.x}
            y={place.y}
            textAnchor="middle"
            dominantBaseline="central"
            fontSize={12}
            fill="currentColor"
            stroke="var(--panel)"
            strokeWidth={3}
            paintOrder="stroke"
            className={place.id === marked ? ink : 'text-ink-2'}
          >
            {place.words}
          </text>
        </g>
      ))}
    </svg>
  );
}

interface StrokeProps {
  readonly from: { readonly x: number; readonly y: number };
  readonly to: { readonly x: number; readonly y: number };
  readonly cause: PolygonCause | 'differential';
  readonly ink: string;
}

function Stroke({ from, to, cause, ink }: StrokeProps) {
  const { width, dash } = CAUSE_STROKES[cause];
  return (
    <line
      x1={from.x}
      y1={from.y}
      x2={to.x}
      y2={to.y}
      stroke="currentColor"
      strokeWidth={width}
      strokeDasharray={dash}
      className={ink}
    />
  );
}
