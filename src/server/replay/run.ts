import { setImmediate } from 'node:timers/promises';
import type { ReplayRequest, ReplayResult } from '../../contract/replay';
import type { Store } from '../../store/client';
import { readPackedAfter, type PackedSnapshot } from '../../store/packed-snapshots';
import type { RegisteredLine } from '../../store/register';
import { createJudge, type RowJudged } from './judge';
import { REPLAY_LIMITS } from './limits';
import { createReplayTally } from './tally';

export interface ReplayWork {
  readonly line: RegisteredLine;
  readonly asked: ReplayRequest;
  readonly nearRatio: number;
  readonly periodMs: number;
  readonly frequencyHz: number;
}

export interface ReplayWatch {
  readonly signal: AbortSignal;
  onProgress(progress: { ratio: number; snapshots: number }): void;
}

/**
 * Judges every raw row of a period by the recorded settings and by those tried. It reads page by page along the
 * primary key and lets others have their turn every few milliseconds: the live stream shares this process.
 * Throws the signal's reason when it is aborted.
 */
export async function runReplay(
  store: Store,
  { line, asked, nearRatio, periodMs, frequencyHz }: ReplayWork,
  { signal, onProgress }: ReplayWatch,
): Promise<ReplayResult> {
  const fromMs = Date.parse(asked.from);
  const toMs = Date.parse(asked.to);
  const judge = createJudge(line, { settings: asked.settings, frequencyHz });
  const tally = createReplayTally({ ...REPLAY_LIMITS, nearRatio, periodMs });
  const seen = { snapshots: 0, underTest: 0, firstMs: undefined as number | undefined, lastMs: fromMs - 1 };
  const take = (judged: RowJudged): void => {
    seen.snapshots += 1;
    seen.firstMs ??= judged.atMs;
    seen.lastMs = judged.atMs;
    if (!('underTest' in judged)) return tally.add(judged);
    seen.underTest += 1;
    tally.pass(judged.atMs);
  };
  for (let more = true; more;) {
    signal.throwIfAborted();
    const page = await readPackedAfter(store, line.id, {
      after: new Date(seen.lastMs),
      to: new Date(toMs),
      most: REPLAY_LIMITS.pageRows,
    });
    await inSlices(page, (row) => take(judge(row)), signal);
    more = page.length === REPLAY_LIMITS.pageRows;
    const startMs = seen.firstMs ?? fromMs;
    onProgress({
      ratio: more ? (seen.lastMs - startMs) / Math.max(1, toMs - startMs) : 1,
      snapshots: seen.snapshots,
    });
  }
  const iso = (atMs: number | undefined) => (atMs === undefined ? null : new Date(atMs).toISOString());
  return {
    line: line.key,
    ...asked,
    nearRatio,
    snapshots: seen.snapshots,
    firstAt: iso(seen.firstMs),
    lastAt: seen.firstMs === undefined ? null : iso(seen.lastMs),
    underTest: seen.underTest,
    ...tally.outcome(),
  };
}

async function inSlices(
  rows: readonly PackedSnapshot[],
  take: (row: PackedSnapshot) => void,
  signal: AbortSignal,
): Promise<void> {
  let sliceStart = performance.now();
  for (const row of rows) {
    take(row);
    if (performance.now() - sliceStart < REPLAY_LIMITS.sliceMs) continue;
    await setImmediate();
    signal.throwIfAborted();
    sliceStart = performance.now();
  }
}
