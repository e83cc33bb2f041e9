import { useId, useMemo } from 'react';
import type { AlphaPlane } from '../../protection/alpha-plane';
import { isComputable } from '../../protection/evaluation';
import type { PhaseComparison } from '../../protection/phase-comparison';
import { CONDITION_INK } from '../../view/condition-words';
import { ampsText } from '../../view/figures';
import { phaseRows } from '../../view/line-phase-rows';
import type { PhaseName } from '../../view/phase';
import { labelPlaces } from '../../view/plane-labels';
import type { PlaneExtent } from '../../view/plane-window';
import { cloudCells } from '../../view/review-cloud';
import type { worstLoadability } from '../../view/review-margins';
import { alphaPolar, cellOutline, discWindow, sectorPolar, WHOLE_DISC } from '../../view/review-polar';
import type { DiscPlace, DiscWindow } from '../../view/review-polar';
import { pathPieces, regionMarks, regionSentence, regionSpan } from '../../view/review-region';
import type { RegionMark } from '../../view/review-region';
import { PhaseMarker } from '../marks/PhaseMarker';
import type { PlanePanelProps } from './plane-panel-props';

interface Props extends Pick<PlanePanelProps, 'line' | 'site' | 'faded' | 'convention' | 'live' | 'cloud'> {
  readonly characteristic: AlphaPlane | PhaseComparison;
  readonly extent: PlaneExtent;
  readonly shown: PhaseName | 'all';
  readonly worst: ReturnType<typeof worstLoadability>;
}

const SIDE = 400;

/** A scheme's region in its own plane: hatched where it operates, the cloud, the live points, the path to emergency rating. */
export function RegionPlane(props: Props) {
  const { line, characteristic, extent, shown, worst, cloud, live, site } = props;
  const plane = useMemo(
    () =>
      characteristic.kind === 'alpha-plane'
        ? alphaPolar(characteristic)
        : sectorPolar(characteristic, 1.05 * line.emergencyRatingAmps),
    [characteristic, line.emergencyRatingAmps],
  );
  const cells = useMemo(
    () => (cloud?.plane === characteristic.kind ? cloudCells(cloud, shown) : []),
    [cloud, characteristic.kind, shown],
  );
  const marks = live !== undefined && isComputable(live) ? regionMarks(live, plane) : [];
  const outlines = useMemo(
    () => cells.map((cell) => ({ density: cell.density, corners: cellOutline(plane, cell) })),
    [cells, plane],
  );
  const half = characteristic.kind === 'phase-comparison';
  const near = extent === 'near the points';
  const window = near ? discWindow([...marks, ...outlines.flatMap(({ corners }) => corners)]) : WHOLE_DISC;
  const height = half && !near ? SIDE / 2 + 30 : SIDE;
  const at = onScreen(window);
  return (
    <figure className="m-0 mx-auto w-full max-w-[29rem]">
      <svg
        viewBox={`0 0 ${SIDE} ${height}`}
        role="img"
        aria-label={regionSentence(line, characteristic, site.phaseLetters)}
        className="block w-full"
      >
        <Ground {...props} plane={plane} window={window} at={at} half={half && !near} />
        {outlines.map(({ corners, density }, index) => (
          <path
            key={index}
            d={outline(corners, at)}
            fill="var(--ink-2)"
            stroke="var(--ink-2)"
            strokeWidth={0.75}
            opacity={0.12 + 0.6 * density}
          />
        ))}
        {worst !== undefined && <Path pieces={pathPieces(worst.load, plane)} at={at} />}
        <Marks {...props} marks={marks} at={at} height={height} />
      </svg>
      <figcaption className="mt-1 text-caption text-ink-2">
        {near ? regionSpan(characteristic.kind, cells) : REGION_WORDS[characteristic.kind]}
        {characteristic.kind === 'alpha-plane' &&
          `. Operates on the hatched side, and only with a differential of ${ampsText(characteristic.pickupAmps)} or more`}
        .
      </figcaption>
    </figure>
  );
}

