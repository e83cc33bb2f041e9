import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import type { FleetChoices } from '../../contract/margins';
import type { MarginList } from '../../contract/standing';
import { useLive } from '../../live/use-live';
import { marginListParameters, parseMarginAddress, WHOLE_FLEET } from '../../view/margin-query';
import type { MarginCounts } from '../../view/margin-sentence';
import type { SiteCustom } from '../../view/site-custom';
import { plainClick } from '../board/plain-click';
import { FetchState } from '../charts/FetchState';
import { FleetScatter } from './FleetScatter';
import { MarginFilters } from './MarginFilters';
import { MarginKey } from './MarginKey';
import { MarginSentence } from './MarginSentence';
import { MarginTable } from './MarginTable';
import { useMarginAddress } from './use-margin-address';
import { useMargins } from './use-margins';

export interface MarginsPageProps {
  /** the page of the fleet that the address asks for */
  list: MarginList;
  counts: MarginCounts;
  /** when the newest finding was made, ISO; null while there is none */
  newest: string | null;
  choices: FleetChoices;
  site: SiteCustom;
  search: string;
}

/** The whole fleet, phase by phase, as it is sorted and filtered. */
export function MarginsPage(props: MarginsPageProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      {props.counts.phases === 0 ? <NothingYet /> : <Fleet {...props} />}
    </QueryClientProvider>
  );
}

function Fleet({ list, counts, newest, choices, site, search }: MarginsPageProps) {
  const state = useMarginAddress(search);
  // while somebody types, the list follows as soon as it can
  const address = useDeferredValue(state.address);
  const live = useLive({ startAt: list.at });
  const [initial] = useState(() => ({
    list,
    search: marginListParameters(parseMarginAddress(search)).toString(),
  }));
  const pages = useMargins(address, initial);
  const lost = live.status === 'lost';
  const count = (rows: number) => rows.toLocaleString('en-GB');
  return (
    <>
      <MarginSentence counts={counts} newest={newest} nowMs={live.nowMs} site={site} state={state} />
      <MarginFilters
        state={state}
        choices={choices}
        shown={
          pages.rows.length === pages.total
            ? `${count(pages.total)} ${pages.total === 1 ? 'row' : 'rows'}`
            : `${count(pages.rows.length)} of ${count(pages.total)} rows`
        }
      />
      {pages.error !== null && (
        <div className="mt-4">
          <FetchState what="the list" error={pages.error} onTryAgain={pages.tryAgain} />
        </div>
      )}
      {pages.rows.length === 0 && pages.error === null ? (
        <p className="mt-8">
          No line fits these filters.{' '}
          <a href="/margins" className="link" onClick={plainClick(() => state.choose(WHOLE_FLEET))}>
            Show all
          </a>
        </p>
      ) : (
        <section
          aria-label="The fleet"
          className={`mt-4 ${pages.isOld ? 'opacity-60' : ''}`}
          aria-busy={pages.isOld}
        >
          <MarginKey site={site} />
          <div className="lg:overflow-x-auto">
            <MarginTable
              rows={pages.rows}
              address={state}
              site={site}
              results={live.results}
              nowMs={live.nowMs}
              lost={lost}
            />
          </div>
          {pages.hasMore && (
            <button
              type="button"
              className="button mt-4"
              onClick={pages.more}
              disabled={pages.isFetchingMore}
            >
              {pages.isFetchingMore
                ? 'Fetching …'
                : `Show ${Math.min(50, pages.total - pages.rows.length)} more`}
            </button>
          )}
        </section>
      )}
      <div className="mt-8">
        <FleetScatter state={{ ...state, address }} site={site} nowMs={live.nowMs} />
      </div>
    </>
  );
}

function NothingYet() {
  return (
    <div className="panel max-w-[80ch] p-5">
      <h1 className="text-lead font-semibold">Nothing has been computed yet</h1>
      <p className="mt-1 text-pretty">
        Standing levels, their causes and their drift are worked out once an hour from what the terminals have
        sent. The first ones stand here within an hour of the worker’s start, for every line that has settings
        in force and is heard; causes take a week of load that goes up and down, a drift at least ten days.
      </p>
    </div>
  );
}
