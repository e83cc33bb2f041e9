import type { Condition } from '../../contract/condition';
import { CONDITION_INK } from '../../view/condition-words';
import { placedLabels, type ScaleLabel } from '../../view/scale-labels';
import type { TareLane, TareStripPicture } from '../../view/tare-strip';
import { PhaseMarker } from './PhaseMarker';

interface TareStripProps {
  picture: TareStripPicture;
  /** full: letters and labels, for a line that asks for attention; compact: the bare scale, for lists */
  size?: 'full' | 'compact';
  /** the values are no longer live: markers turn to outlines in second ink */
  stale?: boolean;
}

const SIZES = {
  full: { lanePx: 11, pitchPx: 15, markerPx: 4.8, overhangPx: 2.5 },
  compact: { lanePx: 6, pitchPx: 7, markerPx: 2.9, overhangPx: 1.5 },
} as const;
type Measures = (typeof SIZES)[keyof typeof SIZES];

const percent = (ratio: number): string => `${(ratio * 100).toFixed(2)}%`;

/** The horizontal scale from zero to threshold with a lane for each phase of a line. */
export function TareStrip({ picture, size = 'full', stale = false }: TareStripProps) {
  const measures = SIZES[size];
  const top = measures.overhangPx;
  const tall = measures.pitchPx * 2 + measures.lanePx + 2 * top;
  const strip = (
    <svg
      role="img"
      aria-label={picture.words}
      height={tall}
      className="block w-full overflow-visible"
      data-stale={stale || undefined}
    >
      {picture.lanes.map((lane, index) => (
        <LaneGround key={lane.phase} lane={lane} y={top + index * measures.pitchPx} measures={measures} />
      ))}
      {picture.near !== undefined && (
        <line
          x1={percent(picture.near)}
          x2={percent(picture.near)}
          y1={0}
          y2={tall}
          stroke="var(--ink-2)"
          strokeWidth={1.25}
          strokeDasharray="1.25 2.5"
        />
      )}
      <PickupLine lanes={picture.lanes} measures={measures} tall={tall} />
      <Post post={picture.post} tall={tall} />
      {picture.lanes.map((lane, index) => (
        <LaneMarker
          key={lane.phase}
          lane={lane}
          stale={stale}
          y={top + index * measures.pitchPx + measures.lanePx / 2}
          measures={measures}
        />
      ))}
    </svg>
  );
  if (size === 'compact') return <div className="pr-3">{strip}</div>;
  return (
    <div className="@container flex gap-2 pr-4 text-caption text-ink-2">
      <Letters lanes={picture.lanes} />
      <div className="min-w-0 flex-1">
        {strip}
        {picture.post !== 'none' && <Labels picture={picture} />}
      </div>
    </div>
  );
}

function Letters({ lanes }: { lanes: readonly TareLane[] }) {
  return (
    <div aria-hidden="true" className="pt-[2.5px] text-right leading-[11px]">
      {lanes.map((lane) => (
        <div key={lane.phase} className="mb-1">
          {lane.letter}
        </div>
      ))}
    </div>
  );
}

function LaneGround({ lane, y, measures }: { lane: TareLane; y: number; measures: Measures }) {
  return (
    <>
      <rect x="0" y={y} width="100%" height={measures.lanePx} fill="var(--lane)" />
      {lane.band !== undefined && (
        <rect
          x={percent(lane.band.from)}
          y={y}
          width={percent(Math.max(lane.band.to - lane.band.from, 0.004))}
          height={measures.lanePx}
          fill="var(--band)"
        />
      )}
    </>
  );
}

/** One hairline where the three pickups fall together on the scale, a piece in each lane where they do not. */
function PickupLine({
  lanes,
  measures,
  tall,
}: {
  lanes: readonly TareLane[];
  measures: Measures;
  tall: number;
}) {
  const places = lanes.flatMap((lane) => (lane.pickup === undefined ? [] : [lane.pickup]));
  if (places.length === 0) return null;
  const together = places.length === lanes.length && Math.max(...places) - Math.min(...places) < 0.006;
  const hairline = { stroke: 'var(--ink)', strokeWidth: 1 };
  if (together) {
    const x = percent(places.reduce((sum, place) => sum + place, 0) / places.length);
    return <line x1={x} x2={x} y1={0} y2={tall} {...hairline} />;
  }
  return lanes.map((lane, index) => {
    if (lane.pickup === undefined) return null;
    const x = percent(lane.pickup);
    const from = index * measures.pitchPx;
    return (
      <line
        key={lane.phase}
        x1={x}
        x2={x}
        y1={from}
        y2={from + measures.lanePx + 2 * measures.overhangPx}
        {...hairline}
      />
    );
  });
}

