import type { Store } from '../../store/client';
import type { Site } from '../site';
import { createReplayJobs, type ReplayJobs } from './jobs';

// one set of jobs for the store that a process has open: the endpoints share it and it ends with the process
const known = new WeakMap<Store, ReplayJobs>();

export function replayJobsOf(site: Site): ReplayJobs {
  const there = known.get(site.store);
  if (there !== undefined) return there;
  const jobs = createReplayJobs({
    now: () => site.now(),
    log: (error) => console.error('A replay failed:', error),
  });
  known.set(site.store, jobs);
  return jobs;
}
