import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { ForecastList } from '../../contract/forecast-list';
import { forecastRow, forecastSections, type ForecastRow } from '../../view/forecast-list';
import { isForecastNarrowed, WHOLE_FORECAST } from '../../view/forecast-query';
import { forecastSentence, unlistedWords } from '../../view/forecast-words';
import { capital } from '../../view/margin-sentence';
import { ownerNames } from '../../view/owner-names';
import type { SiteCustom } from '../../view/site-custom';
import { plainClick } from '../board/plain-click';
import { DoneFollowUps } from '../follow-ups/DoneFollowUps';
import { OpenFollowUps } from '../follow-ups/OpenFollowUps';
import { useFollowUps } from '../follow-ups/use-follow-ups';
import { ForecastFilters } from './ForecastFilters';
import { ForecastSection } from './ForecastSection';
import { useForecastAddress } from './use-forecast-address';

export interface ForecastPageProps {
  list: ForecastList;
  site: SiteCustom;
  search: string;
  mayKeep: boolean;
}

/** Lines by the date on which they reach the near mark, and what is kept to be done about them. */
export function ForecastPage(props: ForecastPageProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Forecast {...props} />
    </QueryClientProvider>
  );
}

function Forecast({ list, site, search, mayKeep }: ForecastPageProps) {
  const state = useForecastAddress(search);
  const followUps = useFollowUps({ open: list.followUps, done: list.doneFollowUps });
  const nowMs = Date.parse(list.at);
  const rows = useMemo(
    () => list.lines.map((line) => forecastRow(line, site.nearRatio)),
    [list.lines, site.nearRatio],
  );
  const sections = forecastSections(rows, state.address);
  const shared = { site, nowMs, followUps, mayKeep, grouping: state.address.group };
  const shown = sections.beyond.length + sections.coming.length + sections['within margin'].length;
  const known = list.lines.length + list.steadyCount > 0;
  return (
    <>
      <ForecastHead list={list} rows={rows} known={known} followUpCount={followUps.open.length} />
      <p role="status" className="mt-2 font-medium empty:hidden">
        {followUps.told}
        {followUps.compare !== undefined && (
          <>
            {' '}
            <a href={followUps.compare} className="link">
              Compare before and after the work
            </a>
          </>
        )}
      </p>
      {rows.length > 0 && (
        <ForecastFilters state={state} substations={endsOf(rows)} owners={ownerNames(list.lines)} />
      )}
      {rows.length > 0 && shown === 0 && isForecastNarrowed(state.address) && (
        <p className="mt-8">
          No line fits these filters.{' '}
          <a href="/forecast" className="link" onClick={plainClick(() => state.choose(WHOLE_FORECAST))}>
            Show all
          </a>
        </p>
      )}
      <ForecastSection
        {...shared}
        id="beyond"
        title="Beyond the near mark"
        caption="The range is when the level reaches the pickup"
        rows={sections.beyond}
      />
      <ForecastSection
        {...shared}
        id="coming"
        title="On the way to the near mark"
        caption="The range is from the earliest to the latest date, the likely one marked"
        rows={sections.coming}
      />
      <ForecastSection
        {...shared}
        id="within"
        title="Rising, and staying within margin"
        caption="A significant rise that does not reach the near mark within the horizon: no warning"
        rows={sections['within margin']}
      />
      <OpenFollowUps followUps={followUps} site={site} nowMs={nowMs} mayKeep={mayKeep} hasRows={shown > 0} />
      <DoneFollowUps done={followUps.done} site={site} nowMs={nowMs} />
    </>
  );
}

interface ForecastHeadProps {
  list: ForecastList;
  rows: readonly ForecastRow[];
  known: boolean;
  followUpCount: number;
}

function ForecastHead({ list, rows, known, followUpCount }: ForecastHeadProps) {
  if (!known)
    return (
      <div className="panel max-w-[80ch] p-5">
        <h1 className="text-lead font-semibold">Nothing has been computed yet</h1>
        <p className="mt-1 text-pretty">
          Dates come from the drift of daily standing levels. The first findings stand here within an hour of
          the worker’s start; a drift takes at least ten days of levels, so a new line has no date before
          that.
        </p>
      </div>
    );
  const words = forecastSentence(list, forecastSections(rows, WHOLE_FORECAST).coming, Date.parse(list.at));
  const unlisted = unlistedWords(list);
  return (
    <>
      <h1 className="text-sentence font-medium text-balance">
        {words.beyond !== undefined && (
          <a href="#beyond" className="border-b-3 border-near text-near no-underline">
            {words.beyond}
          </a>
        )}
        {words.beyond !== undefined && '. '}
        {words.coming !== undefined && (
          <a href="#coming" className="border-b-3 border-rising text-rising no-underline">
            {words.coming}
          </a>
        )}
        {words.coming !== undefined && '.'}
        {words.rest !== undefined && `${words.rest}.`}
      </h1>
      <p className="mt-1 text-ink-2">
        {unlisted.length > 0 && `${capital(unlisted.join('; '))}. `}
        {followUpCount > 0 && (
          <a href="#follow-ups" className="link">
            {followUpCount} open follow-{followUpCount === 1 ? 'up' : 'ups'}
          </a>
        )}
      </p>
    </>
  );
}

const endsOf = (rows: readonly ForecastRow[]) =>
  [
    ...new Map(rows.flatMap(({ line }) => line.substations.map((end) => [end.key, end] as const))).values(),
  ].sort((one, other) => one.name.localeCompare(other.name, 'en', { numeric: true }));
