import { useLive } from '../../live/use-live';
import { durationText, instantText } from '../../view/figures';

interface LiveBannerProps {
  at: string;
  timeZone: string;
}

/** Says on every page, plainly and with the age, when what it shows is no longer live. */
export function LiveBanner({ at, timeZone }: LiveBannerProps) {
  const live = useLive({ startAt: at });
  const lost = live.status === 'lost';
  return (
    <div role="status" aria-live="polite">
      {lost && (
        <p className="border-b-2 border-over bg-panel px-4 py-2 text-body text-ink sm:px-7">
          <strong className="font-semibold text-over">
            Not live since {instantText(live.lastFrameAtMs ?? at, live.nowMs, timeZone)}
          </strong>{' '}
          – trying again. What is shown is{' '}
          <span aria-live="off">{durationText(live.nowMs - (live.lastFrameAtMs ?? Date.parse(at)))}</span> old
          or older and may no longer be so.
        </p>
      )}
    </div>
  );
}
