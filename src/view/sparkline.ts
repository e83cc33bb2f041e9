import type { LineSummary } from '../contract/lines';

/** Standing levels of the last days as a small picture: x and y from 0 to 1, y upwards. */
export interface SparklinePicture {
  /** runs of days without a gap; a day without a level breaks the line, it is not drawn as zero */
  readonly runs: readonly (readonly { readonly x: number; readonly y: number }[])[];
  readonly near: number | undefined;
  readonly dayCount: number;
  readonly firstAmps: number;
  readonly lastAmps: number;
}

type Days = LineSummary['dailyLevels'];

/** Undefined when fewer than two days have a level. */
export function sparkline(days: Days, nearAmps: number | undefined): SparklinePicture | undefined {
  const known = days.flatMap((day) => (day.levelAmps === null ? [] : [day.levelAmps]));
  if (known.length < 2) return undefined;
  const top = Math.max(...known, nearAmps ?? 0) * 1.12 || 1;
  const runs: { x: number; y: number }[][] = [[]];
  days.forEach((day, index) => {
    const run = runs[runs.length - 1]!;
    if (day.levelAmps !== null) run.push({ x: index / (days.length - 1), y: day.levelAmps / top });
    else if (run.length > 0) runs.push([]);
  });
  return {
    runs: runs.filter((run) => run.length > 0),
    near: nearAmps === undefined ? undefined : nearAmps / top,
    dayCount: days.length,
    firstAmps: known[0]!,
    lastAmps: known[known.length - 1]!,
  };
}
