import { memo } from 'react';
import type { Condition } from '../../contract/condition';
import type { Result } from '../../contract/result';
import type { MarginRow } from '../../contract/standing';
import { kilovoltsText } from '../../view/figures';
import { MARGIN_COLUMN, marginText, type MarginColumn, type MarginFigure } from '../../view/margin-columns';
import { liveUtilisation } from '../../view/margin-utilisation';
import type { SiteCustom } from '../../view/site-custom';
import { ConditionShape } from '../marks/ConditionMark';
import { PhaseSign } from '../marks/PhaseMarker';
import { MarginHead } from './MarginHead';
import { MarginStrip } from './MarginStrip';
import type { MarginAddressState } from './use-margin-address';

interface MarginTableProps {
  rows: readonly MarginRow[];
  address: MarginAddressState;
  site: SiteCustom;
  results: ReadonlyMap<string, Result>;
  nowMs: number;
  lost: boolean;
}

/** The fleet: a row a phase of a line. On a narrow screen each row becomes a block with its figures named. */
export function MarginTable({ rows, address, site, results, nowMs, lost }: MarginTableProps) {
  const { columns } = address.address;
  return (
    <table className="figures max-lg:block" aria-label="Standing levels">
      <MarginHead address={address} />
      <tbody className="max-lg:block">
        {rows.map((row) => {
          const result = results.get(row.line);
          return (
            <Row
              key={`${row.line} ${row.phase}`}
              row={row}
              columns={columns}
              utilisation={
                result === undefined ? row.utilisation : liveUtilisation(result, row.phase, lost ? 0 : nowMs)
              }
              site={site}
            />
          );
        })}
      </tbody>
    </table>
  );
}

interface RowProps {
  row: MarginRow;
  columns: readonly MarginColumn[];
  utilisation: number | null;
  site: SiteCustom;
}

const STACKED =
  'max-lg:grid max-lg:grid-cols-3 max-lg:gap-x-3 max-lg:gap-y-1.5 max-lg:border-b max-lg:border-hairline max-lg:py-3 max-lg:[&>*]:border-0! max-lg:[&>*]:p-0!';

const Row = memo(function Row({ row, columns, utilisation, site }: RowProps) {
  const letter = site.phaseLetters[row.phase];
  return (
    <tr className={STACKED} data-line={row.line} data-phase={row.phase}>
      <th scope="row" className="whitespace-nowrap max-lg:col-span-3">
        <a href={`/lines/${row.line}`} className="font-medium text-ink no-underline hover:underline">
          {row.lineName}
        </a>
        <span className="ml-2 inline-flex items-center gap-1 text-ink">
          <PhaseSign phase={row.phase} size={3.2} />
          <span>
            <span className="sr-only">phase </span>
            {letter}
          </span>
        </span>
        <span className="block text-caption">
          {[kilovoltsText(row.voltageKv), row.likelyCause === 'not told' ? undefined : row.likelyCause]
            .filter(Boolean)
            .join(' · ')}
        </span>
      </th>
      {columns.map((column) =>
        column === 'owner' ? (
          <OwnerCell key={column} owner={row.owner} />
        ) : column === 'share' ? (
          <ShareCell key={column} row={row} nearRatio={site.nearRatio} />
        ) : (
          <FigureCell key={column} column={column} row={{ ...row, utilisation }} nearRatio={site.nearRatio} />
        ),
      )}
    </tr>
  );
});

function OwnerCell({ owner }: { owner: string | null }) {
  return (
    <td className="wrap-anywhere max-lg:col-span-3 lg:min-w-32">
      <span className="block text-caption text-ink-2 lg:hidden">{MARGIN_COLUMN.owner.name}</span>
      {owner ?? <span className="text-ink-2">not recorded</span>}
    </td>
  );
}

function ShareCell({ row, nearRatio }: { row: MarginRow; nearRatio: number }) {
  const near = (row.shareOfPickup ?? 0) >= nearRatio;
  return (
    <td className="lg:w-56 lg:min-w-40 max-lg:col-span-3">
      <div className="flex items-center gap-3">
        <div className="min-w-0 flex-1">
          <MarginStrip row={row} nearRatio={nearRatio} />
        </div>
        <span
          className={`inline-flex w-16 items-center justify-end gap-1 ${near ? 'font-semibold text-near' : ''}`}
        >
          {near && <ConditionShape condition="near" />}
          {near && <span className="sr-only">beyond the near mark, </span>}
          {marginText(row, 'share', nearRatio)}
        </span>
      </div>
    </td>
  );
}

interface FigureCellProps {
  column: MarginFigure;
  row: MarginRow;
  nearRatio: number;
}

/** What a figure says beside itself: with a shape and a word, never by colour alone. */
interface Remark {
  readonly condition: Condition;
  readonly words: string;
  readonly ink: string;
}

function FigureCell({ column, row, nearRatio }: FigureCellProps) {
  const remark = remarkOn(column, row, nearRatio);
  const quiet = column === 'creep' && row.creepVerdict === null ? 'text-ink-2' : '';
  return (
    <td
      className={`figure max-lg:text-left! ${quiet} ${remark === undefined ? '' : `font-semibold ${remark.ink}`} ${column === 'now' ? 'live-value' : ''}`}
    >
      <span className="block text-caption font-normal whitespace-normal text-ink-2 lg:hidden">
        {MARGIN_COLUMN[column].name}
      </span>
      <span className="inline-flex items-center gap-1">
        {remark !== undefined && (
          <>
            <ConditionShape condition={remark.condition} />
            <span className="sr-only">{remark.words}, </span>
          </>
        )}
        {marginText(row, column, nearRatio)}
      </span>
    </td>
  );
}

function remarkOn(column: MarginFigure, row: MarginRow, nearRatio: number): Remark | undefined {
  const near = { condition: 'near', words: 'beyond the near mark', ink: 'text-near' } as const;
  switch (column) {
    case 'creep':
      return row.creepVerdict === 'creep'
        ? { condition: 'rising', words: 'creeping', ink: 'text-rising' }
        : undefined;
    case 'now':
      return (row.utilisation ?? 0) >= nearRatio ? near : undefined;
    case 'p95':
      return (row.utilisationP95 ?? 0) >= nearRatio ? near : undefined;
    case 'emergency':
      // a prediction is no condition, so it has no condition's colour
      return (row.emergencyUtilisation ?? 0) >= 1
        ? { condition: 'over', words: 'would be over', ink: 'text-ink' }
        : undefined;
    default:
      return undefined;
  }
}
