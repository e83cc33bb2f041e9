/** Every bound of the replays of one web process. */
export const REPLAY_LIMITS = {
  /** raw rows read at a time */
  pageRows: 5_000,
  /** how long it computes before others have their turn */
  sliceMs: 8,
  /** replays running at once, of different people */
  runningMost: 3,
  /** how long and how many that have ended are kept, in memory */
  keptMs: 30 * 60_000,
  keptMost: 40,
  /** a snapshot lasts until the next one, and at most this many periods */
  spacingPeriodsMost: 3,
  /** width of a bin of the distribution, as a ratio, and where the last one begins */
  binRatio: 0.005,
  binsEndRatio: 2,
} as const;
