import type { LineSummary } from '../../contract/lines';
import type { Comparison } from '../../contract/standing';
import { againstRows, causeRows, qualityWords } from '../../view/composition-rows';
import { comparisonSentence, comparisonTable, dayText, turnedTable } from '../../view/line-comparison';
import { tableCsv } from '../../view/line-table';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { Choice } from '../charts/Choice';
import { saveTextFile } from '../charts/save-file';
import { useAddressSwitch } from '../line/use-address';
import { AgainstTable } from './AgainstTable';
import { CauseTable } from './CauseTable';
import { PolygonPair } from './PolygonPair';

interface Props {
  readonly comparison: Comparison;
  readonly line: Pick<LineSummary, 'key' | 'name' | 'ratingAmps' | 'substations' | 'goesBy'>;
  readonly site: SiteCustom;
  /** the phase that the address names, or the one that moved most */
  readonly initialPhase: PhaseName;
}

const HEADS = ['before', 'after'] as const;
const phaseKept = (phase: PhaseName) => phase;

/** Both sides of a date: what moved, and by which cause. */
export function ComparisonPage({ comparison, line, site, initialPhase }: Props) {
  const [phase, setPhase] = useAddressSwitch<PhaseName>('phase', initialPhase, phaseKept);
  const { at: day, phases } = comparison;
  const letters = site.phaseLetters;
  return (
    <div className="grid gap-4">
      <div className="grid max-w-[90ch] gap-1.5">
        {phases.map((each) => (
          <p key={each.phase} className="text-pretty">
            {comparisonSentence(each, { day, letters })}
          </p>
        ))}
        <p className="text-caption text-pretty text-ink-2">
          Mann–Whitney test on daily standing levels, allowed for days that are like their neighbours; the
          shift is Hodges–Lehmann’s. Each side reaches to the next known change of the line, half a year at
          the most, {dayText(day)} itself on neither. Where a sentence names no load, a load that differs
          between the sides is in it.
        </p>
      </div>
      <CausesPanel {...{ comparison, line, site, phase }} onPhase={setPhase} />
      <FiguresPanel {...{ comparison, line, site }} initialPhase={initialPhase} />
    </div>
  );
}

type CausesProps = Omit<Props, 'initialPhase'> & {
  readonly phase: PhaseName;
  readonly onPhase: (phase: PhaseName) => void;
};

function CausesPanel({ comparison, line, site, phase, onPhase }: CausesProps) {
  const sides = comparison.phases.find((each) => each.phase === phase);
  const options = PHASES.map((each) => ({ value: each, label: site.phaseLetters[each] }));
  const context = { unit: 'amperes', ratingAmps: line.ratingAmps, substations: line.substations } as const;
  if (sides === undefined) return null;
  const [before, after] = [sides.before.composition, sides.after.composition];
  const told = before.kind === 'separated' || after.kind === 'separated';
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="sides-title">
      <div className="flex flex-wrap items-start justify-between gap-x-6">
        <div>
          <h2 id="sides-title" className="m-0 text-body font-semibold">
            What phase {site.phaseLetters[phase]} consisted of
          </h2>
          <p className="mt-0.5 text-caption text-ink-2">
            Each side at its own typical load, drawn at one scale; across: in line with the greatest current
          </p>
        </div>
        <Choice
          legend="Phase compared"
          name="compared-phase"
          value={phase}
          options={options}
          onChoose={onPhase}
        />
      </div>
      <PolygonPair before={before} after={after} phase={phase} context={context} />
      {told && (
        <div className="mt-4 grid items-start gap-x-8 gap-y-4 lg:grid-cols-[minmax(0,0.8fr)_minmax(0,1fr)]">
          <CauseTable
            rows={causeRows(before, after, context)}
            heads={HEADS}
            caption="The causes of the standing level, before and after"
            ink="text-ink"
            marked={undefined}
          />
          <div>
            <AgainstTable rows={againstRows(before, after, context)} heads={HEADS} past="first" />
            <p className="mt-2 text-caption text-ink-2">
              Before: {qualityWords(before, context)}. After: {qualityWords(after, context)}. In brackets and
              below figures: 95 % intervals.
            </p>
          </div>
        </div>
      )}
    </section>
  );
}

function FiguresPanel({ comparison, line, site }: Props) {
  const table = comparisonTable(comparison, { letters: site.phaseLetters, name: line.name });
  const turned = turnedTable(table);
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="figures-title">
      <h2 id="figures-title" className="m-0 mb-2 text-body font-semibold">
        All phases in figures
      </h2>
      <table className="figures">
        <caption className="sr-only">{table.caption}</caption>
        <thead>
          <tr>
            {turned.heads.map((head, index) => (
              <th key={head} scope="col" className={index === 0 ? '' : 'figure'}>
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {turned.rows.map(([name, ...figures]) => (
            <tr key={name}>
              <th scope="row">{name}</th>
              {figures.map((figure, index) => (
                <td key={index} className="figure">
                  {figure}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      <button
        type="button"
        className="button mt-3"
        onClick={() => saveTextFile(`${line.key}-before-after-${comparison.at}.csv`, tableCsv(table))}
      >
        Save as CSV
      </button>
    </section>
  );
}
