import { FEED_LIMITS, type Refusal, type RefusalReason } from '../contract/feed';
import type { RefusedMessage } from '../store/feed';

const TOPIC_MOST = 255;
const DETAIL_MOST = 500;

export interface RefusalBatch {
  readonly kept: readonly RefusedMessage[];
  readonly counts: ReadonlyMap<RefusalReason, number>;
}

/** Gathers refusals between two commits; a flood is counted in full and kept in part. */
export interface RefusalTally {
  add(message: { topic: string; payload: Buffer }, refusal: Refusal, at: Date): void;
  drain(): RefusalBatch;
  isEmpty(): boolean;
}

export function createRefusalTally(keptMost: number): RefusalTally {
  let kept: RefusedMessage[] = [];
  let counts = new Map<RefusalReason, number>();
  return {
    add({ topic, payload }, { reason, detail }, at) {
      counts.set(reason, (counts.get(reason) ?? 0) + 1);
      if (kept.length >= keptMost) return;
      kept.push({
        at,
        topic: topic.slice(0, TOPIC_MOST),
        reason,
        detail: detail.slice(0, DETAIL_MOST),
        payload: Buffer.from(payload.subarray(0, FEED_LIMITS.keptPayloadBytes)),
      });
    },
    drain() {
      const batch = { kept, counts };
      kept = [];
      counts = new Map();
      return batch;
    },
    isEmpty: () => counts.size === 0,
  };
}
