import type { LineSummary } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import type { NotComputable } from '../../protection/evaluation';
import { ampsText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { DASH } from '../../view/line-figures';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { ExpectedLevels } from '../../view/review-expected';
import { expectedTable } from '../../view/review-tables';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { PhaseSign } from '../marks/PhaseMarker';
import { Assumptions } from './Assumptions';
import { ExpectedStrip } from './ExpectedStrip';
import { PhaseFigures } from './PhaseFigures';

interface Props {
  readonly line: LineSummary;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly convention: string;
  readonly expected: ExpectedLevels | NotComputable;
}

/** What the standing level should be by the line's causes, beside what it is. */
export function ExpectedPanel({ line, site, nowMs, convention, expected }: Props) {
  const letters = site.phaseLetters;
  const told = isComputable(expected);
  return (
    <ChartPanel
      title="Expected against measured"
      caption="Standing differential current: what the causes account for, and the median of the last 24 hours"
      table={told ? expectedTable(expected, { letters, convention }) : undefined}
      fileName={csvName([line.key, 'expected'], nowMs)}
      timeZone={site.timeZone}
    >
      {told ? (
        <div className="min-w-0" title={convention}>
          <ExpectedStrip levels={expected} letters={letters} />
          <Causes levels={expected} letters={letters} convention={convention} />
          <Verdicts levels={expected} letters={letters} />
          <Assumptions sentences={expected.assumptions} />
        </div>
      ) : (
        <p className="py-2 text-ink-2">{expected.notComputable}</p>
      )}
    </ChartPanel>
  );
}

interface LevelsProps {
  readonly levels: ExpectedLevels;
  readonly letters: SiteCustom['phaseLetters'];
}

const CAUSES = [
  { cause: 'charging', head: 'charging' },
  { cause: 'transformers', head: 'transformers, class budget' },
  { cause: 'channel', head: 'channel asymmetry' },
] as const;

const figure = (amps: number | null | undefined) =>
  amps === null || amps === undefined ? DASH : ampsText(amps);

function Causes({ levels, letters, convention }: LevelsProps & { convention: string }) {
  const of = (phase: PhaseName) => levels.phases[phase].expected;
  const present = CAUSES.filter(
    ({ cause }) => of('a').missing.includes(cause) || of('a').terms.some((term) => term.cause === cause),
  );
  return (
    <PhaseFigures
      caption="Causes of the standing level, amperes primary"
      letters={letters}
      rows={[
        ...present.map(({ cause, head }) => ({
          head,
          title: convention,
          of: (phase: PhaseName) => figure(of(phase).terms.find((term) => term.cause === cause)?.amps),
        })),
        {
          head: 'together, as independent',
          title: `Root of the sum of squares. ${convention}`,
          of: (phase) => figure(of(phase).rootSumSquareAmps),
        },
        {
          head: 'together, at worst',
          title: `All causes in phase with each other. ${convention}`,
          of: (phase) => figure(of(phase).worstCaseAmps),
        },
        {
          head: 'measured, 24 h',
          title: `Median of the hourly standing levels of the last 24 hours. ${convention}`,
          of: (phase) => figure(levels.phases[phase].measuredAmps),
          strong: true,
        },
      ]}
    />
  );
}

/** The verdict of each phase; one sentence where all three are the same. */
function Verdicts({ levels, letters }: LevelsProps) {
  const verdicts = PHASES.map((phase) => ({ phase, ...levels.phases[phase] }));
  return (
    <ul className="m-0 mt-2 list-none p-0">
      {verdicts.map(({ phase, verdict, judgement }) => (
        <li key={phase} className="flex items-baseline gap-2 py-0.5">
          <span className="inline-flex items-center gap-1.5 whitespace-nowrap">
            <PhaseSign phase={phase} />
            {letters[phase]}
          </span>
          <span className={judgement === 'above' || judgement === 'far below' ? 'font-semibold' : ''}>
            {verdict}
          </span>
        </li>
      ))}
    </ul>
  );
}
