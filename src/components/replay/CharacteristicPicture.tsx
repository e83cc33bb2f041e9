import { useId } from 'react';
import {
  regionPicture,
  thresholdPicture,
  type DrawingRoom,
  type RegionPicture,
  type SideDrawn,
  type ThresholdPicture,
} from '../../view/replay-drawing';
import { PhaseMarker } from '../marks/PhaseMarker';

interface Props {
  readonly replayed: SideDrawn | undefined;
  readonly recorded: SideDrawn | undefined;
}

const ROOM: DrawingRoom = { width: 400, height: 250, left: 38, bottom: 34, top: 16 };
const HALF: DrawingRoom = { width: 260, height: 240, left: 0, bottom: 0, top: 0 };
const HALF_AXES: DrawingRoom = { width: 260, height: 240, left: 34, bottom: 34, top: 16 };

/** Both characteristics: over one pair of axes where both have a threshold, else each in its own plane. */
export function CharacteristicPicture({ replayed, recorded }: Props) {
  const sides = [replayed, recorded].filter((side) => side !== undefined);
  if (sides.length === 0) return null;
  const together = thresholdPicture(sides, ROOM);
  if (together !== undefined)
    return (
      <figure className="m-0">
        <ThresholdDrawing picture={together} room={ROOM} tried={replayed !== undefined} />
        <Key
          tried={replayed !== undefined}
          recorded={recorded !== undefined}
          marks={sides.some(({ points }) => points.length > 0)}
        />
      </figure>
    );
  return (
    <div className="flex flex-wrap gap-4">
      {replayed && <OwnPlane side={replayed} title="these settings" tried />}
      {recorded && <OwnPlane side={recorded} title="recorded" />}
    </div>
  );
}

function OwnPlane({ side, title, tried = false }: { side: SideDrawn; title: string; tried?: boolean }) {
  const region = regionPicture(side, HALF);
  const threshold = thresholdPicture([side], HALF_AXES);
  return (
    <figure className="m-0 min-w-0 flex-1 basis-56">
      <figcaption className="text-caption text-ink-2">{title}</figcaption>
      {region && <RegionDrawing picture={region} tried={tried} />}
      {threshold && <ThresholdDrawing picture={threshold} room={HALF_AXES} tried={tried} />}
    </figure>
  );
}

const path = (points: readonly (readonly [number, number])[]): string =>
  `M${points.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L')}`;

/** The first curve is that of the settings tried, unless there are none. */
function ThresholdDrawing({
  picture,
  room,
  tried,
}: {
  picture: ThresholdPicture;
  room: DrawingRoom;
  tried: boolean;
}) {
  const clip = useId();
  const { width, height, left, bottom, top } = room;
  const isTried = (index: number) => tried && index === 0;
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      className="block w-full"
      role="img"
      aria-label="Threshold over restraint, with the greatest point of each phase"
    >
      <clipPath id={clip}>
        <rect x={left} y={top} width={width - left} height={height - bottom - top + 6} />
      </clipPath>
      {picture.differentialTicks.map(({ y, label }) => (
        <g key={label}>
          <line x1={left} x2={width} y1={y} y2={y} stroke="var(--hairline)" />
          <text x={left - 6} y={y + 4} textAnchor="end" className="fill-ink-2 text-caption">
            {label}
          </text>
        </g>
      ))}
      {picture.restraintTicks.map(({ x, label }) => (
        <text
          key={label}
          x={Math.min(x, width - 12)}
          y={height - bottom + 16}
          textAnchor="middle"
          className="fill-ink-2 text-caption"
        >
          {label}
        </text>
      ))}
      <text x={left} y={10} className="fill-ink-2 text-caption">
        differential, A
      </text>
      <text x={width} y={height - 3} textAnchor="end" className="fill-ink-2 text-caption">
        restraint, A
      </text>
      <g clipPath={`url(#${clip})`}>
        {picture.curves.map((curve, index) => (
          <path
            key={index}
            d={path(curve)}
            fill="none"
            stroke={isTried(index) ? 'var(--accent)' : 'var(--ink)'}
            strokeWidth={2}
            strokeDasharray={isTried(index) ? undefined : '6 4'}
          />
        ))}
        {/* the recorded marks lie below and are larger: where both stand in one place, both are seen */}
        {[...picture.points.entries()].reverse().map(([index, points]) => (
          <g key={index} color={isTried(index) ? 'var(--accent)' : 'var(--ink)'}>
            {points.map(({ phase, at: [x, y] }) => (
              <g key={phase} transform={`translate(${x} ${y})`}>
                <PhaseMarker phase={phase} size={isTried(index) ? 3.5 : 6} hollow={!isTried(index)} />
              </g>
            ))}
          </g>
        ))}
      </g>
    </svg>
  );
}

function RegionDrawing({ picture, tried }: { picture: RegionPicture; tried: boolean }) {
  const { centre, radius } = picture;
  const colour = tried ? 'var(--accent)' : 'var(--ink)';
  return (
    <>
      <svg
        viewBox={`0 0 ${HALF.width} ${HALF.height}`}
        className="block w-full max-w-72"
        role="img"
        aria-label={picture.words}
      >
        <circle cx={centre[0]} cy={centre[1]} r={radius} fill="none" stroke="var(--hairline)" />
        <line
          x1={centre[0] - radius}
          x2={centre[0] + radius}
          y1={centre[1]}
          y2={centre[1]}
          stroke="var(--hairline)"
        />
        <line
          x1={centre[0]}
          x2={centre[0]}
          y1={centre[1] - radius}
          y2={centre[1] + radius}
          stroke="var(--hairline)"
        />
        <path
          d={picture.restrains}
          fill="none"
          stroke={colour}
          strokeWidth={2}
          strokeDasharray={tried ? undefined : '6 4'}
        />
        {picture.labels.map(({ at: [x, y], text }) => (
          <text key={text} x={x} y={y + 4} textAnchor="middle" className="fill-ink-2 text-caption">
            {text}
          </text>
        ))}
        <g color={colour}>
          {picture.points.map(({ phase, at: [x, y] }) => (
            <g key={phase} transform={`translate(${x} ${y})`}>
              <PhaseMarker phase={phase} size={4.5} hollow={!tried} />
            </g>
          ))}
        </g>
      </svg>
      <p className="mt-1 text-caption text-ink-2">{picture.words}</p>
    </>
  );
}

function Key({ tried, recorded, marks }: { tried: boolean; recorded: boolean; marks: boolean }) {
  return (
    <figcaption className="mt-1 flex flex-wrap gap-x-5 text-caption text-ink-2">
      {tried && (
        <Entry colour="var(--accent)" words={marks ? 'these settings, filled marks' : 'these settings'} />
      )}
      {recorded && (
        <Entry colour="var(--ink)" dash="6 4" words={marks ? 'recorded, outlined marks' : 'recorded'} />
      )}
      {marks && <span>each phase where it came nearest to its threshold</span>}
    </figcaption>
  );
}

function Entry({ colour, dash, words }: { colour: string; dash?: string; words: string }) {
  return (
    <span className="inline-flex items-center gap-1.5">
      <svg width="28" height="8" aria-hidden="true">
        <line x1="0" x2="28" y1="4" y2="4" stroke={colour} strokeWidth="2" strokeDasharray={dash} />
      </svg>
      {words}
    </span>
  );
}
