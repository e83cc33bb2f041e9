import { ampsText } from '../../view/figures';
import type { ExpectedLevels } from '../../view/review-expected';
import { expectedStrip } from '../../view/review-strip';
import type { ExpectedLane } from '../../view/review-strip';
import type { PhaseLetters } from '../../view/site-custom';
import { PhaseSign } from '../marks/PhaseMarker';

interface Props {
  readonly levels: ExpectedLevels;
  readonly letters: PhaseLetters;
}

const percent = (share: number): string => `${(100 * share).toFixed(2)}%`;

/** One lane a phase: the band that is expected, its likely middle as a hairline, the measured level as the phase's mark. */
export function ExpectedStrip({ levels, letters }: Props) {
  const { mostAmps, lanes } = expectedStrip(levels);
  return (
    <div className="mt-1 mb-3" aria-hidden="true">
      {lanes.map((lane) => (
        <div key={lane.phase} className="flex items-center gap-2">
          <span className="w-5 text-caption text-ink-2">{letters[lane.phase]}</span>
          <Lane lane={lane} />
        </div>
      ))}
      <div className="mt-0.5 ml-7 flex justify-between text-caption text-ink-2">
        <span>0</span>
        <span>{ampsText(mostAmps)}</span>
      </div>
      <p className="ml-7 text-caption text-ink-2">
        Band: least to worst expected; hairline: causes as independent; mark: measured
      </p>
    </div>
  );
}

function Lane({ lane: { band, independent, measured, phase } }: { lane: ExpectedLane }) {
  return (
    <div className="relative my-0.5 h-4 flex-1 bg-lane">
      {band !== undefined && (
        <span
          className="absolute inset-y-0 bg-band"
          style={{ left: percent(band.from), width: percent(band.to - band.from) }}
        />
      )}
      {independent !== undefined && (
        <span className="absolute inset-y-0 w-px bg-ink-2" style={{ left: percent(independent) }} />
      )}
      {measured !== undefined && (
        <span
          className="absolute top-1/2 flex -translate-x-1/2 -translate-y-1/2 text-ink"
          style={{ left: percent(measured) }}
        >
          <PhaseSign phase={phase} />
        </span>
      )}
    </div>
  );
}
