import { useEffect } from 'react';
import { useLive } from '../../live/use-live';
import { ageText, timeText, zoneText } from '../../view/figures';
import { heardTerminals, type HeardTerminals } from '../../view/heard-terminals';

interface FeedStatusProps {
  /** what the web process had heard when it made the page */
  initial: HeardTerminals;
  at: string;
  timeZone: string;
}

/** How many terminals are heard, how old the newest of it is, and the site's clock. */
export function FeedStatus({ initial, at, timeZone }: FeedStatusProps) {
  const live = useLive({ startAt: at });
  const heard = live.results.size === 0 ? initial : heardTerminals(live.results.values(), live.nowMs);
  useEffect(() => {
    document.documentElement.dataset.live = live.status;
  }, [live.status]);
  return (
    <>
      <span data-testid="feed-heard">
        {live.status === 'lost' ? lostWords(heard, live.nowMs) : heardWords(heard, live.nowMs)}
      </span>
      <time className="whitespace-nowrap" dateTime={new Date(live.nowMs).toISOString()}>
        {timeText(live.nowMs, timeZone)} {zoneText(live.nowMs, timeZone)}
      </time>
    </>
  );
}

/** Without the stream nobody can say how many are heard now. */
const lostWords = ({ newestAtMs }: HeardTerminals, nowMs: number): string =>
  `Not live · newest ${ageText(newestAtMs, nowMs)}`;

function heardWords({ heardCount, knownCount, newestAtMs }: HeardTerminals, nowMs: number): string {
  if (newestAtMs === undefined) return 'No terminal heard yet';
  const count = heardCount === knownCount ? `${heardCount}` : `${heardCount} of ${knownCount}`;
  return `${count} ${knownCount === 1 ? 'terminal' : 'terminals'} heard · newest ${ageText(newestAtMs, nowMs)}`;
}
