import type { MarginRow } from '../../contract/standing';
import { shareWords } from '../../view/margin-columns';
import { PhaseMarker } from '../marks/PhaseMarker';

interface MarginStripProps {
  row: Pick<MarginRow, 'phase' | 'shareOfPickup' | 'expectedAmps' | 'pickupAmps'>;
  nearRatio: number;
}

const TALL = 14;
const percent = (ratio: number): string => `${(Math.min(1, Math.max(0, ratio)) * 100).toFixed(2)}%`;

/** One phase between zero and its pickup: the standing level as its marker, the expected level as a tick. */
export function MarginStrip({ row, nearRatio }: MarginStripProps) {
  const { phase, shareOfPickup, expectedAmps, pickupAmps } = row;
  const expected = expectedAmps === null || !pickupAmps ? undefined : expectedAmps / pickupAmps;
  const beyond = (shareOfPickup ?? 0) > 1;
  return (
    <svg
      role="img"
      aria-label={shareWords(shareOfPickup, nearRatio)}
      height={TALL}
      className="block w-full overflow-visible"
    >
      <rect x="0" y="4" width="100%" height="6" fill="var(--lane)" />
      <line
        x1={percent(nearRatio)}
        x2={percent(nearRatio)}
        y1="0"
        y2={TALL}
        stroke="var(--ink-2)"
        strokeWidth="1.25"
        strokeDasharray="1.25 2.5"
      />
      {expected !== undefined && (
        <line
          x1={percent(expected)}
          x2={percent(expected)}
          y1="1.5"
          y2={TALL - 1.5}
          stroke="var(--accent)"
          strokeWidth="1.75"
        />
      )}
      <svg x="100%" overflow="visible" aria-hidden="true">
        <rect x="-1" width="1" height={TALL} fill="var(--ink)" />
      </svg>
      {shareOfPickup !== null && (
        <svg
          x={percent(shareOfPickup)}
          y={TALL / 2}
          overflow="visible"
          className={shareOfPickup >= nearRatio ? 'text-near' : 'text-ink'}
        >
          <PhaseMarker phase={phase} size={4} />
          {beyond && <path d="M6 -4l4 4l-4 4Z" fill="currentColor" />}
        </svg>
      )}
    </svg>
  );
}
