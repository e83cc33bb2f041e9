/** How failed sign-ins slow the next one. */
export const SIGN_IN_LIMITS = {
  windowMs: 15 * 60_000,
  failuresPerEmail: 5,
  failuresPerAddress: 20,
  firstWaitMs: 30_000,
  longestWaitMs: 15 * 60_000,
  keepAttemptsMs: 24 * 3_600_000,
} as const;

/** Failures within the window, and the newest of them. */
export interface Failures {
  readonly count: number;
  readonly lastAtMs: number | undefined;
}

/**
 * How long, in ms from now, until another attempt is looked at; 0 when it may be at once. From the limit on, each
 * further failure doubles the wait after the newest one.
 */
export function waitMs(failures: Failures, limit: number, nowMs: number): number {
  if (failures.count < limit || failures.lastAtMs === undefined) return 0;
  const pauseMs = SIGN_IN_LIMITS.firstWaitMs * 2 ** (failures.count - limit);
  return Math.max(0, failures.lastAtMs + Math.min(SIGN_IN_LIMITS.longestWaitMs, pauseMs) - nowMs);
}

export function waitSentence(ms: number): string {
  const seconds = Math.ceil(ms / 1000);
  const span = seconds < 120 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
  return `Too many failed sign-ins. Try again in ${span}.`;
}
