import { randomUUID } from 'node:crypto';
import type { ReplayResult, ReplayState } from '../../contract/replay';
import { REPLAY_LIMITS } from './limits';
import type { ReplayWatch } from './run';

interface Job {
  readonly owner: string;
  readonly abort: AbortController;
  state: ReplayState;
  endedMs: number | undefined;
}

export type Started = { readonly id: string } | { readonly refused: 'one of yours runs' | 'too many run' };

/** The replays of one process: those that run, and for a while those that have ended. */
export interface ReplayJobs {
  start(asked: {
    readonly owner: string;
    readonly line: string;
    run(watch: ReplayWatch): Promise<ReplayResult>;
  }): Started;
  stateOf(id: string): ReplayState | undefined;
  /** stops a running one; one that has ended stays as it is */
  cancel(id: string, owner: string): 'cancelled' | 'unknown' | 'not yours';
}

export function createReplayJobs({
  now,
  log,
}: {
  now: () => number;
  log: (error: unknown) => void;
}): ReplayJobs {
  const jobs = new Map<string, Job>();
  const running = () => [...jobs.values()].filter(({ endedMs }) => endedMs === undefined);
  return {
    start({ owner, line, run }) {
      forgetOld(jobs, now());
      if (running().some((job) => job.owner === owner)) return { refused: 'one of yours runs' };
      if (running().length >= REPLAY_LIMITS.runningMost) return { refused: 'too many run' };
      const id = randomUUID();
      const job: Job = { owner, abort: new AbortController(), state: begun(id, line), endedMs: undefined };
      jobs.set(id, job);
      void follow(job, run, { now, log });
      return { id };
    },
    stateOf(id) {
      forgetOld(jobs, now());
      return jobs.get(id)?.state;
    },
    cancel(id, owner) {
      const job = jobs.get(id);
      if (job === undefined) return 'unknown';
      if (job.owner !== owner) return 'not yours';
      if (job.endedMs === undefined) {
        job.state = { ...job.state, state: 'cancelled' };
        job.endedMs = now();
        job.abort.abort();
      }
      return 'cancelled';
    },
  };
}

const begun = (id: string, line: string): ReplayState => ({
  id,
  line,
  state: 'running',
  progress: 0,
  snapshots: 0,
  result: null,
  problem: null,
});

async function follow(
  job: Job,
  run: (watch: ReplayWatch) => Promise<ReplayResult>,
  { now, log }: { now: () => number; log: (error: unknown) => void },
): Promise<void> {
  const { signal } = job.abort;
  const end = (change: Partial<ReplayState>) => {
    if (signal.aborted) return;
    job.state = { ...job.state, ...change };
    job.endedMs = now();
  };
  try {
    const result = await run({
      signal,
      onProgress: ({ ratio, snapshots }) => {
        if (!signal.aborted)
          job.state = { ...job.state, progress: Math.min(1, Math.max(0, ratio)), snapshots };
      },
    });
    end({ state: 'done', progress: 1, snapshots: result.snapshots, result });
  } catch (error) {
    if (signal.aborted) return;
    log(error);
    end({ state: 'failed', problem: 'The replay broke off. It has been logged; running it again may help.' });
  }
}

/** Ended ones go when their time is over, and the oldest of them when there are too many. */
function forgetOld(jobs: Map<string, Job>, nowMs: number): void {
  const ended = [...jobs].filter(([, job]) => job.endedMs !== undefined);
  const surplus = ended.length - REPLAY_LIMITS.keptMost;
  ended
    .sort(([, one], [, other]) => one.endedMs! - other.endedMs!)
    .forEach(([id, job], index) => {
      if (index < surplus || nowMs - job.endedMs! > REPLAY_LIMITS.keptMs) jobs.delete(id);
    });
}
