import type { Condition } from '../../contract/condition';
import { CONDITION_INK } from '../../view/condition-words';
import { ampsText } from '../../view/figures';
import type { SparklinePicture } from '../../view/sparkline';

interface SparklineProps {
  picture: SparklinePicture | undefined;
  condition: Condition;
  /** without its colour: the condition that gave it may no longer be so */
  faded?: boolean;
}

const WIDE = 240;
const TALL = 40;

/** Daily standing levels with the near mark of the pickup dotted above them. */
export function Sparkline({ picture, condition, faded = false }: SparklineProps) {
  if (picture === undefined)
    return <p className="text-caption text-ink-2">No trend yet: fewer than two days known.</p>;
  const { runs, near, dayCount, firstAmps, lastAmps } = picture;
  const ink = faded || condition === 'blind' ? 'text-ink-2' : CONDITION_INK[condition];
  const y = (place: number) => TALL - 1 - place * (TALL - 2);
  return (
    <div className="text-caption text-ink-2">
      <svg
        role="img"
        aria-label={`Standing level over ${dayCount} days, from ${ampsText(firstAmps)} to ${ampsText(lastAmps)}.`}
        viewBox={`0 0 ${WIDE} ${TALL}`}
        preserveAspectRatio="none"
        height={TALL}
        className={`block w-full ${ink}`}
      >
        {near !== undefined && (
          <line
            x1={0}
            x2={WIDE}
            y1={y(near)}
            y2={y(near)}
            stroke="var(--ink-2)"
            strokeDasharray="1.25 2.5"
            strokeWidth={1.25}
            vectorEffect="non-scaling-stroke"
          />
        )}
        {runs.map((run) => (
          <polyline
            key={run[0]!.x}
            points={(run.length === 1 ? [run[0]!, { x: run[0]!.x + 0.01, y: run[0]!.y }] : run)
              .map((point) => `${(point.x * WIDE).toFixed(1)},${y(point.y).toFixed(1)}`)
              .join(' ')}
            fill="none"
            stroke="currentColor"
            strokeWidth={1.75}
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </svg>
      <div className="mt-1 flex justify-between gap-2">
        <span>{dayCount} days</span>
        <span className="whitespace-nowrap">
          {ampsText(firstAmps)} → {ampsText(lastAmps)}
        </span>
      </div>
    </div>
  );
}
