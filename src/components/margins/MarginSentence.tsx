import { instantText } from '../../view/figures';
import { marginSearch, WHOLE_FLEET, type MarginAddress } from '../../view/margin-query';
import { marginSentence, type MarginCounts } from '../../view/margin-sentence';
import type { SiteCustom } from '../../view/site-custom';
import { plainClick } from '../board/plain-click';
import type { MarginAddressState } from './use-margin-address';

interface MarginSentenceProps {
  counts: MarginCounts;
  newest: string | null;
  nowMs: number;
  site: SiteCustom;
  state: MarginAddressState;
}

/** The state of the fleet's margins in words; its coloured words are links that sort and filter. */
export function MarginSentence({ counts, newest, nowMs, site, state }: MarginSentenceProps) {
  const words = marginSentence(counts);
  const link = (text: string, change: Partial<MarginAddress>, ink: string) => {
    const next = { ...WHOLE_FLEET, columns: state.address.columns, ...change };
    return (
      <a
        href={`/margins${marginSearch(next)}`}
        onClick={plainClick(() => state.choose(next))}
        className={`border-b-3 no-underline ${ink}`}
      >
        {text}
      </a>
    );
  };
  const parts = [
    words.beyond === undefined ? undefined : link(words.beyond, {}, 'border-near text-near'),
    words.creeping === undefined
      ? undefined
      : link(words.creeping, { creep: 'creep' }, 'border-rising text-rising'),
    words.rest,
  ].filter((part) => part !== undefined);
  return (
    <>
      <h1 className="text-sentence font-medium text-balance">
        {words.whole}:{' '}
        {parts.map((part, index) => (
          <span key={index}>
            {index > 0 && ', '}
            {part}
          </span>
        ))}
        .
      </h1>
      {newest !== null && (
        <p className="mt-1 text-ink-2">
          Renewed every hour, last at {instantText(newest, nowMs, site.timeZone)}; utilisation now is live.
        </p>
      )}
    </>
  );
}
