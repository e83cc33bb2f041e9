import type { ForecastAxis, ForecastRange } from '../../view/forecast-axis';

const TALL = 18;
const percent = (ratio: number): string => `${(ratio * 100).toFixed(2)}%`;

interface RangeMarkProps {
  axis: ForecastAxis;
  range: ForecastRange;
  /** the dates in words */
  label: string;
}

/** From the earliest to the latest date, the likely one marked; today at the left, open where it goes on. */
export function RangeMark({ axis, range, label }: RangeMarkProps) {
  return (
    <svg role="img" aria-label={label} height={TALL} className="block w-full overflow-visible">
      <rect x="0" y="6" width="100%" height="6" fill="var(--lane)" />
      {axis.ticks.map((tick) => (
        <line
          key={tick.at}
          x1={percent(tick.at)}
          x2={percent(tick.at)}
          y1="3"
          y2={TALL - 3}
          stroke="var(--hairline)"
        />
      ))}
      <line x1="0" x2="0" y1="0" y2={TALL} stroke="var(--ink)" />
      <rect
        x={percent(range.from)}
        y="6"
        width={percent(Math.max(0.006, range.to - range.from))}
        height="6"
        fill="var(--accent)"
        opacity="0.4"
      />
      {range.openEnd && (
        <svg x="100%" y={TALL / 2} overflow="visible">
          <path d="M0 -6l6 6l-6 6Z" fill="var(--accent)" opacity="0.6" />
        </svg>
      )}
      {range.likely !== undefined && (
        <line
          x1={percent(range.likely)}
          x2={percent(range.likely)}
          y1="2"
          y2={TALL - 2}
          stroke="var(--accent)"
          strokeWidth="3"
        />
      )}
    </svg>
  );
}

/** The axis' words: once over a section on a desk, under each range on a phone. */
export function AxisLabels({ axis, className = '' }: { axis: ForecastAxis; className?: string }) {
  return (
    <svg aria-hidden="true" height="16" className={`block w-full overflow-visible ${className}`}>
      <text x="0" y="12" fill="var(--ink-2)" fontSize="12">
        {axis.ticks.some(({ at }) => at < 0.12) ? '' : 'today'}
      </text>
      {axis.ticks.map((tick) => (
        <text key={tick.at} x={percent(tick.at)} y="12" fill="var(--ink-2)" fontSize="12" textAnchor="middle">
          {tick.label}
        </text>
      ))}
    </svg>
  );
}
