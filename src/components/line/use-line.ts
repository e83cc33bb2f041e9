import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo } from 'react';
import type { LineDetail, LineSummary } from '../../contract/lines';
import type { Result } from '../../contract/result';
import type { Warning } from '../../contract/warning';
import { useLive } from '../../live/use-live';
import type { LiveStatus } from '../../live/live-stream';
import { withChangedWarnings } from '../../view/line-warning-rows';
import { withNewestWarnings, withResult } from '../../view/merge-live';
import { isStale } from '../../view/staleness';
import { fetchLineDetail } from './line-requests';

/** Levels, drift and settings move slowly; what moves fast comes by the stream. */
const DETAIL_EVERY_MS = 60_000;

/** A line as the page knows it now: what the server gave, moved on by the stream. */
export interface LineNow {
  readonly detail: LineDetail;
  readonly line: LineSummary;
  readonly result: Result | undefined;
  /** past and open, newest state of each */
  readonly warnings: readonly Warning[];
  readonly nowMs: number;
  readonly status: LiveStatus;
  /** values may not be shown as live: the stream is lost or the newest instant is too old */
  readonly faded: boolean;
  /** how often the stream has come back: whoever draws recent time fetches it anew */
  readonly returnCount: number;
}

export function useLine(initial: LineDetail): LineNow {
  const key = initial.line.key;
  const live = useLive({ startAt: initial.at });
  const { data: detail } = useQuery({
    queryKey: ['line', key],
    queryFn: ({ signal }) => fetchLineDetail({ key, signal }),
    initialData: initial,
    staleTime: DETAIL_EVERY_MS,
    refetchInterval: DETAIL_EVERY_MS,
  });
  useFilledGap(key, live.returnCount);
  const result = newest(live.results.get(key), detail.result ?? undefined);
  const changed = useMemo(
    () => [...live.warnings.values()].filter((warning) => warning.line === key),
    [live.warnings, key],
  );
  const line = useMemo(() => {
    const merged = withResult(detail.line, result);
    return { ...merged, warnings: withNewestWarnings(merged.warnings, changed) };
  }, [detail.line, result, changed]);
  const warnings = useMemo(() => withChangedWarnings(detail.warnings, changed), [detail.warnings, changed]);
  const atMs = line.at === null ? undefined : Date.parse(line.at);
  return {
    detail,
    line,
    result,
    warnings,
    nowMs: live.nowMs,
    status: live.status,
    faded: live.status === 'lost' || isStale(atMs, live.nowMs),
    returnCount: live.returnCount,
  };
}

/** When the stream has come back, everything that it may have missed is fetched. */
function useFilledGap(key: string, returnCount: number): void {
  const client = useQueryClient();
  useEffect(() => {
    if (returnCount === 0) return;
    for (const subject of ['line', 'snapshots', 'levels']) {
      void client.invalidateQueries({ queryKey: [subject, key] });
    }
  }, [client, key, returnCount]);
}

function newest(live: Result | undefined, known: Result | undefined): Result | undefined {
  if (live === undefined || known === undefined) return live ?? known;
  return Date.parse(live.publishedAt) >= Date.parse(known.publishedAt) ? live : known;
}
