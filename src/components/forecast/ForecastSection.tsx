import { useState } from 'react';
import { forecastAxis, forecastRange } from '../../view/forecast-axis';
import { forecastGroups, shownDates, type ForecastRow } from '../../view/forecast-list';
import type { ForecastGrouping } from '../../view/forecast-query';
import { ForecastRowItem, ROW_GRID, type ForecastRowProps } from './ForecastRowItem';
import { AxisLabels } from './RangeMark';

interface ForecastSectionProps extends Omit<ForecastRowProps, 'row' | 'axis'> {
  id: string;
  title: string;
  /** what the range of each row means here */
  caption: string;
  rows: readonly ForecastRow[];
  grouping: ForecastGrouping;
}

/** A longer list is no work list for a first look; the rest comes when it is asked for. */
const ROWS_FIRST = 50;

/** Lines of one kind, in one list or one a group. */
export function ForecastSection({ id, title, caption, rows, grouping, ...shared }: ForecastSectionProps) {
  const [most, setMost] = useState(ROWS_FIRST);
  if (rows.length === 0) return null;
  const axis = forecastAxis(rows.map(shownDates), shared.nowMs);
  const dated = rows.some((row) => forecastRange(shownDates(row), axis) !== undefined);
  return (
    <section aria-labelledby={id} className="mt-7">
      <div className={`grid items-end gap-x-7 px-4 pl-5 max-lg:px-0 ${ROW_GRID}`}>
        <div className="lg:-ml-5 lg:col-span-2">
          <h2 id={id} className="font-medium">
            {title}, {rows.length}
          </h2>
          <p className="text-caption text-ink-2">{caption}</p>
        </div>
        {dated && <AxisLabels axis={axis} className="max-lg:hidden" />}
      </div>
      {forecastGroups(rows.slice(0, most), grouping).map((group) => (
        <div key={group.key}>
          {group.name !== '' && <h3 className="mt-4 mb-1 font-medium text-ink-2">{group.name}</h3>}
          <ul className="mt-2 grid gap-2">
            {group.rows.map((row) => (
              <ForecastRowItem key={row.line.key} row={row} axis={axis} {...shared} />
            ))}
          </ul>
        </div>
      ))}
      {rows.length > most && (
        <button type="button" className="button mt-3" onClick={() => setMost(rows.length)}>
          Show {rows.length - most} more
        </button>
      )}
    </section>
  );
}
