import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import type { Result } from '../../contract/result';
import { mergedReadings, readingsOf } from '../../view/line-readings';
import type { Reading } from '../../view/line-readings';
import { fetchSnapshots } from './line-requests';

const HOUR_MS = 3_600_000;
const NONE: readonly Reading[] = [];

/** What the stream has told of the line since the page opened, an hour of it at most. */
export function useLiveReadings(result: Result | undefined): readonly Reading[] {
  const [readings, setReadings] = useState(NONE);
  useEffect(() => {
    if (result === undefined || result.at === null) return;
    const nowMs = Date.parse(result.at);
    setReadings((known) => mergedReadings(known, readingsOf([result]), { nowMs, windowMs: HOUR_MS }));
  }, [result]);
  return readings;
}

interface RecentReadings {
  readonly readings: readonly Reading[];
  readonly error: Error | null;
  readonly waiting: boolean;
  readonly tryAgain: () => void;
}

/** The readings of the last `windowMs`: fetched once, then moved on by the stream. */
export function useRecentReadings(
  key: string,
  live: readonly Reading[],
  { nowMs, windowMs, enabled }: { nowMs: number; windowMs: number; enabled: boolean },
): RecentReadings {
  const stored = useQuery({
    queryKey: ['snapshots', key, windowMs],
    queryFn: async ({ signal }) =>
      readingsOf(await fetchSnapshots({ key, signal }, { fromMs: nowMs - windowMs, toMs: nowMs })),
    enabled,
    staleTime: Infinity,
  });
  // The window moves with the newest reading, not with every second of the clock.
  const newestMs = live[live.length - 1]?.atMs;
  const readings = useMemo(() => {
    const known = stored.data ?? NONE;
    const endMs = Math.max(newestMs ?? -Infinity, known[known.length - 1]?.atMs ?? -Infinity);
    return mergedReadings(known, live, { nowMs: endMs, windowMs });
  }, [stored.data, live, newestMs, windowMs]);
  return {
    readings,
    error: stored.error,
    waiting: enabled && stored.isPending,
    tryAgain: () => void stored.refetch(),
  };
}