function Post({ post, tall }: { post: TareStripPicture['post']; tall: number }) {
  if (post === 'none') return null;
  const known = post === 'threshold';
  return (
    <svg x="100%" overflow="visible" aria-hidden="true">
      {known ? (
        <rect x={-4} width={4} height={tall} fill="var(--ink)" />
      ) : (
        <rect
          x={-3.5}
          y={0.5}
          width={3}
          height={tall - 1}
          fill="var(--panel)"
          stroke="var(--ink-2)"
          strokeDasharray="3 2"
        />
      )}
    </svg>
  );
}

/** A colour only for the phase that earns it; what is settled stays in ink. */
const markerInk = (condition: Condition, stale: boolean): string =>
  stale ? 'text-ink-2' : CONDITION_INK[condition];

interface LaneMarkerProps {
  lane: TareLane;
  y: number;
  measures: Measures;
  stale: boolean;
}

function LaneMarker({ lane, y, measures, stale }: LaneMarkerProps) {
  if (lane.marker === undefined) return null;
  const size = measures.markerPx;
  return (
    <svg x={percent(lane.marker)} y={y} overflow="visible" className={markerInk(lane.condition, stale)}>
      {lane.beyond && (
        <rect
          x={-size - 3}
          y={-size - 1.5}
          width={2 * size + 4.5}
          height={2 * size + 3}
          fill="var(--panel)"
        />
      )}
      <g transform={lane.beyond ? 'translate(-2 0)' : undefined}>
        <PhaseMarker phase={lane.phase} size={size} hollow={stale} />
      </g>
      {lane.beyond && (
        <path d={`M${size + 1.5} ${-size}l${size} ${size}l${-size} ${size}Z`} fill="currentColor" />
      )}
    </svg>
  );
}

/** Two placings, chosen by the strip's own width: one for a phone's, one for a desk's. */
const WIDTHS = [
  { px: 440, show: 'hidden @min-[29rem]:block' },
  { px: 250, show: 'block @min-[29rem]:hidden' },
] as const;
const ROW_PX = 15;

function Labels({ picture }: { picture: TareStripPicture }) {
  return WIDTHS.map(({ px, show }) => {
    const labels = placedLabels(scaleLabels(picture), px);
    const rows = Math.max(...labels.map((label) => label.row)) + 1;
    return (
      <svg
        key={px}
        aria-hidden="true"
        height={rows * ROW_PX + 2}
        className={`w-full overflow-visible ${show}`}
      >
        {labels.map((label) => (
          <text
            key={label.words}
            x={percent(label.at)}
            y={label.row * ROW_PX + 13}
            textAnchor={label.anchor}
            fill="var(--ink-2)"
            fontSize="12"
          >
            {label.words}
          </text>
        ))}
      </svg>
    );
  });
}

function scaleLabels(picture: TareStripPicture): ScaleLabel[] {
  const pickups = picture.lanes.flatMap((lane) => (lane.pickup === undefined ? [] : [lane.pickup]));
  const pickup =
    pickups.length === 0 ? undefined : pickups.reduce((sum, place) => sum + place, 0) / pickups.length;
  const atPost = pickup !== undefined && pickup > 0.985;
  const post = picture.post === 'pickup' ? 'pickup' : atPost ? 'pickup, threshold' : 'threshold';
  const labels: ScaleLabel[] = [
    { words: post, at: 1, anchors: ['end'] },
    { words: '0', at: 0, anchors: ['start'] },
  ];
  // The left of two marks leans left and the right one right, so that neighbours lean apart.
  const nearFirst = pickup === undefined || picture.near === undefined || picture.near <= pickup;
  if (picture.near !== undefined)
    labels.push({
      words: 'near',
      at: picture.near,
      anchors: nearFirst ? ['end', 'start'] : ['start', 'end'],
    });
  if (pickup !== undefined && !atPost)
    labels.push({
      words: 'pickup',
      at: pickup,
      anchors: nearFirst ? ['middle', 'start', 'end'] : ['end', 'middle', 'start'],
    });
  return labels;
}
