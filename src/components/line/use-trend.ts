import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Level } from '../../contract/lines';
import type { Creep } from '../../contract/warning';
import type { Reading } from '../../view/line-readings';
import { trendSeries } from '../../view/trend-shape';
import { spanSource, spanLengthMs, trendWindow } from '../../view/trend-span';
import type { TrendSpan, TrendSource, TrendWindow } from '../../view/trend-span';
import type { TrendPoint } from '../../view/trend-points';
import type { PerPhase } from '../../protection/phase';
import { fetchLevels } from './line-requests';
import { useRecentReadings } from './use-readings';

const LEVELS_EVERY_MS = 120_000;
const NO_LEVELS: readonly Level[] = [];
const NO_CREEP: readonly Creep[] = [];

export interface Trend {
  readonly source: TrendSource;
  readonly window: TrendWindow;
  readonly series: PerPhase<readonly TrendPoint[]>;
  /** the rows it is made of; none for snapshots */
  readonly levels: readonly Level[];
  readonly creep: readonly Creep[];
  readonly waiting: boolean;
  readonly error: Error | null;
  readonly tryAgain: () => void;
}

/** The figures of the span chosen: rows of a rung from the API, or the last hour moved on by the stream. */
export function useTrend(
  key: string,
  span: TrendSpan,
  { live, nowMs }: { live: readonly Reading[]; nowMs: number },
): Trend {
  const source = spanSource(span);
  const raw = source === 'snapshots';
  // Minutes are enough for the right edge of a window of days; in an hour every snapshot moves it.
  const edgeMs = raw ? Math.floor(nowMs / 2_000) * 2_000 : Math.floor(nowMs / 60_000) * 60_000;
  const window = useMemo(() => trendWindow(span, edgeMs), [span, edgeMs]);
  const recent = useRecentReadings(key, live, { nowMs, windowMs: spanLengthMs('hour'), enabled: raw });
  const levels = useQuery({
    queryKey: ['levels', key, span],
    queryFn: ({ signal }) => fetchLevels({ key, signal }, window, source === 'day' ? 'day' : 'hour'),
    enabled: !raw,
    staleTime: LEVELS_EVERY_MS,
    refetchInterval: LEVELS_EVERY_MS,
  });
  const rows = levels.data?.levels ?? NO_LEVELS;
  const series = useMemo(
    () => trendSeries({ source, levels: rows, readings: recent.readings }, window),
    [source, rows, recent.readings, window],
  );
  return {
    source,
    window,
    series,
    levels: rows,
    creep: levels.data?.creep ?? NO_CREEP,
    waiting: raw ? recent.waiting : levels.isPending,
    error: raw ? recent.error : levels.error,
    tryAgain: raw ? recent.tryAgain : () => void levels.refetch(),
  };
}
