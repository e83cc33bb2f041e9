import type { LineSummary } from '../../contract/lines';
import type { RestraintOnWire } from '../../contract/settings-version';
import { restraintConvention } from '../../protection/restraint';
import { CONDITION_INK } from '../../view/condition-words';
import { missingFiguresReason, phaseRows } from '../../view/line-phase-rows';
import type { PhaseRow } from '../../view/line-phase-rows';
import type { CurrentUnit } from '../../view/line-unit';
import type { SiteCustom } from '../../view/site-custom';
import { PhaseSign } from '../marks/PhaseMarker';

interface Props {
  readonly line: LineSummary;
  readonly unit: CurrentUnit;
  readonly site: SiteCustom;
  readonly faded: boolean;
  /** undefined without settings */
  readonly restraint: RestraintOnWire | undefined;
}

interface Figure {
  readonly head: string;
  readonly of: (row: PhaseRow) => string;
  readonly live: boolean;
  /** only schemes that form a restraint current have it */
  readonly ofRestraint?: true;
}

const FIGURES: readonly Figure[] = [
  { head: 'differential', of: (row: PhaseRow) => row.differential, live: true },
  { head: 'restraint', of: (row: PhaseRow) => row.restraint, live: true, ofRestraint: true },
  { head: 'threshold', of: (row: PhaseRow) => row.threshold, live: true, ofRestraint: true },
  { head: 'utilisation', of: (row: PhaseRow) => row.utilisation, live: true },
  { head: 'standing, 24 h', of: (row: PhaseRow) => row.standing, live: false },
  { head: 'of pickup', of: (row: PhaseRow) => row.shareOfPickup, live: false },
];

/** The three phases in figures. On a narrow page the phases are the columns. */
export function PhasesPanel({ line, unit, site, faded, restraint }: Props) {
  const figures = FIGURES.filter(
    ({ ofRestraint }) => restraint?.kind !== 'none' || ofRestraint === undefined,
  );
  const rows = phaseRows(line, unit, site);
  const missing = missingFiguresReason(line);
  return (
    <section className="panel @container min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="phases-title">
      <h2 id="phases-title" className="m-0 text-body font-semibold">
        Phases
      </h2>
      <p className="mt-0.5 mb-2 text-caption text-ink-2">
        {unit === 'amperes' ? 'Amperes primary' : `Per unit of ${Math.round(line.ratingAmps)} A`}
        {restraintWords(restraint)}
      </p>
      <div className="hidden @min-[34rem]:block">
        <WideTable figures={figures} rows={rows} faded={faded} />
      </div>
      <div className="@min-[34rem]:hidden">
        <NarrowTable figures={figures} rows={rows} faded={faded} />
      </div>
      {missing !== undefined && <p className="mt-2 text-ink-2">– {missing}</p>}
    </section>
  );
}

function restraintWords(restraint: RestraintOnWire | undefined): string {
  if (restraint === undefined) return '';
  if (restraint.kind === 'none') return '; this scheme forms no restraint current';
  return `; restraint is ${restraintConvention(restraint)}`;
}

interface TableProps {
  readonly figures: readonly Figure[];
  readonly rows: readonly PhaseRow[];
  readonly faded: boolean;
}

function WideTable({ figures, rows, faded }: TableProps) {
  return (
    <table className="figures">
      <thead>
        <tr>
          <th scope="col">phase</th>
          {figures.map(({ head }) => (
            <th key={head} scope="col" className="figure">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.phase}>
            <th scope="row">
              <PhaseName row={row} faded={faded} />
            </th>
            {figures.map(({ head, of, live }) => (
              <td key={head} className={`figure ${inkOf(row, live && faded)} ${live ? 'live-value' : ''}`}>
                {of(row)}
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function NarrowTable({ figures, rows, faded }: TableProps) {
  return (
    <table className="figures">
      <thead>
        <tr>
          <th scope="col">phase</th>
          {rows.map((row) => (
            <th key={row.phase} scope="col" className="figure">
              <PhaseName row={row} faded={faded} />
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {figures.map(({ head, of, live }) => (
          <tr key={head}>
            <th scope="row">{head}</th>
            {rows.map((row) => (
              <td
                key={row.phase}
                className={`figure ${inkOf(row, live && faded)} ${live ? 'live-value' : ''}`}
              >
                {of(row)}
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function PhaseName({ row, faded }: { row: PhaseRow; faded: boolean }) {
  return (
    <span className={`inline-flex items-center gap-1.5 ${inkOf(row, faded)}`}>
      <PhaseSign phase={row.phase} />
      {row.letter}
    </span>
  );
}

/** The state's colour only for the phase that has earned it; second ink for what is not live. */
function inkOf({ condition }: PhaseRow, faded: boolean): string {
  if (faded) return 'text-ink-2';
  return condition === 'over' || condition === 'near' || condition === 'rising'
    ? CONDITION_INK[condition]
    : 'text-ink';
}
