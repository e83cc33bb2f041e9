import { createDemoMeasurements } from '../../simulator/demo-history';
import { demoLines } from '../../simulator/network/demo-lines';
import { storyLines } from '../../simulator/stories/story-lines';
import { computedSnapshot } from '../../src/ingest/computed-snapshot';
import { HISTORY_DAYS, type LineHistory } from '../../src/ingest/line-history';
import { type RosterLine, rosterLine } from '../../src/ingest/roster';
import { RUNG_MS, rungRows } from '../../src/ingest/rung';
import { snapshotRow } from '../../src/ingest/snapshot-row';
import { rowsByWindow, summedBelow, windowRows } from '../../src/ingest/window-rows';
import type { LevelRow } from '../../src/store/levels';
import type { SnapshotRow } from '../../src/store/snapshots';

const CLOCK_LIMIT_US = 100;
const FREQUENCY_HZ = 50;
const SEED = 1;

/** A line of the demo network or of the stories as the worker holds it. */
export function demoRosterLine(key: string): RosterLine {
  const { terminals, settings, ...facts } = [...demoLines, ...storyLines].find((line) => line.key === key)!;
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

export interface Span {
  readonly nowMs: number;
  readonly epochMs: number;
  readonly days: number;
  readonly sampleMs: number;
}

/**
 * What a look at midnight goes by, through the product's own evaluation and rows: so many days back, sampled at this
 * spacing. Stories are told around the epoch.
 */
export function demoHistoryOf(
  line: RosterLine,
  { nowMs, epochMs, days: daysBack, sampleMs }: Span,
): LineHistory {
  const feed = createDemoMeasurements({ seed: SEED, epochMs });
  const hours: LevelRow[] = [];
  const days: LevelRow[] = [];
  let before: SnapshotRow | undefined;
  for (let dayMs = nowMs - daysBack * RUNG_MS.day; dayMs < nowMs; dayMs += RUNG_MS.day) {
    const rows: SnapshotRow[] = [];
    for (let atMs = dayMs; atMs < dayMs + RUNG_MS.day; atMs += sampleMs) {
      const sent = feed(line.key, atMs).map(({ terminal, measurement }) => [terminal, measurement] as const);
      rows.push(snapshotRow(computedSnapshot({ line, atMs, measurements: new Map(sent) }, CLOCK_LIMIT_US)));
    }
    const beforeDay = before;
    const ofDay = rowsByWindow('hour', rows).flatMap((window) => {
      const built = windowRows(line, { rung: 'hour', rows: window }, before);
      before = window.at(-1);
      return built;
    });
    if (dayMs >= nowMs - HISTORY_DAYS.step * RUNG_MS.day) hours.push(...ofDay);
    const window = { lineId: line.id, start: new Date(dayMs), ratingAmps: line.ratingAmps };
    days.push(
      ...rungRows(window, rows, beforeDay).map((row) => ({ ...row, sums: summedBelow(ofDay, row.phase) })),
    );
  }
  return { nowMs, hours, days };
}
