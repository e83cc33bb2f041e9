import type { LineList, LineSummary } from '../contract/lines';
import type { Result } from '../contract/result';
import type { Warning } from '../contract/warning';

const atMs = (instant: string | null): number => (instant === null ? -Infinity : Date.parse(instant));

// The Board merges with every frame; a line that has not moved must come out as the same object for its row to rest.
const mergedBefore = new WeakMap<Result, { summary: LineSummary; merged: LineSummary }>();

/** A summary with the stream's result in place of its own figures, unless the summary knows a later instant. */
export function withResult(summary: LineSummary, result: Result | undefined): LineSummary {
  if (result === undefined || atMs(result.at) < atMs(summary.at)) return summary;
  const before = mergedBefore.get(result);
  if (before?.summary === summary) return before.merged;
  const { at, condition, reason, phases, throughAmps, throughRatio, settingsVersion } = result;
  const merged = { ...summary, at, condition, reason, phases, throughAmps, throughRatio, settingsVersion };
  mergedBefore.set(result, { summary, merged });
  return merged;
}

/** How much later than its changes a list may be stamped and still lack them. */
const LIST_LAG_MS = 5_000;

/**
 * Open warnings with each one's newest state: what has gone back to normal and is acknowledged leaves the list.
 * A change older than the list, of a warning that the list does not have, is of one that has left it meanwhile.
 */
export function withNewestWarnings(
  known: readonly Warning[],
  changed: Iterable<Warning>,
  listAt: string | undefined = undefined,
): Warning[] {
  const oldestMs = listAt === undefined ? -Infinity : Date.parse(listAt) - LIST_LAG_MS;
  const newest = new Map(known.map((warning) => [warning.id, warning]));
  for (const warning of changed) {
    const before = newest.get(warning.id);
    const changedMs = atMs(warning.changedAt);
    if (before === undefined ? changedMs >= oldestMs : atMs(before.changedAt) <= changedMs)
      newest.set(warning.id, warning);
  }
  return [...newest.values()].filter((warning) => warning.state !== 'normal');
}

/** The list as the stream has moved it on. Lines that did not change keep their identity, so that their rows stay as drawn. */
export function mergeLive(
  list: LineList,
  results: ReadonlyMap<string, Result>,
  warnings: ReadonlyMap<number, Warning>,
): LineSummary[] {
  const changed = new Map<string, Warning[]>();
  for (const warning of warnings.values()) {
    const ofLine = changed.get(warning.line);
    if (ofLine === undefined) changed.set(warning.line, [warning]);
    else ofLine.push(warning);
  }
  return list.lines.map((summary) => {
    const merged = withResult(summary, results.get(summary.key));
    const ofLine = changed.get(summary.key);
    if (ofLine === undefined) return merged;
    return { ...merged, warnings: withNewestWarnings(merged.warnings, ofLine, list.at) };
  });
}
