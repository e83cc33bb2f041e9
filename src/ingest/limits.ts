/** Every bound of the worker in one place: queues, waits and retries. */
export const INGEST_LIMITS = {
  /** snapshots written in one transaction */
  batchSnapshots: 500,
  /** how long a ready snapshot waits for others to share its transaction */
  batchWaitMs: 40,
  /** messages received and not yet acknowledged; beyond it delivery is stalled until a commit */
  unacknowledgedMost: 60_000,
  /** instants still waiting for a terminal; beyond it the oldest are closed as incomplete */
  pendingMost: 100_000,
  /** closed instants remembered for each line, by which a duplicate is told from a late measurement */
  closedRemembered: 300,
  /** refused messages kept of one batch; more are counted only */
  refusalsKeptABatch: 200,
  refusalsKeptDays: 30,
  retryFirstMs: 250,
  retryMostMs: 10_000,
  registerPollMs: 1_000,
  rungEveryMs: 60_000,
  keepStoreEveryMs: 3_600_000,
} as const;
