import { createDemoMeasurements } from '../../simulator/demo-history';
import { demoLines } from '../../simulator/network/demo-lines';
import { computedSnapshot } from '../../src/ingest/computed-snapshot';
import type { LineHistory } from '../../src/ingest/line-history';
import { type RosterLine, rosterLine } from '../../src/ingest/roster';
import { RUNG_MS, rungRows } from '../../src/ingest/rung';
import { snapshotRow } from '../../src/ingest/snapshot-row';
import { rowsByWindow, summedBelow, windowRows } from '../../src/ingest/window-rows';
import type { LevelRow } from '../../src/store/levels';
import type { SnapshotRow } from '../../src/store/snapshots';

const DAYS = 60;
const SAMPLE_MS = 600_000;
const CLOCK_LIMIT_US = 100;
const FREQUENCY_HZ = 50;
const feedOf = (epochMs: number) => createDemoMeasurements({ seed: 1, epochMs });

/** A line of the demo network as the worker holds it. */
export function demoRosterLine(key: string): RosterLine {
  const { terminals, settings, ...facts } = demoLines.find((line) => line.key === key)!;
  return rosterLine(
    {
      ...facts,
      id: 1,
      terminals: terminals.map((terminal, position) => ({ ...terminal, position })),
      terminalIds: new Map(terminals.map((terminal, index) => [terminal.key, index + 1])),
      settings: settings.map((version, index) => ({
        ...version,
        id: index + 1,
        recordedBy: 'test',
        recordedAt: version.validFrom,
      })),
    },
    FREQUENCY_HZ,
  );
}

/** Two months of a demo line through the product's own evaluation, sampled every ten minutes, up to midnight. */
export function demoHistoryOf(line: RosterLine, nowMs: number): LineHistory {
  const feed = feedOf(nowMs);
  const hours: LevelRow[] = [];
  const days: LevelRow[] = [];
  let before: SnapshotRow | undefined;
  for (let dayMs = nowMs - DAYS * RUNG_MS.day; dayMs < nowMs; dayMs += RUNG_MS.day) {
    const rows: SnapshotRow[] = [];
    for (let atMs = dayMs; atMs < dayMs + RUNG_MS.day; atMs += SAMPLE_MS) {
      const measurements = new Map(
        feed(line.key, atMs).map(({ terminal, measurement }) => [terminal, measurement]),
      );
      rows.push(snapshotRow(computedSnapshot({ line, atMs, measurements }, CLOCK_LIMIT_US)));
    }
    const ofDay = rowsByWindow('hour', rows).flatMap((window) => {
      const built = windowRows(line, { rung: 'hour', rows: window }, before);
      before = window.at(-1);
      return built;
    });
    hours.push(...ofDay);
    const window = { lineId: line.id, start: new Date(dayMs), ratingAmps: line.ratingAmps };
    days.push(
      ...rungRows(window, rows, undefined).map((row) => ({ ...row, sums: summedBelow(ofDay, row.phase) })),
    );
  }
  return { nowMs, hours, days };
}
