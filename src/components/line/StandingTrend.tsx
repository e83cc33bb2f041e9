import { useMemo } from 'react';
import type { LineSummary } from '../../contract/lines';
import type { Terminal } from '../../contract/register';
import type { SettingsVersion } from '../../contract/settings-version';
import type { StandingVerdict } from '../../contract/standing';
import type { Creep } from '../../contract/warning';
import type { Work } from '../../contract/works';
import { stepSizeWords } from '../../view/composition-words';
import { csvName } from '../../view/line-csv';
import type { Reading } from '../../view/line-readings';
import { uncounted, uncountedWords } from '../../view/line-disqualified';
import type { CurrentUnit } from '../../view/line-unit';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import { phaseCondition } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import { trendMarks, type TrendMark } from '../../view/trend-marks';
import type { TrendPhase } from '../../view/trend-phase';
import { TREND_SPANS } from '../../view/trend-span';
import type { TrendSpan, TrendWindow } from '../../view/trend-span';
import { trendTable } from '../../view/trend-table';
import { creepWords, spanWords } from '../../view/trend-words';
import { namedTerminals } from '../../view/work-words';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { FetchState } from '../charts/FetchState';
import { useChartInk } from '../charts/use-chart-ink';
import { MarkTable } from './MarkTable';
import { TrendFindings } from './TrendFindings';
import { useNarrow } from './use-narrow';
import { useTrend } from './use-trend';
import type { Trend } from './use-trend';
import { useTrendOption } from './use-trend-option';
import type { DrawnPhase } from './use-trend-option';

interface Props {
  readonly line: LineSummary;
  readonly settings: readonly SettingsVersion[];
  readonly standing: readonly StandingVerdict[];
  readonly works: readonly Work[];
  readonly terminals: readonly Terminal[];
  readonly live: readonly Reading[];
  readonly unit: CurrentUnit;
  readonly site: SiteCustom;
  readonly faded: boolean;
  readonly nowMs: number;
  readonly span: TrendSpan;
  readonly onSpan: (span: TrendSpan) => void;
  readonly phase: TrendPhase;
  readonly onPhase: (phase: TrendPhase) => void;
}

const SPANS = TREND_SPANS.map((span) => ({
  value: span,
  label: `${span[0]!.toUpperCase()}${span.slice(1)}`,
}));

/** The standing differential over time, against the recorded pickup. */
export function StandingTrend(props: Props) {
  const { line, settings, standing, live, unit, site, faded, nowMs, span, phase } = props;
  const trend = useTrend(line.key, span, { live, nowMs });
  const ink = useChartInk();
  const narrow = useNarrow();
  const drawn = useDrawnPhases(line, phase, site.nearRatio);
  const phases = drawn.map((each) => each.phase);
  const daysShown = span !== 'hour' && span !== 'day';
  const found = [...trend.creep, ...line.creep].find((each) => each.phase === phase);
  const creep = daysShown ? found : undefined;
  const verdicts = standing.filter((each) => phases.includes(each.phase));
  const marks = useMarks(props, trend.window, phase);
  const option = useTrendOption({
    settings,
    trend,
    drawn,
    creep,
    marks,
    unit,
    ratingAmps: line.ratingAmps,
    site,
    ink,
    faded,
    narrow,
  });
  const { caption, title, table } = toldTrend(props, { trend, phases, creep, marks });
  const empty = phases.every((each) => trend.series[each].every((point) => point.medianAmps === null));
  const rung = trend.source === 'day' ? 'day' : 'hour';
  return (
    <ChartPanel
      title={title}
      caption={caption}
      controls={<TrendChoices {...props} />}
      overTable={marks.length > 0 && <MarkTable line={line.key} marks={marks} timeZone={site.timeZone} />}
      table={table.rows.length === 0 ? undefined : table}
      fileName={csvName([line.key, 'standing', span], nowMs)}
      timeZone={site.timeZone}
    >
      <div className="min-w-0">
        {trend.error !== null || trend.waiting || empty ? (
          <NothingDrawn trend={trend} span={span} />
        ) : (
          <ChartPlace option={option} label={`${title}. ${caption}.`} className="h-64" />
        )}
        <TrendFindings
          verdicts={verdicts}
          creep={creep}
          context={{ unit, ratingAmps: line.ratingAmps, substations: line.substations, site, nowMs }}
          missing={uncountedWords(uncounted(trend.levels, phases[0] ?? 'a', trend.window), rung)}
        />
      </div>
    </ChartPanel>
  );
}

