import type { PerPhase } from '../protection/phase';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import type { LineTable, TableColumn } from './line-table';
import type { CurrentUnit } from './line-unit';
import { inUnit, unitSign } from './line-unit';
import type { PhaseLetters } from './site-custom';
import type { TrendMark } from './trend-marks';
import { RUNG_MS, type TrendPoint } from './trend-points';
import type { TrendSource } from './trend-span';

interface TrendTableContext {
  readonly source: TrendSource;
  readonly phases: readonly PhaseName[];
  readonly letters: PhaseLetters;
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
  readonly caption: string;
  readonly marks: readonly TrendMark[];
}

/**
 * What the trend draws, as rows, newest first: one row an instant and phase. A mark stands in the rows of its time, or
 * in one of its own where there are none.
 */
export function trendTable(series: PerPhase<readonly TrendPoint[]>, context: TrendTableContext): LineTable {
  const { source, unit, ratingAmps, letters } = context;
  const shown = (amps: number | null) => inUnit(amps, unit, ratingAmps);
  const points = PHASES.filter((phase) => context.phases.includes(phase)).flatMap((phase) =>
    series[phase].map((point) => ({ phase, point })),
  );
  const told = toldMarks(
    context.marks,
    points.map(({ point }) => point.startMs),
    source,
  );
  const width = columns(source, unit).length;
  const levels = points.map(({ phase, point }) => {
    const { startMs, medianAmps, lowAmps, highAmps, qualifiedCount, allCount } = point;
    const level = [startMs, letters[phase], shown(medianAmps)];
    const spread = source === 'snapshots' ? [] : [shown(lowAmps), shown(highAmps), qualifiedCount, allCount];
    return { startMs, cells: [...level, ...spread, told.beside.get(startMs) ?? ''] };
  });
  const alone = told.alone.map(({ atMs, told: words }) => ({
    startMs: atMs,
    cells: [atMs, ...Array<null>(width - 2).fill(null), words],
  }));
  return {
    caption: context.caption,
    columns: columns(source, unit),
    rows: [...levels, ...alone].sort((one, other) => other.startMs - one.startMs).map(({ cells }) => cells),
  };
}

/** The marks by the start of the row that their instant lies in, and those that lie in none. */
function toldMarks(marks: readonly TrendMark[], startsMs: readonly number[], source: TrendSource) {
  const starts = new Set(startsMs);
  const startOf = ({ atMs }: TrendMark): number | undefined =>
    source === 'snapshots'
      ? undefined
      : [...starts].find((startMs) => startMs <= atMs && atMs < startMs + RUNG_MS[source]);
  const placed = marks.map((mark) => ({ mark, startMs: startOf(mark) }));
  const beside = new Map<number, string>();
  for (const { mark, startMs } of placed)
    if (startMs !== undefined)
      beside.set(startMs, [beside.get(startMs), mark.told].filter((words) => words !== undefined).join('; '));
  return {
    beside,
    alone: placed.filter(({ startMs }) => startMs === undefined).map(({ mark }) => mark),
  };
}

function columns(source: TrendSource, unit: CurrentUnit): TableColumn[] {
  const sign = unitSign(unit);
  const digits = unit === 'amperes' ? 1 : 4;
  const figure = (head: string): TableColumn => ({ kind: 'figure', head: `${head}, ${sign}`, digits });
  const count = (head: string): TableColumn => ({ kind: 'figure', head, digits: 0 });
  if (source === 'snapshots')
    return [
      { kind: 'instant', head: 'instant' },
      { kind: 'text', head: 'phase' },
      figure('differential'),
      { kind: 'text', head: 'known change' },
    ];
  return [
    { kind: 'instant', head: `${source} from` },
    { kind: 'text', head: 'phase' },
    figure('median'),
    figure('5th percentile'),
    figure('95th percentile'),
    count('qualified'),
    count('of all'),
    { kind: 'text', head: 'known change' },
  ];
}
