const AWAY_CODES: ReadonlySet<unknown> = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  'EHOSTUNREACH',
  'ENETUNREACH',
  'ENOTFOUND',
  'EAI_AGAIN',
  'PROTOCOL_CONNECTION_LOST',
  'PROTOCOL_SEQUENCE_TIMEOUT',
  'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR',
  'ER_CON_COUNT_ERROR',
  'ER_SERVER_SHUTDOWN',
  'ER_NORMAL_SHUTDOWN',
  'ER_CONNECTION_KILLED',
  'ER_NEW_ABORTING_CONNECTION',
]);

/** Whether an error means that the database cannot be reached now and may be later. */
export function databaseIsAway(error: unknown): boolean {
  // Drizzle wraps the driver's error, and others wrap Drizzle's
  for (let cause = error; cause instanceof Error; cause = cause.cause)
    if (AWAY_CODES.has((cause as Error & { code?: unknown }).code)) return true;
  return false;
}
