import type { LineSummary } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import { ampsText, percentOfMarkText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { DASH } from '../../view/line-figures';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { ReviewLoadability } from '../../view/review-margins';
import type { MismatchBasis } from '../../view/review-basis';
import { LAG_CHOICES } from '../../view/review-number';
import type { LagChoice } from '../../view/review-number';
import { phaseSentences } from '../../view/review-phase-words';
import { loadTable } from '../../view/review-tables';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { Choice } from '../charts/Choice';
import { Assumptions } from './Assumptions';
import { PhaseFigures } from './PhaseFigures';
import type { ReviewFigures } from './use-review';

interface Props {
  readonly line: LineSummary;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly convention: string;
  readonly load: ReviewFigures['load'];
  readonly basis: MismatchBasis;
  readonly onBasis: (basis: MismatchBasis) => void;
  readonly lag: LagChoice;
  readonly onLag: (lag: LagChoice) => void;
  readonly hasTransformer: boolean;
}

const BASES: readonly { value: MismatchBasis; label: string }[] = [
  { value: 'composition', label: 'Last 30 days' },
  { value: 'snapshot', label: 'Present snapshot' },
  { value: 'class limits', label: 'Class limits' },
];
const LAGS = LAG_CHOICES.map((value) => ({ value, label: `±${value}°` }));

/** How near load alone would bring the line to its threshold. */
export function LoadPanel(props: Props) {
  const { line, site, nowMs, convention, load, basis, onBasis, lag, onLag } = props;
  const letters = site.phaseLetters;
  const reasons = phaseSentences(
    (phase) => (isComputable(load[phase]) ? undefined : load[phase].notComputable),
    letters,
  );
  return (
    <ChartPanel
      title="Loadability"
      caption={`Worst utilisation by load alone, at power-factor angles within ±${lag}° and either direction of power`}
      controls={
        <>
          <Choice legend="Range of angles" name="lag" value={lag} options={LAGS} onChoose={onLag} />
          <Choice legend="Mismatches from" name="basis" value={basis} options={BASES} onChoose={onBasis} />
        </>
      }
      table={loadTable(load, { letters, convention })}
      fileName={csvName([line.key, 'loadability'], nowMs)}
      timeZone={site.timeZone}
    >
      <div className="min-w-0">
        {reasons.map((reason) => (
          <p key={reason} className="py-2 text-ink-2">
            {reason}
          </p>
        ))}
        {PHASES.some((phase) => isComputable(load[phase])) && (
          <>
            <LoadFigures {...props} />
            {insteadOfChosen(props).map((sentences) => (
              <p key={sentences} className="mt-2 text-pretty">
                {sentences}
              </p>
            ))}
            <Assumptions sentences={assumptions(props)} />
          </>
        )}
      </div>
    </ChartPanel>
  );
}

function LoadFigures({ line, site, load, convention }: Props) {
  const of = (figure: (load: ReviewLoadability) => string) => (phase: PhaseName) => {
    const own = load[phase];
    return isComputable(own) ? figure(own) : DASH;
  };
  return (
    <PhaseFigures
      caption="Loadability by phase"
      letters={site.phaseLetters}
      rows={[
        {
          head: `at rating, ${ampsText(line.ratingAmps)}`,
          title: convention,
          of: of((each) => percentOfMarkText(each.atRating.utilisation)),
        },
        {
          head: `at emergency rating, ${ampsText(line.emergencyRatingAmps)}`,
          title: convention,
          of: of((each) => percentOfMarkText(each.atEmergency.utilisation)),
          strong: true,
        },
        {
          head: 'reaches 100 % at',
          title: `Smallest through current at which the scheme would operate. ${convention}`,
          of: of(({ limitAmps }) =>
            limitAmps === undefined ? `> ${ampsText(2 * line.emergencyRatingAmps)}` : ampsText(limitAmps),
          ),
        },
      ]}
    />
  );
}

/** What stands in for the basis that was chosen, and why, where it could not be had. */
function insteadOfChosen({ load, basis, site }: Props): string[] {
  return phaseSentences((phase) => {
    const own = load[phase];
    if (!isComputable(own) || own.from === basis) return undefined;
    return [own.words, ...own.obstacles].join(' ');
  }, site.phaseLetters);
}

function assumptions({ line, site, load, basis, hasTransformer }: Props): string[] {
  return [
    ...phaseSentences((phase) => {
      const own = load[phase];
      return isComputable(own) && own.from === basis ? own.words : undefined;
    }, site.phaseLetters),
    `Looked for up to twice the emergency rating, ${ampsText(2 * line.emergencyRatingAmps)}. Voltage is nominal; the through current enters at the first terminal and leaves by the others in equal shares.`,
    ...(hasTransformer ? ['Magnetising and tap changing of the transformer in the zone are left out.'] : []),
  ];
}
