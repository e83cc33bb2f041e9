import { useId, useState } from 'react';
import type { ReactNode } from 'react';
import { tableCsv } from '../../view/line-table';
import type { LineTable } from '../../view/line-table';
import { FiguresTable } from './FiguresTable';
import { saveTextFile } from './save-file';

interface Props {
  readonly title: string;
  readonly caption: ReactNode;
  readonly controls?: ReactNode;
  /** the figures behind the chart; undefined while there are none */
  readonly table: LineTable | undefined;
  /** what else the drawing says, above the figures */
  readonly overTable?: ReactNode;
  readonly fileName: string;
  readonly timeZone: string;
  readonly children: ReactNode;
}

/** A chart with its title, its switches, the table behind it and the way to save it. */
export function ChartPanel(props: Props) {
  const { title, caption, controls, table, overTable, fileName, timeZone, children } = props;
  const [tableOpen, setTableOpen] = useState(false);
  const id = useId();
  return (
    <section className="panel flex min-w-0 flex-col p-4 sm:p-[1.125rem]" aria-labelledby={`${id}-title`}>
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
        <div className="min-w-0 flex-1 basis-72">
          <h2 id={`${id}-title`} className="m-0 text-body font-semibold">
            {title}
          </h2>
          <p className="mt-0.5 text-caption text-ink-2">{caption}</p>
        </div>
        <div className="flex flex-wrap items-center gap-x-5 gap-y-2">{controls}</div>
      </div>
      <div className="mt-2 grid min-w-0 flex-1">{children}</div>
      <div className="mt-2 flex gap-2">
        <button
          type="button"
          className="button"
          aria-expanded={tableOpen}
          aria-controls={`${id}-table`}
          onClick={() => setTableOpen(!tableOpen)}
        >
          Table
        </button>
        <button
          type="button"
          className="button"
          disabled={table === undefined}
          onClick={() => table !== undefined && saveTextFile(fileName, tableCsv(table))}
        >
          Save as CSV
        </button>
      </div>
      <div id={`${id}-table`} className={tableOpen ? 'mt-3' : 'hidden'}>
        {tableOpen && overTable}
        {tableOpen &&
          (table === undefined ? (
            <p className="text-ink-2">There are no figures yet.</p>
          ) : (
            <FiguresTable table={table} timeZone={timeZone} />
          ))}
      </div>
    </section>
  );
}