const REGION_WORDS = {
  'alpha-plane':
    'k = remote over local current; distance by the logarithm of |k|, |k| = 1 half way out; a through current lies at the left',
  'phase-comparison':
    'Distance: the smaller current of both ends; angle from the left: deviation from opposition; hatched where it operates',
} as const;

type At = (place: DiscPlace) => DiscPlace;

function onScreen({ middle, half }: DiscWindow): At {
  return ({ x, y }) => ({
    x: hundredths(SIDE / 2 + ((x - middle.x) / half) * (SIDE / 2)),
    y: hundredths(SIDE / 2 - ((y - middle.y) / half) * (SIDE / 2)),
  });
}

// Server and browser disagree in a sine's last digit, and would draw the same page differently.
const hundredths = (pixels: number): number => Math.round(pixels * 100) / 100;
const pair = ({ x, y }: DiscPlace): string => `${x},${y}`;
const outline = (places: readonly DiscPlace[], at: At): string =>
  places.length === 0 ? '' : `M${places.map((place) => pair(at(place))).join('L')}Z`;

/** The predicted way: dashed, a lone prediction as a dot, a ring where the emergency rating is. */
function Path({ pieces, at }: { pieces: readonly (readonly DiscPlace[])[]; at: At }) {
  const end = pieces.at(-1)?.at(-1);
  const alone = pieces[0]?.length === 1 ? pieces[0][0] : undefined;
  const start = alone && at(alone);
  return (
    <g fill="none" stroke="var(--accent)" strokeWidth={1.5}>
      {pieces.map((piece, index) =>
        piece.length === 1 ? (
          <circle key={index} cx={at(piece[0]!).x} cy={at(piece[0]!).y} r={2.5} fill="var(--accent)" />
        ) : (
          <polyline
            key={index}
            points={piece.map((place) => pair(at(place))).join(' ')}
            strokeDasharray="5 4"
          />
        ),
      )}
      {start !== undefined && (
        <text x={start.x} y={start.y + 16} textAnchor="middle" {...WORD} fill="var(--accent)">
          no load
        </text>
      )}
      {end !== undefined && <circle cx={at(end).x} cy={at(end).y} r={4} fill="var(--panel)" />}
    </g>
  );
}

interface GroundProps extends Props {
  readonly plane: ReturnType<typeof alphaPolar>;
  readonly window: DiscWindow;
  readonly at: At;
  readonly half: boolean;
}

/** The disc hatched where the scheme operates, its region, its circles and its rays with their words. */
function Ground({ characteristic, plane, window, at, half }: GroundProps) {
  const id = useId();
  const centre = at({ x: 0, y: 0 });
  const edge = SIDE / 2 / window.half;
  const whole = window === WHOLE_DISC;
  // which end leads does not matter to a phase comparison: there is nothing below the line of opposition
  const upperOnly = characteristic.kind === 'phase-comparison';
  return (
    <>
      <defs>
        <pattern id={`${id}-hatch`} width="8" height="8" patternUnits="userSpaceOnUse">
          <path d="M-1 1 1 -1M0 8 8 0M7 9 9 7" stroke="var(--rule)" strokeWidth="0.8" opacity="0.55" />
        </pattern>
        <clipPath id={`${id}-clip`}>
          <rect x="0" y="0" width={SIDE} height={upperOnly ? Math.max(0, centre.y) : SIDE} />
        </clipPath>
      </defs>
      <g clipPath={`url(#${id}-clip)`}>
        <circle cx={centre.x} cy={centre.y} r={edge} fill={`url(#${id}-hatch)`} stroke="var(--hairline)" />
        <path d={outline(plane.restrains, at)} fill="var(--panel)" stroke="var(--ink)" strokeWidth="2" />
        {plane.circles.map((circle) => (
          <circle
            key={circle.label}
            cx={centre.x}
            cy={centre.y}
            r={edge * circle.radius}
            fill="none"
            stroke="var(--hairline)"
          />
        ))}
        <line
          x1={centre.x - edge}
          x2={centre.x + edge}
          y1={centre.y}
          y2={centre.y}
          stroke="var(--hairline)"
        />
        <line
          x1={centre.x}
          x2={centre.x}
          y1={centre.y - edge}
          y2={centre.y + edge}
          stroke="var(--hairline)"
        />
      </g>
      {upperOnly && (
        <line x1={centre.x - edge} x2={centre.x + edge} y1={centre.y} y2={centre.y} stroke="var(--rule)" />
      )}
      {whole && <Words characteristic={characteristic} plane={plane} at={at} half={half} />}
    </>
  );
}

