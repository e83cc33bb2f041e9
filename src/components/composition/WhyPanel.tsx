import { useMemo } from 'react';
import type { LineSummary } from '../../contract/lines';
import type { Cause, StandingVerdict } from '../../contract/standing';
import { CONDITION_INK } from '../../view/condition-words';
import { polygonFit, polygonPicture } from '../../view/composition-polygon';
import type { PolygonCause } from '../../view/composition-polygon';
import { againstRows, causeRows, qualityWords } from '../../view/composition-rows';
import {
  loadDependenceWords,
  polygonWords,
  polygonSentence,
  stepInWindowWords,
  weakWords,
  whyCaption,
  whyTitle,
} from '../../view/composition-why';
import type { SeparatedOnWire } from '../../view/composition-words';
import type { CurrentUnit } from '../../view/line-unit';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import { phaseCondition } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import { Choice } from '../charts/Choice';
import { AgainstTable } from './AgainstTable';
import { CauseTable } from './CauseTable';
import { PolygonDrawing } from './PolygonDrawing';

interface Props {
  readonly line: LineSummary;
  readonly standing: readonly StandingVerdict[];
  readonly site: SiteCustom;
  readonly unit: CurrentUnit;
  readonly phase: PhaseName;
  readonly onPhase: (phase: PhaseName) => void;
}

const BOX = { width: 320, height: 218 } as const;
const HEADS = ['now', '90 days ago'] as const;
const SIDES: Readonly<Record<Cause, PolygonCause | undefined>> = {
  charging: 'charging',
  'ratio mismatch': 'ratio',
  'angle mismatch': 'angle',
  rest: 'rest',
  'not told': undefined,
};

/** What one phase's standing level consists of: drawn, in figures, and against the register. */
export function WhyPanel(props: Props) {
  const { line, standing, site, unit, phase, onPhase } = props;
  const verdict = standing.find((each) => each.phase === phase);
  const options = PHASES.map((each) => ({ value: each, label: site.phaseLetters[each] }));
  const words = { unit, ratingAmps: line.ratingAmps, letter: site.phaseLetters[phase] };
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="why-title">
      <div className="flex flex-wrap items-start justify-between gap-x-6">
        <div className="min-w-0 flex-1 basis-64">
          <h2 id="why-title" className="m-0 text-body font-semibold">
            {whyTitle(verdict, words)}
          </h2>
          <p className="mt-0.5 text-caption text-ink-2">
            {verdict !== undefined &&
              line.goesBy === 'phasors' &&
              whyCaption(verdict.composition, site.timeZone)}
          </p>
        </div>
        <Choice
          legend="Phase explained"
          name="why-phase"
          value={phase}
          options={options}
          onChoose={onPhase}
        />
      </div>
      <Why {...props} verdict={verdict} />
    </section>
  );
}

function Why({ verdict, ...props }: Props & { verdict: StandingVerdict | undefined }) {
  if (props.line.goesBy === 'reported') return <Magnitudes />;
  if (verdict === undefined)
    return (
      <p className="mt-3 max-w-[60ch] text-ink-2">
        This phase’s standing level has not been looked at yet. Tareline does so once an hour.
      </p>
    );
  const { composition } = verdict;
  if (composition.kind === 'not separable')
    return (
      <p className="mt-3 max-w-[60ch]">
        <strong className="font-semibold">Not separable in this window.</strong> {composition.reason}
      </p>
    );
  return <Told {...props} verdict={verdict} composition={composition} />;
}

function Magnitudes() {
  return (
    <p className="mt-3 max-w-[60ch] text-ink-2">
      This line goes by reported magnitudes: its feed holds only what one terminal computed for itself. What a
      standing level consists of can’t be told from this feed; the currents of every terminal, as phasors,
      would tell.
    </p>
  );
}

type ToldProps = Props & { readonly verdict: StandingVerdict; readonly composition: SeparatedOnWire };

function Told({ line, site, unit, phase, verdict, composition }: ToldProps) {
  const context = { unit, ratingAmps: line.ratingAmps, substations: line.substations };
  const before = verdict.compositionBefore;
  const condition = phaseCondition(line, phase, site.nearRatio);
  const coloured = condition === 'over' || condition === 'near' || condition === 'rising';
  const ink = coloured ? CONDITION_INK[condition] : 'text-ink';
  const marked = SIDES[verdict.likelyCause];
  const caution = stepInWindowWords(composition, verdict.step, site.timeZone) ?? weakWords(composition);
  const dependence = loadDependenceWords(verdict.loadDependence, context);
  const heads = before === null ? HEADS.slice(0, 1) : HEADS;
  return (
    <>
      {caution !== undefined && <p className="mt-2 max-w-[80ch] text-pretty">{caution}</p>}
      {dependence !== undefined && <p className="mt-2 max-w-[80ch] text-pretty">{dependence}</p>}
      <div className="mt-2 grid items-center gap-x-6 gap-y-3 sm:grid-cols-[minmax(0,0.85fr)_minmax(0,1fr)]">
        <Polygon {...{ composition, phase, ink, marked }} context={context} />
        <CauseTable
          rows={causeRows(composition, before, context)}
          heads={heads}
          caption="The causes of the standing level, now and 90 days ago"
          ink={ink}
          marked={marked}
        />
      </div>
      <div className="mt-3">
        <AgainstTable rows={againstRows(composition, before, context)} heads={heads} past="second" />
      </div>
      <p className="mt-2 text-caption text-ink-2">
        {`Now: ${qualityWords(composition, context)}.`}
        {before === null
          ? ' Of 90 days ago there is no history yet.'
          : ` 90 days ago: ${beforeWords(before, context)}`}
        {' In brackets and below figures: 95 % intervals.'}
      </p>
    </>
  );
}

function beforeWords(
  before: NonNullable<StandingVerdict['compositionBefore']>,
  context: Parameters<typeof qualityWords>[1],
): string {
  if (before.kind === 'separated') return `${qualityWords(before, context)}.`;
  return `not separable. ${before.reason}`;
}

interface PolygonProps {
  readonly composition: SeparatedOnWire;
  readonly phase: PhaseName;
  readonly ink: string;
  readonly marked: PolygonCause | undefined;
  readonly context: Parameters<typeof polygonWords>[1];
}

function Polygon({ composition, phase, ink, marked, context }: PolygonProps) {
  const { unit, ratingAmps } = context;
  const picture = useMemo(() => {
    const { polygon } = composition;
    if (polygon === null) return undefined;
    const fit = polygonFit([polygon], BOX);
    return polygonPicture(polygon, { fit, box: BOX, words: polygonWords(composition, { unit, ratingAmps }) });
  }, [composition, unit, ratingAmps]);
  if (picture === undefined)
    return <p className="text-ink-2">There was no current to draw the causes against.</p>;
  return (
    <figure className="m-0 mx-auto w-full max-w-[22rem] min-w-0">
      <PolygonDrawing
        {...{ picture, phase, ink, marked }}
        box={BOX}
        label={polygonSentence(composition, context)}
      />
      <figcaption className="text-caption text-ink-2">
        Head to tail; across: in line with the greatest current
      </figcaption>
    </figure>
  );
}
