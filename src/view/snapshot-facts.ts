import type { SnapshotFacts } from '../standing/qualification';
import { hasFlag } from '../store/snapshot-flags';
import type { SnapshotFigures } from '../store/snapshots';

/** What a raw row says towards whether its snapshot counts. */
export function snapshotFacts({
  at,
  flags,
  throughAmps,
}: Pick<SnapshotFigures, 'at' | 'flags' | 'throughAmps'>): SnapshotFacts {
  return {
    atMs: at.getTime(),
    complete: !hasFlag(flags, 'incomplete'),
    validityGood: !hasFlag(flags, 'validityNotGood'),
    test: hasFlag(flags, 'test'),
    clocksWithinLimit: !hasFlag(flags, 'clockBeyondLimit'),
    breakersClosed: !hasFlag(flags, 'breakerOpen'),
    throughAmps: throughAmps ?? undefined,
  };
}
