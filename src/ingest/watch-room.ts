import { measurementTopic, presenceTopic } from '../contract/feed';
import type { WarningKind } from '../contract/warning';
import type { IngestSettings } from '../settings';
import type { Store } from '../store/client';
import { readTerminalStates, type TerminalStateRow } from '../store/feed';
import { groupedBy } from '../store/grouped';
import { readRegister, readRegisterRevision } from '../store/register';
import { readNewestInstants } from '../store/snapshots';
import { readStandingWarnings } from '../store/warnings';
import { type LineWatch, lineWatch } from './line-watch';
import { type Roster, roster } from './roster';

/** What the store remembers of lines that this worker has just taken up. */
export interface TakenUp {
  readonly newestInstants: ReadonlyMap<string, number>;
  readonly terminalStates: readonly TerminalStateRow[];
}

/** The lines of this worker and the watch over each, kept in step with the register. */
export interface WatchRoom {
  roster(): Roster;
  watches(): Iterable<LineWatch>;
  watchOf(lineId: number): LineWatch | undefined;
  /** the feed topics of these lines */
  topics(): string[];
  /** Reads the register again where it has changed; undefined when nothing has. */
  refresh(): Promise<TakenUp | undefined>;
}

type Parts = { settings: IngestSettings; store: Store; now: () => number };

export function createWatchRoom({ settings, store, now }: Parts): WatchRoom {
  let revision: number | undefined;
  let lines: Roster = new Map();
  const watches = new Map<number, LineWatch>();

  const refresh = async (): Promise<TakenUp | undefined> => {
    const current = await readRegisterRevision(store);
    if (current === revision) return undefined;
    const fresh = roster(await readRegister(store), {
      workerIndex: settings.WORKER_INDEX,
      workerCount: settings.WORKER_COUNT,
      frequencyHz: settings.NOMINAL_FREQUENCY_HZ,
    });
    const added = [...fresh.values()].filter(({ id }) => !watches.has(id));
    const addedIds = added.map(({ id }) => id);
    const newest = await readNewestInstants(store, addedIds);
    const standing = groupedBy(await readStandingWarnings(store, addedIds), ({ lineId }) => lineId);
    const terminalStates = await readTerminalStates(
      store,
      added.flatMap(({ terminals }) => [...terminals.values()].map(({ id }) => id)),
    );
    for (const line of added) {
      const kinds = new Set<WarningKind>((standing.get(line.id) ?? []).map(({ kind }) => kind));
      watches.set(line.id, lineWatch(line, kinds, now()));
    }
    keepInStep(watches, fresh);
    lines = fresh;
    revision = current;
    const newestInstants = new Map(
      added.flatMap(({ id, key }) => {
        const at = newest.get(id);
        return at === undefined ? [] : [[key, at.getTime()] as const];
      }),
    );
    return { newestInstants, terminalStates };
  };

  return {
    roster: () => lines,
    watches: () => watches.values(),
    watchOf: (lineId) => watches.get(lineId),
    topics: () => feedTopics(lines, settings.WORKER_COUNT),
    refresh,
  };
}

function keepInStep(watches: Map<number, LineWatch>, fresh: Roster): void {
  const byId = new Map([...fresh.values()].map((line) => [line.id, line]));
  for (const [id, watch] of watches) {
    const line = byId.get(id);
    if (line === undefined) watches.delete(id);
    else watch.line = line;
  }
}

/** A single worker hears the whole feed, and so also of lines that the register does not hold; one of many hears its own lines. */
function feedTopics(lines: Roster, workerCount: number): string[] {
  if (workerCount === 1) return ['feed/+/+/measurement', 'feed/+/+/presence'];
  return [...lines.keys()].flatMap((key) => [measurementTopic(key, '+'), presenceTopic(key, '+')]);
}
