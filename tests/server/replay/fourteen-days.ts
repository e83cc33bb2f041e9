import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import { startDatabase } from '../../../simulator/database';
import { runReplay } from '../../../src/server/replay/run';
import { createStore, type Store } from '../../../src/store/client';
import { migrateStore } from '../../../src/store/migrate';
import type { RegisteredLine } from '../../../src/store/register';
import { measurement } from '../../ingest/made-up-feed';
import { storedLine } from '../../store/made-up-rows';
import { feedRow, storeFeed, type Terminals } from './stored-feed';

/**
 * How long a replay of fourteen days of a two-terminal line at 2 s takes, and how long it keeps others waiting:
 * node --import tsx tests/server/replay/fourteen-days.ts [days]
 */

const PERIOD_MS = 2_000;
const DAY_MS = 86_400_000;
const ROWS_A_BATCH = 500;
const days = Number(process.argv[2] ?? 14);
const endMs = Date.parse('2026-03-15T00:00:00.000Z');
const startMs = endMs - days * DAY_MS;

const voltage: NonNullable<Terminals[string]['voltage']> = { a: [128, 0], b: [128, -120], c: [128, 120] };

/** A load that swings through the day, with a mismatch and a little noise. */
function sentAt(atMs: number): Terminals {
  const dayShare = (atMs % DAY_MS) / DAY_MS;
  const amps = 500 + 200 * Math.sin(2 * Math.PI * dayShare);
  const wobble = 3 * Math.sin(atMs / 7_000) + 2 * Math.sin(atMs / 911);
  const ends = (magnitude: number, degrees: number) => ({
    a: [magnitude, degrees] as [number, number],
    b: [magnitude * 1.01, degrees - 120] as [number, number],
    c: [magnitude * 0.995, degrees + 120] as [number, number],
  });
  return {
    arden: measurement({ current: ends(amps, -12.3), voltage }),
    birk: measurement({ current: ends(amps - 9 - wobble, 167.5), voltage }),
  };
}

async function fill(store: Store, line: RegisteredLine): Promise<void> {
  for (let batchMs = startMs; batchMs < endMs; batchMs += ROWS_A_BATCH * PERIOD_MS) {
    const rows = [];
    for (let atMs = batchMs; atMs < Math.min(endMs, batchMs + ROWS_A_BATCH * PERIOD_MS); atMs += PERIOD_MS)
      rows.push(feedRow(line, atMs, sentAt(atMs)));
    await storeFeed(store, rows);
  }
}

const dir = await mkdtemp(join(tmpdir(), 'tareline-replay-'));
const database = await startDatabase({ dir, port: 0 });
const store = createStore(database.url);
try {
  await migrateStore(store);
  const line = await storedLine(store);
  const fillStart = performance.now();
  await fill(store, line);
  console.log(`filled in ${((performance.now() - fillStart) / 1000).toFixed(1)} s`);
  const kinds = [
    ['two-slope', { ...line.settings[0]!, chargingCompensation: false }],
    [
      'alpha plane, compensated',
      {
        characteristic: { kind: 'alpha-plane', pickupAmps: 120, radius: 5, angleDeg: 180 },
        restraint: { kind: 'none' },
        chargingCompensation: true,
      },
    ],
  ] as const;
  for (const [name, { characteristic, restraint, chargingCompensation }] of kinds) {
    const delay = monitorEventLoopDelay({ resolution: 1 });
    delay.enable();
    const start = performance.now();
    const { snapshots, replayed } = await runReplay(
      store,
      {
        line,
        asked: {
          settings: { characteristic, restraint, chargingCompensation },
          from: new Date(startMs).toISOString(),
          to: new Date(endMs).toISOString(),
        },
        nearRatio: 0.7,
        periodMs: PERIOD_MS,
        frequencyHz: 50,
      },
      { signal: new AbortController().signal, onProgress: () => undefined },
    );
    const seconds = (performance.now() - start) / 1000;
    delay.disable();
    const waits = `others waited ${(delay.percentile(99) / 1e6).toFixed(1)} ms (99 %), ${(delay.max / 1e6).toFixed(0)} ms at most`;
    console.log(
      `${name}: ${snapshots} snapshots, ${replayed.evaluated} evaluated, ${seconds.toFixed(1)} s, ${waits}`,
    );
  }
} finally {
  await store.close();
  await database.stop();
  await rm(dir, { recursive: true, force: true });
}
