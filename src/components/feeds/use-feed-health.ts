import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { feedHealthSchema, type FeedHealth } from '../../contract/feed-health';

const REFRESH_MS = 5_000;
const TICK_MS = 1_000;
/** Two refreshes missed: from here on what is shown is old, and says so. */
const OLD_AFTER_MS = 12_000;

export interface LiveFeedHealth {
  readonly health: FeedHealth;
  /** the server's clock now, as far as the last answer and the time since it tell */
  readonly nowMs: number;
  /** how long ago the server gave this answer, once that is longer than refreshing explains; else undefined */
  readonly oldMs: number | undefined;
}

async function fetchFeedHealth(): Promise<FeedHealth> {
  const answer = await fetch('/api/feed', { headers: { accept: 'application/json' } });
  if (!answer.ok)
    throw new Error(`The feed's health could not be read: the server answered ${answer.status}.`);
  return feedHealthSchema.parse(await answer.json());
}

/** The feed's health, read again every five seconds; ages keep counting in between and when reading fails. */
export function useFeedHealth(initial: FeedHealth): LiveFeedHealth {
  const { data, dataUpdatedAt } = useQuery({
    queryKey: ['feed-health'],
    queryFn: fetchFeedHealth,
    initialData: initial,
    staleTime: REFRESH_MS,
    refetchInterval: REFRESH_MS,
    refetchIntervalInBackground: true,
    retry: false,
  });
  const [sinceMs, setSinceMs] = useState(0);
  useEffect(() => {
    const count = () => setSinceMs(Date.now() - dataUpdatedAt);
    count();
    const timer = setInterval(count, TICK_MS);
    return () => clearInterval(timer);
  }, [dataUpdatedAt]);
  return {
    health: data,
    nowMs: Date.parse(data.at) + sinceMs,
    oldMs: sinceMs > OLD_AFTER_MS ? sinceMs : undefined,
  };
}
