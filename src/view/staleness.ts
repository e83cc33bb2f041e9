/** Periods that may be missed, and what alignment, commit and the way to the screen may take on top. */
export const STALE_LIMITS = { missedPeriods: 3, periodMs: 2_000, wayMs: 10_000 } as const;
const STALE_AFTER_MS = STALE_LIMITS.missedPeriods * STALE_LIMITS.periodMs + STALE_LIMITS.wayMs;

/** Whether a value of the instant may no longer be shown as live; a value that never came is stale. */
export const isStale = (atMs: number | undefined, nowMs: number): boolean =>
  atMs === undefined || nowMs - atMs > STALE_AFTER_MS;