const WORD = {
  fontSize: 12,
  fill: 'var(--ink-2)',
  stroke: 'var(--panel)',
  strokeWidth: 3,
  paintOrder: 'stroke',
} as const;

function Words({
  characteristic,
  plane,
  at,
  half,
}: Pick<GroundProps, 'characteristic' | 'plane' | 'at' | 'half'>) {
  const angles =
    characteristic.kind === 'alpha-plane'
      ? [
          { x: 1, y: 0, text: '0°', anchor: 'end' },
          { x: 0, y: 1, text: '90°', anchor: 'start' },
          { x: -1, y: 0, text: '180°', anchor: 'start' },
          { x: 0, y: -1, text: '270°', anchor: 'start' },
        ]
      : [
          { x: -1, y: 0, text: 'opposed', anchor: 'start' },
          { x: 0, y: 1, text: '90°', anchor: 'start' },
          { x: 1, y: 0, text: 'in phase', anchor: 'end' },
        ];
  return (
    <>
      {angles.map(({ x, y, text, anchor }) => {
        const place = at({ x, y });
        const below = half && y === 0 ? 18 : y === 0 ? -5 : y > 0 ? 14 : -6;
        return (
          <text
            key={text}
            x={place.x + (y === 0 ? 0 : 5)}
            y={place.y + below}
            textAnchor={anchor as 'start' | 'end'}
            {...WORD}
          >
            {text}
          </text>
        );
      })}
      {plane.circles.map(({ radius, label }) => {
        const place = at(half ? { x: radius, y: 0 } : { x: 0.707 * radius, y: -0.707 * radius });
        return (
          <text
            key={label}
            x={place.x + (half ? 0 : 3)}
            y={place.y + (half ? -4 : 10)}
            textAnchor={half ? 'end' : 'start'}
            {...WORD}
          >
            {label}
          </text>
        );
      })}
      <text {...at(half ? { x: 0.45, y: 0.6 } : { x: 0.62, y: 0.28 })} textAnchor="middle" {...WORD}>
        operates
      </text>
      <text {...at(half ? { x: -0.62, y: 0.22 } : { x: -0.5, y: 0.34 })} textAnchor="middle" {...WORD}>
        restrains
      </text>
    </>
  );
}

interface MarksProps extends Props {
  readonly marks: readonly RegionMark[];
  readonly at: At;
  readonly height: number;
}

/** The live points with their letters; hollow while not live. */
function Marks({ line, site, faded, convention, marks, at, height }: MarksProps) {
  const rows = new Map(phaseRows(line, 'amperes', site).map((row) => [row.phase, row]));
  const placed = marks.map((mark) => ({ ...mark, ...at(mark), name: site.phaseLetters[mark.phase] }));
  const labels = labelPlaces(placed, { left: 0, right: SIDE, top: 0, bottom: height });
  return (
    <>
      {placed.map((mark) => {
        const row = rows.get(mark.phase)!;
        const marked = row.condition === 'over' || row.condition === 'near' || row.condition === 'rising';
        return (
          <g
            key={mark.phase}
            transform={`translate(${mark.x} ${mark.y})`}
            className={faded ? 'text-ink-2' : marked ? CONDITION_INK[row.condition] : 'text-ink'}
          >
            <title>{`phase ${row.letter}: ${mark.words}; ${row.utilisation} utilised. ${convention}`}</title>
            <PhaseMarker phase={mark.phase} hollow={faded} />
          </g>
        );
      })}
      {labels.map((label) => (
        <text
          key={label.name}
          x={label.labelX}
          y={label.labelY + 4}
          textAnchor={label.side === 'right' ? 'start' : 'end'}
          {...WORD}
          fill="var(--ink)"
          fontWeight={500}
        >
          {label.name}
        </text>
      ))}
    </>
  );
}