/** The trend in words and figures. */
function toldTrend(
  { line, unit, site, span, phase }: Props,
  {
    trend,
    phases,
    creep,
    marks,
  }: {
    trend: Trend;
    phases: readonly PhaseName[];
    creep: Creep | undefined;
    marks: readonly TrendMark[];
  },
) {
  const words = spanWords(span, { several: phase === 'all' });
  const context = { unit, ratingAmps: line.ratingAmps, timeZone: site.timeZone };
  const caption = creep === undefined ? words : `${words}; ${creepWords(creep, context)}`;
  const title =
    phase === 'all' ? 'Standing differential' : `Standing differential, phase ${site.phaseLetters[phase]}`;
  const table = trendTable(trend.series, {
    source: trend.source,
    phases,
    letters: site.phaseLetters,
    caption: title,
    marks,
    ...context,
  });
  return { caption, title, table };
}

function NothingDrawn({ trend, span }: { trend: Trend; span: TrendSpan }) {
  return (
    <div className={trend.waiting ? 'h-64 py-6' : 'py-6'}>
      {trend.error === null && !trend.waiting ? (
        <p className="text-ink-2">
          No differential could be told in this time
          {trend.source === 'snapshots' ? '' : ': no snapshot qualified'}.
        </p>
      ) : (
        <FetchState what={`the last ${span}`} error={trend.error} onTryAgain={trend.tryAgain} />
      )}
    </div>
  );
}

/** What is marked on the drawing; the same array while nothing of it changes. */
function useMarks(
  { standing, settings, works, terminals, line, unit, site }: Props,
  window: TrendWindow,
  phase: TrendPhase,
) {
  const { ratingAmps } = line;
  const { phaseLetters } = site;
  return useMemo(() => {
    const steps = standing.flatMap(({ phase: of, step }) =>
      step === null || (phase !== 'all' && phase !== of) ? [] : [{ letter: phaseLetters[of], step }],
    );
    const named = steps.map(({ letter, step }) => ({
      step,
      words: `${phase === 'all' ? `${letter}: ` : ''}step ${stepSizeWords(step, { unit, ratingAmps })}`,
    }));
    const others = standing.flatMap(({ phase: of, marks }) => (phase === 'all' || phase === of ? marks : []));
    return trendMarks(
      { steps: named, settings, works, terminals: namedTerminals(terminals), others },
      window,
    );
  }, [standing, settings, works, terminals, unit, ratingAmps, phaseLetters, phase, window]);
}

/** The phases shown with their conditions; the same array while nothing of it changes. */
function useDrawnPhases(line: LineSummary, phase: TrendPhase, nearRatio: number): readonly DrawnPhase[] {
  const a = phaseCondition(line, 'a', nearRatio);
  const b = phaseCondition(line, 'b', nearRatio);
  const c = phaseCondition(line, 'c', nearRatio);
  return useMemo(() => {
    const conditions = { a, b, c };
    const shown = PHASES.filter((each) => phase === 'all' || each === phase);
    return shown.map((each) => ({ phase: each, condition: conditions[each] }));
  }, [phase, a, b, c]);
}

function TrendChoices({ site, span, onSpan, phase, onPhase }: Props) {
  const phases = [
    ...PHASES.map((each) => ({ value: each as TrendPhase, label: site.phaseLetters[each] })),
    { value: 'all' as const, label: 'All' },
  ];
  return (
    <>
      <Choice legend="Phase shown" name="trend-phase" value={phase} options={phases} onChoose={onPhase} />
      <Choice legend="Time shown" name="trend-span" value={span} options={SPANS} onChoose={onSpan} />
    </>
  );
}
