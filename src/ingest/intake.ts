import { parseFeedTopic, presenceSchema } from '../contract/feed';
import type { IngestSettings } from '../settings';
import type { TerminalStateRow } from '../store/feed';
import { admission } from './admission';
import { type Alignment, createAlignment, type Gathered, joined } from './alignment';
import type { Delivery, Receipt } from './deferred-acknowledgement';
import { createGate } from './gate';
import { INGEST_LIMITS } from './limits';
import { createRefusalTally, type RefusalBatch, type RefusalTally } from './refusal-tally';
import { createTerminalTally, type TerminalTally } from './terminal-tally';
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

/** What stands between a delivery and the batch that stores it. */
interface Reception {
  readonly room: WatchRoom;
  readonly rawReachMs: number;
  readonly alignment: Alignment<Receipt>;
  readonly refusals: RefusalTally;
  readonly terminals: TerminalTally;
  ready: Gathered<Receipt>[];
  readonly receipts: Receipt[];
}

/** The worker's entrance: judges, aligns and tallies deliveries. Writes nothing and never waits. */
export function createIntake(parts: {
  settings: IngestSettings;
  room: WatchRoom;
  now: () => number;
}): FeedIntake {
  const { settings, room, now } = parts;
  const reception: Reception = {
    room,
    rawReachMs: settings.RAW_DAYS * DAY_MS,
    alignment: createAlignment<Receipt>({ ...INGEST_LIMITS, latenessMs: settings.LATENESS_MS }),
    refusals: createRefusalTally(INGEST_LIMITS.refusalsKeptABatch),
    terminals: createTerminalTally(),
    ready: [],
    receipts: [],
  };
  const gate = createGate(INGEST_LIMITS.unacknowledgedMost);
  return {
    take(delivery) {
      if (parseFeedTopic(delivery.topic)?.subject === 'presence') takePresence(reception, delivery);
      else takeMeasurement(reception, delivery, now());
      return delivery.receipt === undefined ? undefined : gate.enter();
    },
    readyCount: () => reception.ready.length,
    collect: () => collected(reception, now()),
    settle: ({ length }) => gate.leave(length),
    recall({ newestInstants, terminalStates }) {
      for (const [lineKey, newestAtMs] of newestInstants) reception.alignment.recall(lineKey, newestAtMs);
      reception.terminals.recall(terminalStates);
    },
  };
}

function takePresence(reception: Reception, { topic, payload, receipt }: Delivery): void {
  const { line, terminal } = parseFeedTopic(topic)!;
  const id = reception.room.roster().get(line)?.terminals.get(terminal)?.id;
  const presence = presenceSchema.safeParse(payload.toString('utf8'));
  if (id !== undefined && presence.success) reception.terminals.presence(id, presence.data);
  settleWithNext(reception, receipt);
}

function takeMeasurement(reception: Reception, delivery: Delivery, nowMs: number): void {
  const { room, rawReachMs, alignment, refusals, terminals } = reception;
  const { receipt } = delivery;
  const judged = admission(delivery, { roster: room.roster(), nowMs, rawReachMs });
  if (!judged.ok) {
    refusals.add(delivery, judged.refusal, new Date(nowMs));
    return settleWithNext(reception, receipt);
  }
  const { line, terminal, measurement, atMs } = judged.admitted;
  terminals.hear(terminal.id, { atMs, seq: measurement.seq, heardAtMs: nowMs });
  const outcome = alignment.take({ line, terminal: terminal.key, atMs, measurement, receipt, nowMs });
  if (outcome === 'duplicate') settleWithNext(reception, receipt);
  else if (outcome !== 'waiting') reception.ready.push(outcome);
}

function settleWithNext(reception: Reception, receipt: Receipt | undefined): void {
  if (receipt !== undefined) reception.receipts.push(receipt);
}

function collected(reception: Reception, nowMs: number): Intake | undefined {
  const { alignment, refusals, terminals } = reception;
  const ready = [...reception.ready, ...alignment.due(nowMs)];
  if (ready.length === 0 && reception.receipts.length === 0 && refusals.isEmpty() && terminals.isEmpty())
    return undefined;
  const gathered = joined(ready.slice(0, INGEST_LIMITS.batchSnapshots));
  reception.ready = ready.slice(INGEST_LIMITS.batchSnapshots);
  // a repetition of what still waits its turn must not be acknowledged ahead of it
  const settled = reception.ready.length === 0 ? reception.receipts.splice(0) : [];
  const receipts = [...settled, ...gathered.flatMap((entry) => entry.receipts)];
  return { gathered, receipts, refusals: refusals.drain(), terminals: terminals.drain() };
}
