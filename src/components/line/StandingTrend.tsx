import { useMemo } from 'react';
import type { LineSummary } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import { csvName } from '../../view/line-csv';
import type { Reading } from '../../view/line-readings';
import type { CurrentUnit } from '../../view/line-unit';
import { PHASES } from '../../view/phase';
import { phaseCondition } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import type { TrendPhase } from '../../view/trend-phase';
import { TREND_SPANS } from '../../view/trend-span';
import type { TrendSpan } from '../../view/trend-span';
import { trendTable } from '../../view/trend-table';
import { creepWords, spanWords } from '../../view/trend-words';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { FetchState } from '../charts/FetchState';
import { useChartInk } from '../charts/use-chart-ink';
import { useNarrow } from './use-narrow';
import { useTrend } from './use-trend';
import { useTrendOption } from './use-trend-option';
import type { DrawnPhase } from './use-trend-option';

interface Props {
  readonly line: LineSummary;
  readonly settings: readonly SettingsVersion[];
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
  const { line, settings, live, unit, site, faded, nowMs, span, phase } = props;
  const trend = useTrend(line.key, span, { live, nowMs });
  const ink = useChartInk();
  const narrow = useNarrow();
  const drawn = useDrawnPhases(line, phase, site.nearRatio);
  const phases = drawn.map((each) => each.phase);
  const daysShown = span === 'week' || span === 'two months';
  const found = [...trend.creep, ...line.creep].find((each) => each.phase === phase);
  const option = useTrendOption({
    settings,
    trend,
    drawn,
    creep: daysShown ? found : undefined,
    unit,
    ratingAmps: line.ratingAmps,
    site,
    ink,
    faded,
    narrow,
  });
  const words = spanWords(span, { several: phase === 'all' });
  const context = { unit, ratingAmps: line.ratingAmps, timeZone: site.timeZone };
  const caption = found === undefined || !daysShown ? words : `${words}; ${creepWords(found, context)}`;
  const title =
    phase === 'all' ? 'Standing differential' : `Standing differential, phase ${site.phaseLetters[phase]}`;
  const empty = phases.every((each) => trend.series[each].every((point) => point.medianAmps === null));
  const table = trendTable(trend.series, {
    source: trend.source,
    phases,
    letters: site.phaseLetters,
    caption: title,
    ...context,
  });
  return (
    <ChartPanel
      title={title}
      caption={caption}
      controls={<TrendChoices {...props} />}
      table={table.rows.length === 0 ? undefined : table}
      fileName={csvName([line.key, 'standing', span], nowMs)}
      timeZone={site.timeZone}
    >
      {trend.error !== null || trend.waiting || empty ? (
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
      ) : (
        <ChartPlace option={option} label={`${title}. ${caption}.`} className="h-64" />
      )}
    </ChartPanel>
  );
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
