import type { LineSummary } from '../../contract/lines';
import type { Warning } from '../../contract/warning';
import { warningRows } from '../../view/line-warning-rows';
import type { WarningRow } from '../../view/line-warning-rows';
import type { SiteCustom } from '../../view/site-custom';
import { ConditionMark } from '../marks/ConditionMark';

interface Props {
  readonly line: LineSummary;
  readonly warnings: readonly Warning[];
  readonly site: SiteCustom;
  readonly nowMs: number;
}

/** The line's warnings, open ones first, each with what raised it and how it ended. */
export function WarningsPanel({ line, warnings, site, nowMs }: Props) {
  const rows = warningRows(warnings, { site, nowMs, substations: line.substations });
  const open = rows.filter((row) => row.open).length;
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="warnings-title">
      <h2 id="warnings-title" className="m-0 text-body font-semibold">
        Warnings
      </h2>
      <p className="mt-0.5 text-caption text-ink-2">{countWords(open, rows.length - open)}</p>
      {rows.length > 0 && (
        <ol
          className="m-0 mt-2 max-h-96 list-none overflow-auto p-0"
          tabIndex={0}
          aria-label="Open and past warnings"
        >
          {rows.map((row) => (
            <OneWarning key={row.id} row={row} />
          ))}
        </ol>
      )}
    </section>
  );
}

function countWords(open: number, past: number): string {
  if (open + past === 0) return 'None so far';
  return `${open === 0 ? 'None' : open} open, ${past === 0 ? 'none' : past} past`;
}

function OneWarning({ row }: { row: WarningRow }) {
  return (
    <li className="border-b border-hairline py-2.5 last:border-b-0">
      <p className="flex flex-wrap items-baseline gap-x-3">
        {row.open ? (
          <ConditionMark condition={row.kind} />
        ) : (
          <span className="font-medium text-ink-2">{row.kind}</span>
        )}
        <span className={row.open ? '' : 'text-ink-2'}>{row.state}</span>
      </p>
      <p className={`mt-0.5 text-pretty ${row.open ? '' : 'text-ink-2'}`}>{row.cause}</p>
      <dl className="m-0 mt-1 grid grid-cols-[6.5rem_1fr] gap-x-3 gap-y-0.5">
        <dt className="text-ink-2">opened</dt>
        <dd className="m-0">{row.opened}</dd>
        <dt className="text-ink-2">returned</dt>
        <dd className="m-0">{row.returned}</dd>
        <dt className="text-ink-2">acknowledged</dt>
        <dd className="m-0">{row.acknowledged}</dd>
        <dt className="text-ink-2">note</dt>
        <dd className="m-0 text-pretty">{row.note}</dd>
      </dl>
    </li>
  );
}
