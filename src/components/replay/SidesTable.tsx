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
    <>
      <SidesList {...{ rows, letters, near }} />
      <div
        className="overflow-x-auto max-sm:hidden print:block"
        tabIndex={0}
        role="region"
        aria-label="Figures of both sides"
      >
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
              <th scope="col" className="figure">
                when, and operating point
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) =>
              SIDES.map(({ side, words }) => (
                <Row key={side + row.phase} {...{ row, side, words, letters }} />
              )),
            )}
          </tbody>
        </table>
      </div>
    </>
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
      <td className="figure">
        {figures.instant}
        <span className="block text-caption text-ink-2">{figures.point}</span>
      </td>
    </tr>
  );
}

/** The same figures on a phone: each phase with its two sides one below the other. */
function SidesList({
  rows,
  letters,
  near,
}: {
  rows: readonly PhaseRow[];
  letters: PhaseLetters;
  near: string;
}) {
  return (
    <div className="sm:hidden print:hidden">
      {rows.map((row) => (
        <section key={row.phase} className="border-b border-hairline py-2 last:border-b-0">
          <h3 className="m-0 flex items-center gap-1.5 text-body font-semibold">
            <PhaseSign phase={row.phase} />
            Phase {letters[row.phase]}
          </h3>
          {SIDES.map(({ side, words }) => (
            <dl
              key={side}
              className={`m-0 mt-1.5 grid grid-cols-[1fr_auto] gap-x-4 ${side === 'recorded' ? 'text-ink-2' : ''}`}
            >
              <dt>{words}, greatest</dt>
              <dd className={`m-0 text-right ${INK[row[side].state]}`}>{row[side].greatest}</dd>
              <dt className="col-span-2 text-caption text-ink-2">
                {row[side].instant}; {row[side].point}
              </dt>
              <dt>at or above {near}</dt>
              <dd className="m-0 text-right">{row[side].near}</dd>
              <dt>at or above 100 %</dt>
              <dd className={`m-0 text-right ${row[side].isOver ? INK.over : ''}`}>{row[side].over}</dd>
            </dl>
          ))}
        </section>
      ))}
    </div>
  );
}
