/** What a raw row says about its snapshot, one bit each; set bits are the exceptions, so that 0 is the plain good case. */
export const SNAPSHOT_FLAGS = {
  incomplete: 1,
  validityNotGood: 2,
  test: 4,
  clockBeyondLimit: 8,
  breakerOpen: 16,
  /** complete, but the line cannot be evaluated: no settings in force, or a scheme that can't judge this line */
  notEvaluated: 32,
  validityInvalid: 64,
  /** the scheme compensates the charging current: taken out, or left in for want of voltages */
  chargingCompensated: 128,
  compensationFellBack: 256,
} as const;
export type SnapshotFlag = keyof typeof SNAPSHOT_FLAGS;

export const hasFlag = (flags: number, flag: SnapshotFlag): boolean => (flags & SNAPSHOT_FLAGS[flag]) !== 0;

export const packFlags = (set: Readonly<Partial<Record<SnapshotFlag, boolean>>>): number =>
  (Object.keys(SNAPSHOT_FLAGS) as SnapshotFlag[]).reduce(
    (bits, flag) => (set[flag] === true ? bits | SNAPSHOT_FLAGS[flag] : bits),
    0,
  );
