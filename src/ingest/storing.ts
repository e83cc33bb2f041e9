import type { Store } from '../store/client';
import type { WarningLimits } from '../warnings/limits';
import { type Batch, commitBatch, joinStored, type LineChange } from './commit';
import { computedSnapshot, type ComputedSnapshot } from './computed-snapshot';
import type { Receipt } from './deferred-acknowledgement';
import type { FeedIntake, Intake } from './intake';
import { type LineWatch, type WarningChange, watchSnapshot, watchTime } from './line-watch';
import { untilDone, type Retrying } from './retry';
import { snapshotRow } from './snapshot-row';
import { staleHours } from './rungs/stale-hours';
import type { WatchRoom } from './watch-room';

export interface StoringParts {
  readonly store: Store;
  readonly intake: FeedIntake;
  readonly room: WatchRoom;
  readonly limits: WarningLimits;
  readonly clockLimitUs: number;
  readonly now: () => number;
  readonly database: Retrying;
  acknowledge(receipts: readonly Receipt[]): void;
  publish(watch: LineWatch): void;
}

export interface Storing {
  /** Stores what has come in, then acknowledges and publishes it; waits for as long as the database is away. */
  storeOnce(): Promise<void>;
  /** Takes warnings that turned elsewhere, to be written with the next batch. */
  note(watch: LineWatch, changes: readonly WarningChange[]): void;
  committedCount(): number;
}

export function createStoring(parts: StoringParts): Storing {
  const { store, intake, room, limits, now, database } = parts;
  let turned: LineChange[] = [];
  let committed = 0;

  const note = ({ line }: LineWatch, changes: readonly WarningChange[]) => {
    turned.push(...changes.map((change) => ({ lineId: line.id, change })));
  };

  /** Hands each snapshot to its line's watch; says of which lines there is something new to publish. */
  const watched = (snapshots: readonly ComputedSnapshot[]): Set<LineWatch> => {
    const touched = new Set<LineWatch>();
    for (const snapshot of snapshots) {
      const watch = room.watchOf(snapshot.line.id);
      // the line left the register while its snapshot was waiting
      if (watch === undefined) continue;
      const shown = watch.newest;
      note(watch, watchSnapshot(watch, snapshot, { nowMs: now(), limits }));
      if (watch.newest === snapshot && isWorthShowing(watch, shown)) touched.add(watch);
    }
    return touched;
  };

  const storeOnce = async (): Promise<void> => {
    const collected = intake.collect() ?? NOTHING;
    await untilDone(() => joinStored(store, collected.gathered), database);
    const snapshots = collected.gathered.map((entry) => computedSnapshot(entry, parts.clockLimitUs));
    const touched = watched(snapshots);
    // after the snapshots: lines that waited for a database that was away are not blind
    for (const watch of room.watches()) note(watch, watchTime(watch, now(), limits));
    if (collected === NOTHING && turned.length === 0) return;
    const warnings = turned;
    turned = [];
    const rows = snapshots.map(snapshotRow);
    await untilDone(() => {
      // asked anew at every try: an hour may close while the database is away
      const nowMs = now();
      const batch: Batch = { ...collected, rows, warnings, staleHours: staleHours(snapshots, nowMs) };
      return commitBatch(store, batch, new Date(nowMs));
    }, database);
    parts.acknowledge(collected.receipts);
    intake.settle(collected.receipts);
    committed += snapshots.length;
    for (const { lineId } of warnings) {
      const watch = room.watchOf(lineId);
      if (watch !== undefined) touched.add(watch);
    }
    touched.forEach(parts.publish);
  };

  return { storeOnce, note, committedCount: () => committed };
}

const NOTHING: Intake = {
  gathered: [],
  receipts: [],
  refusals: { kept: [], counts: new Map() },
  terminals: [],
};

/** One missing message must not blank a line that is seen again two seconds later. */
function isWorthShowing({ newest, standing }: LineWatch, shownBefore: ComputedSnapshot | undefined): boolean {
  return newest?.unevaluable?.by !== 'feed' || shownBefore?.points === undefined || standing.has('blind');
}
