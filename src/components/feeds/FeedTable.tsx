import type { FeedRow } from '../../view/feed-rows';
import { gapsText, standingText, STANDING_SHAPES } from '../../view/feed-words';
import { durationText, instantText } from '../../view/figures';

interface FeedTableProps {
  rows: readonly FeedRow[];
  nowMs: number;
  timeZone: string;
}

export function FeedTable({ rows, nowMs, timeZone }: FeedTableProps) {
  if (rows.length === 0)
    return (
      <p className="panel mt-3 p-5">No terminal matches. The register says which terminals there are.</p>
    );
  return (
    <table className="figures max-md:block">
      <thead className="max-md:hidden">
        <tr>
          <th scope="col">line</th>
          <th scope="col">terminal</th>
          <th scope="col">state</th>
          <th scope="col" className="figure">
            last heard
          </th>
          <th scope="col" className="figure">
            newest instant
          </th>
          <th scope="col" className="figure">
            number
          </th>
          <th scope="col" className="figure">
            gaps
          </th>
        </tr>
      </thead>
      <tbody className="max-md:block">
        {rows.map((row) => (
          <TerminalRow key={`${row.line}/${row.terminal}`} row={row} nowMs={nowMs} timeZone={timeZone} />
        ))}
      </tbody>
    </table>
  );
}

/** What was read too long ago loses its ink. */
const OLD = 'group-data-[old=true]:font-normal group-data-[old=true]:text-ink-2';

const STACKED =
  'max-md:grid max-md:grid-cols-2 max-md:gap-x-3 max-md:border-b max-md:border-hairline max-md:py-2.5 max-md:[&>*]:border-0! max-md:[&>*]:p-0!';

function TerminalRow({ row, nowMs, timeZone }: { row: FeedRow; nowMs: number; timeZone: string }) {
  const isIll = row.standing !== 'heard' && row.standing !== 'resting';
  return (
    <tr className={STACKED}>
      <th scope="row" className="max-md:col-span-2">
        <a
          href={`/register/${row.line}`}
          className="font-medium text-ink group-data-[old=true]:text-ink-2 hover:underline"
        >
          {row.lineName}
        </a>
      </th>
      <td>
        {row.substationName} <span className="text-caption text-ink-2">{row.terminal}</span>
      </td>
      <td className={isIll ? `font-semibold text-ink ${OLD}` : 'text-ink-2'}>
        <span aria-hidden="true" className="mr-1.5 inline-block w-3 text-center">
          {STANDING_SHAPES[row.standing]}
        </span>
        {standingText(row)}
      </td>
      <td className={`figure max-md:text-left! ${isIll ? `font-semibold ${OLD}` : ''}`}>
        {row.silentMs !== undefined && <span className="font-normal text-ink-2 md:hidden">last heard </span>}
        {row.silentMs === undefined ? '—' : `${durationText(row.silentMs)} ago`}
      </td>
      <td className="figure text-ink-2 max-md:text-left!">
        {row.lastAt !== null && <span className="md:hidden">newest </span>}
        {row.lastAt === null ? 'no measurement' : instantText(row.lastAt, nowMs, timeZone)}
      </td>
      <td className="figure text-ink-2 max-md:hidden">{row.lastSeq ?? '—'}</td>
      <td className="figure max-md:col-span-2 max-md:text-left!">
        <span className="md:hidden">gaps: </span>
        {gapsText(row)}
      </td>
    </tr>
  );
}
