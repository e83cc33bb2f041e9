import { createDemoMeasurements, type DemoMeasurements } from '../../simulator/demo-history';
import { demoLines } from '../../simulator/network/demo-lines';
import { storyLines } from '../../simulator/stories/story-lines';
import type { StandingVerdict } from '../../src/contract/standing';
import { computedSnapshot } from '../../src/ingest/computed-snapshot';
import { HISTORY_DAYS, type LineHistory } from '../../src/ingest/verdict/line-history';
import { phaseStep } from '../../src/ingest/verdict/phase-step';
import { phaseVerdict } from '../../src/ingest/verdict/phase-verdict';
import { type RosterLine, rosterLine } from '../../src/ingest/roster';
import { RUNG_MS, rungRows } from '../../src/ingest/rungs/rung';
import { snapshotRow } from '../../src/ingest/snapshot-row';
import {
  channelPathBelow,
  minuteRows,
  rowsByWindow,
  summedBelow,
  windowRows,
} from '../../src/ingest/rungs/window-rows';
import type { PhaseName } from '../../src/protection/phase';
import type { HourOfLoad, LevelRow } from '../../src/store/levels';
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
  const hoursOfLoad: HourOfLoad[] = [];
  let before: SnapshotRow | undefined;
  for (let dayMs = nowMs - daysBack * RUNG_MS.day; dayMs < nowMs; dayMs += RUNG_MS.day) {
    const rows = rawRows(line, feed, { fromMs: dayMs, toMs: dayMs + RUNG_MS.day, sampleMs });
    const beforeDay = before;
    const ofDay = rowsByWindow('hour', rows).flatMap((window) => {
      const built = windowRows(line, { rung: 'hour', rows: window }, before);
      before = window.at(-1);
      return built;
    });
    if (dayMs >= nowMs - HISTORY_DAYS.step * RUNG_MS.day) hours.push(...ofDay);
    hoursOfLoad.push(...ofDay.flatMap(hourOfLoad));
    const window = { lineId: line.id, start: new Date(dayMs), ratingAmps: line.ratingAmps };
    days.push(
      ...rungRows(window, rows, beforeDay).map((row) => ({
        ...row,
        sums: summedBelow(ofDay, row.phase),
        channelPath: channelPathBelow(ofDay, row.phase),
      })),
    );
  }
  return { nowMs, hours, days, works: [], hoursOfLoad };
}

const hourOfLoad = ({ phase, start, medianAmps, meanThroughAmps }: LevelRow): HourOfLoad[] =>
  medianAmps === null || meanThroughAmps === null ? [] : [{ phase, start, medianAmps, meanThroughAmps }];

function rawRows(
  line: RosterLine,
  feed: DemoMeasurements,
  { fromMs, toMs, sampleMs }: { fromMs: number; toMs: number; sampleMs: number },
): SnapshotRow[] {
  const rows: SnapshotRow[] = [];
  for (let atMs = fromMs; atMs < toMs; atMs += sampleMs) {
    const sent = feed(line.key, atMs).map(({ terminal, measurement }) => [terminal, measurement] as const);
    rows.push(snapshotRow(computedSnapshot({ line, atMs, measurements: new Map(sent) }, CLOCK_LIMIT_US)));
  }
  return rows;
}

/** The minute rows of a stretch, sampled at this spacing. */
export function demoMinutesOf(
  line: RosterLine,
  { epochMs, ...stretch }: { fromMs: number; toMs: number; sampleMs: number; epochMs: number },
): LevelRow[] {
  return minuteRows(line, rawRows(line, createDemoMeasurements({ seed: SEED, epochMs }), stretch), undefined);
}

/** What is found of one phase by its history, without an earlier look. */
export function verdictOf(line: RosterLine, history: LineHistory, phase: PhaseName): StandingVerdict {
  const step = phaseStep(line, history, { phase, earlier: undefined });
  return phaseVerdict(line, history, { phase, nearRatio: 0.7, frequencyHz: FREQUENCY_HZ, step });
}
