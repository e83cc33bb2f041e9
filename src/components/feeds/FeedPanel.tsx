import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import type { FeedHealth } from '../../contract/feed-health';
import { feedCounts, feedListState, feedRows, type FeedListState } from '../../view/feed-rows';
import { feedSentence, refusedText } from '../../view/feed-words';
import { durationText } from '../../view/figures';
import { FeedFilter } from './FeedFilter';
import { FeedTable } from './FeedTable';
import { RefusalCounts } from './RefusalCounts';
import { useFeedHealth } from './use-feed-health';

interface FeedPanelProps {
  initial: FeedHealth;
  /** the query part of the page's address */
  address: string;
  timeZone: string;
}

/** Every terminal's feed and the refusals by reason, kept up to date. */
export function FeedPanel(props: FeedPanelProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Panel {...props} />
    </QueryClientProvider>
  );
}

function Panel({ initial, address, timeZone }: FeedPanelProps) {
  const { health, nowMs, oldMs } = useFeedHealth(initial);
  const [state, setState] = useState(() => feedListState(new URLSearchParams(address)));
  const all = feedRows(health.terminals, { search: '', sort: 'worst' }, nowMs);
  const rows = feedRows(health.terminals, state, nowMs);
  const { well, ill } = feedSentence(feedCounts(all));
  const change = (next: FeedListState) => {
    setState(next);
    keepInAddress(next);
  };
  return (
    <div className={`group ${oldMs === undefined ? '' : 'text-ink-2'}`} data-old={oldMs !== undefined}>
      <h1 className={`text-sentence font-medium text-balance ${oldMs === undefined ? '' : 'font-normal'}`}>
        {well}.{' '}
        {ill !== undefined && (
          <>
            <span className="border-b-3 border-blind text-blind">{ill}</span>.
          </>
        )}
      </h1>
      {oldMs !== undefined && (
        <p
          className="mt-2 w-fit border border-dashed border-blind px-2.5 py-1 font-medium text-blind"
          role="alert"
        >
          Not refreshed for {durationText(oldMs)}: what stands here is old.
        </p>
      )}
      <p className="mt-1 text-ink-2">
        <a href="#refused" className="link">
          {refusedText(health.refusals)}
        </a>
      </p>
      <div className="mt-5 grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_24rem]">
        <section aria-label="Terminals" className="min-w-0">
          <FeedFilter state={state} shown={rows.length} known={all.length} onChange={change} />
          <FeedTable rows={rows} timeZone={timeZone} nowMs={nowMs} />
        </section>
        <section id="refused" aria-labelledby="refusals-head">
          <h2 id="refusals-head" className="text-lead font-semibold">
            Refused, by reason
          </h2>
          <RefusalCounts refusals={health.refusals} timeZone={timeZone} nowMs={nowMs} />
        </section>
      </div>
    </div>
  );
}

/** The list's state goes into the address without a step of history for every letter typed. */
function keepInAddress({ search, sort }: FeedListState): void {
  const url = new URL(window.location.href);
  const set = (name: string, value: string) =>
    value === '' ? url.searchParams.delete(name) : url.searchParams.set(name, value);
  set('q', search);
  set('sort', sort === 'worst' ? '' : sort);
  window.history.replaceState(null, '', url);
}
