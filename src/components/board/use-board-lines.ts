import { useQuery } from '@tanstack/react-query';
import { useCallback, useEffect, useMemo, useState } from 'react';
import { lineListSchema, type LineList } from '../../contract/lines';
import type { Warning } from '../../contract/warning';
import { withWarnings } from '../../live/live-stream';
import { useLive } from '../../live/use-live';
import { boardLine, type BoardLine } from '../../view/board';
import { mergeLive } from '../../view/merge-live';
import { apiRequest, type RequestRefused } from '../shell/api-request';

const REFETCH_MS = 60_000;

export interface BoardLines {
  readonly lines: readonly BoardLine[];
  /** site time, ms */
  readonly nowMs: number;
  /** site time for which the lines are known, ms: now, or the last that was heard when the stream is lost */
  readonly asOfMs: number;
  readonly lost: boolean;
  readonly refused: RequestRefused | null;
  /** takes what an acknowledgement made here answered, before the stream tells it to everybody */
  take(warning: Warning): void;
}

/** The lines as the page brought them, asked for anew each minute and after a gap, and moved on by the stream. */
export function useBoardLines(initial: LineList): BoardLines {
  const live = useLive({ startAt: initial.at });
  const { data, error, refetch } = useQuery<LineList, RequestRefused>({
    queryKey: ['lines'],
    queryFn: ({ signal }) => apiRequest('/api/lines', { answer: lineListSchema, signal }),
    initialData: initial,
    staleTime: REFETCH_MS,
    refetchInterval: REFETCH_MS,
    retry: false,
  });
  useEffect(() => {
    if (live.returnCount > 0) void refetch();
  }, [live.returnCount, refetch]);
  const [own, setOwn] = useState<readonly Warning[]>([]);
  const take = useCallback(
    (warning: Warning) => {
      setOwn((before) => [...before, warning]);
      void refetch();
    },
    [refetch],
  );
  const merged = useMemo(
    () => mergeLive(data, live.results, withWarnings(live.warnings, own)),
    [data, live.results, live.warnings, own],
  );
  const lost = live.status === 'lost';
  const asOfMs = lost ? Math.max(live.lastFrameAtMs ?? 0, Date.parse(data.at)) : live.nowMs;
  const lines = merged.map((line) => boardLine(line, asOfMs));
  return { lines, nowMs: live.nowMs, asOfMs, lost, refused: error, take };
}
