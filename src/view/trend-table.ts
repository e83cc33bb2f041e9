import type { PerPhase } from '../protection/phase';
import { PHASES } from './phase';
import type { PhaseName } from './phase';
import type { LineTable, TableColumn } from './line-table';
import type { CurrentUnit } from './line-unit';
import { inUnit, unitSign } from './line-unit';
import type { PhaseLetters } from './site-custom';
import type { TrendPoint } from './trend-points';
import type { TrendSource } from './trend-span';

interface TrendTableContext {
  readonly source: TrendSource;
  readonly phases: readonly PhaseName[];
  readonly letters: PhaseLetters;
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
  readonly caption: string;
}

/** What the trend draws, as rows, newest first: one row an instant and phase. */
export function trendTable(series: PerPhase<readonly TrendPoint[]>, context: TrendTableContext): LineTable {
  const { source, unit, ratingAmps, letters } = context;
  const shown = (amps: number | null) => inUnit(amps, unit, ratingAmps);
  const rows = PHASES.filter((phase) => context.phases.includes(phase))
    .flatMap((phase) => series[phase].map((point) => ({ phase, point })))
    .sort((one, other) => other.point.startMs - one.point.startMs);
  return {
    caption: context.caption,
    columns: columns(source, unit),
    rows: rows.map(({ phase, point }) => {
      const { startMs, medianAmps, lowAmps, highAmps, qualifiedCount, allCount } = point;
      const level = [startMs, letters[phase], shown(medianAmps)];
      if (source === 'snapshots') return level;
      return [...level, shown(lowAmps), shown(highAmps), qualifiedCount, allCount];
    }),
  };
}

function columns(source: TrendSource, unit: CurrentUnit): TableColumn[] {
  const sign = unitSign(unit);
  const digits = unit === 'amperes' ? 1 : 4;
  const figure = (head: string): TableColumn => ({ kind: 'figure', head: `${head}, ${sign}`, digits });
  const count = (head: string): TableColumn => ({ kind: 'figure', head, digits: 0 });
  if (source === 'snapshots')
    return [{ kind: 'instant', head: 'instant' }, { kind: 'text', head: 'phase' }, figure('differential')];
  return [
    { kind: 'instant', head: `${source} from` },
    { kind: 'text', head: 'phase' },
    figure('median'),
    figure('5th percentile'),
    figure('95th percentile'),
    count('qualified'),
    count('of all'),
  ];
}
