import type { ReplaySummary } from '../../contract/replay';
import { percentText } from '../../view/figures';
import type { PhaseLetters } from '../../view/site-custom';
import { phaseRows, type PhaseRow, type SideFigures } from '../../view/replay-rows';
import { PhaseSign } from '../marks/PhaseMarker';

interface Props {
  readonly summary: ReplaySummary;
  readonly letters: PhaseLetters;
  readonly timeZone: string;
}

const SIDES = [
  { side: 'replayed', words: 'these settings' },
  { side: 'recorded', words: 'recorded' },
] as const;
const INK = { settled: '', near: 'text-near font-semibold', over: 'text-over font-semibold' } as const;

/** The figures of both sides, one under the other for each phase. */
export function SidesTable({ summary, letters, timeZone }: Props) {
  const rows = phaseRows(summary, timeZone);
  const near = percentText(summary.nearRatio);
  return (
    <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Figures of both sides">
      <table className="figures">
        <thead>
          <tr>
            <th scope="col">phase</th>
            <th scope="col">settings</th>
            <th scope="col" className="figure">
              greatest
            </th>
            <th scope="col" className="figure">
              at or above {near}
            </th>
            <th scope="col" className="figure">
              at or above 100 %
            </th>
            <th scope="col" className="figure max-sm:hidden print:table-cell">
              when, and operating point
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) =>
            SIDES.map(({ side, words }) => <Row key={side + row.phase} {...{ row, side, words, letters }} />),
          )}
        </tbody>
      </table>
    </div>
  );
}

function Row({
  row,
  side,
  words,
  letters,
}: {
  row: PhaseRow;
  side: 'replayed' | 'recorded';
  words: string;
  letters: PhaseLetters;
}) {
  const figures: SideFigures = row[side];
  const first = side === 'replayed';
  return (
    <tr className={first ? '[&>td]:border-b-0' : 'text-ink-2'}>
      {first && (
        <th scope="rowgroup" rowSpan={2} className="text-ink!">
          <span className="inline-flex items-center gap-1.5 font-medium">
            <PhaseSign phase={row.phase} />
            {letters[row.phase]}
          </span>
        </th>
      )}
      <td>{words}</td>
      <td className={`figure ${INK[figures.state]}`}>{figures.greatest}</td>
      <td className="figure">{figures.near}</td>
      <td className={`figure ${figures.isOver ? INK.over : ''}`}>{figures.over}</td>
      <td className="figure max-sm:hidden print:table-cell">
        {figures.instant}
        <span className="block text-caption text-ink-2">{figures.point}</span>
      </td>
    </tr>
  );
}
