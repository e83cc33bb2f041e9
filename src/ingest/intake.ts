import { parseFeedTopic, presenceSchema } from '../contract/feed';
import type { IngestSettings } from '../settings';
import type { TerminalStateRow } from '../store/feed';
import { admission } from './admission';
import { createAlignment, type Gathered, joined } from './alignment';
import type { Delivery, Receipt } from './deferred-acknowledgement';
import { INGEST_LIMITS } from './limits';
import { createRefusalTally, type RefusalBatch } from './refusal-tally';
import { createTerminalTally } from './terminal-tally';
import type { TakenUp, WatchRoom } from './watch-room';

const DAY_MS = 86_400_000;

/** What has come in and is ready to be stored together. */
export interface Intake {
  readonly gathered: readonly Gathered<Receipt>[];
  /** to be acknowledged when this has been stored */
  readonly receipts: readonly Receipt[];
  readonly refusals: RefusalBatch;
  readonly terminals: readonly TerminalStateRow[];
}

export interface FeedIntake {
  /** Takes a delivery; a promise stalls the feed until there is room again. */
  take(delivery: Delivery): Promise<void> | undefined;
  /** How many snapshots are ready. */
  readyCount(): number;
  /** Everything that is ready, or undefined when nothing has come. */
  collect(): Intake | undefined;
  /** Gives room back once receipts have been acknowledged. */
  settle(receipts: readonly Receipt[]): void;
  recall(taken: TakenUp): void;
}

/** The worker's entrance: judges, aligns and tallies deliveries. Writes nothing and never waits. */
export function createIntake({
  settings,
  room,
  now,
}: {
  settings: IngestSettings;
  room: WatchRoom;
  now: () => number;
}): FeedIntake {
  const rawReachMs = settings.RAW_DAYS * DAY_MS;
  const alignment = createAlignment<Receipt>({ ...INGEST_LIMITS, latenessMs: settings.LATENESS_MS });
  const refusals = createRefusalTally(INGEST_LIMITS.refusalsKeptABatch);
  const terminals = createTerminalTally();
  const gate = createGate(INGEST_LIMITS.unacknowledgedMost);
  let ready: Gathered<Receipt>[] = [];
  let receipts: Receipt[] = [];

  const settleWithNext = (receipt: Receipt | undefined) => {
    if (receipt !== undefined) receipts.push(receipt);
  };

  const takePresence = ({ topic, payload, receipt }: Delivery) => {
    const { line, terminal } = parseFeedTopic(topic)!;
    const id = room.roster().get(line)?.terminals.get(terminal)?.id;
    const presence = presenceSchema.safeParse(payload.toString('utf8'));
    if (id !== undefined && presence.success) terminals.presence(id, presence.data);
    settleWithNext(receipt);
  };

  const takeMeasurement = (delivery: Delivery) => {
    const nowMs = now();
    const judged = admission(delivery, { roster: room.roster(), nowMs, rawReachMs });
    if (!judged.ok) {
      refusals.add(delivery, judged.refusal, new Date(nowMs));
      return settleWithNext(delivery.receipt);
    }
    const { line, terminal, measurement, atMs } = judged.admitted;
    terminals.hear(terminal.id, { atMs, seq: measurement.seq, heardAtMs: nowMs });
    const outcome = alignment.take({
      line,
      terminal: terminal.key,
      atMs,
      measurement,
      receipt: delivery.receipt,
      nowMs,
    });
    if (outcome === 'duplicate') settleWithNext(delivery.receipt);
    else if (outcome !== 'waiting') ready.push(outcome);
  };

  return {
    take(delivery) {
      if (parseFeedTopic(delivery.topic)?.subject === 'presence') takePresence(delivery);
      else takeMeasurement(delivery);
      return delivery.receipt === undefined ? undefined : gate.enter();
    },
    readyCount: () => ready.length,
    collect() {
      ready.push(...alignment.due(now()));
      if (ready.length === 0 && receipts.length === 0 && refusals.isEmpty() && terminals.isEmpty())
        return undefined;
      const gathered = joined(ready.slice(0, INGEST_LIMITS.batchSnapshots));
      ready = ready.slice(INGEST_LIMITS.batchSnapshots);
      const settled = receipts;
      receipts = [];
      return {
        gathered,
        receipts: [...settled, ...gathered.flatMap((entry) => entry.receipts)],
        refusals: refusals.drain(),
        terminals: terminals.drain(),
      };
    },
    settle: ({ length }) => gate.leave(length),
    recall({ newestInstants, terminalStates }) {
      for (const [lineKey, newestAtMs] of newestInstants) alignment.recall(lineKey, newestAtMs);
      terminals.recall(terminalStates);
    },
  };
}

/** Counts who is inside; once full, whoever enters is asked to wait until there is room. */
function createGate(most: number): { enter(): Promise<void> | undefined; leave(count: number): void } {
  let inside = 0;
  let waiting: { promise: Promise<void>; open: () => void } | undefined;
  return {
    enter() {
      inside += 1;
      if (inside < most) return undefined;
      waiting ??= opening();
      return waiting.promise;
    },
    leave(count) {
      inside -= count;
      if (inside >= most || waiting === undefined) return;
      waiting.open();
      waiting = undefined;
    },
  };
}

function opening(): { promise: Promise<void>; open: () => void } {
  let open = () => {};
  const promise = new Promise<void>((resolve) => (open = resolve));
  return { promise, open };
}
