import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { LineComposition } from '../../contract/composition';
import type { LineSummary } from '../../contract/lines';
import type { StandingVerdict } from '../../contract/standing';
import {
  CAUSE_SPANS,
  causeTable,
  causeWindow,
  STACKED_CAUSES,
  stackedDays,
} from '../../view/composition-history';
import type { CauseSpan, StackedCause, StackedDay } from '../../view/composition-history';
import { stepInWindowWords, weakWords } from '../../view/composition-why';
import { countedWords } from '../../view/composition-rows';
import { tenthsText } from '../../view/composition-words';
import { dateText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { unitWords } from '../../view/line-unit';
import type { CurrentUnit } from '../../view/line-unit';
import type { PhaseName } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { timeTicks } from '../../view/trend-ticks';
import { ChartPanel } from '../charts/ChartPanel';
import { ChartPlace } from '../charts/ChartPlace';
import { Choice } from '../charts/Choice';
import { FetchState } from '../charts/FetchState';
import { useChartInk } from '../charts/use-chart-ink';
import { useNarrow } from '../line/use-narrow';
import { fetchComposition } from './composition-requests';
import { FillOfCause } from './FillOfCause';
import { historyOption } from './history-option';

interface Props {
  readonly line: LineSummary;
  readonly standing: readonly StandingVerdict[];
  readonly site: SiteCustom;
  readonly unit: CurrentUnit;
  readonly phase: PhaseName;
  readonly nowMs: number;
  readonly span: CauseSpan;
  readonly onSpan: (span: CauseSpan) => void;
}

const EVERY_MS = 600_000;
const DAY_MS = 86_400_000;
const NO_HISTORY: LineComposition['history'] = [];
const SPANS = CAUSE_SPANS.map((span) => ({
  value: span,
  label: `${span[0]!.toUpperCase()}${span.slice(1)}`,
}));
const CAUSE_NAMES: Readonly<Record<StackedCause, string>> = {
  charging: 'charging',
  ratio: 'ratio mismatch',
  angle: 'angle mismatch',
  rest: 'rest',
};

/** The causes of one phase's standing level day by day, stacked. */
export function CauseHistory(props: Props) {
  const { line, standing, site, unit, phase, nowMs, span, onSpan } = props;
  const today = Math.floor(nowMs / DAY_MS);
  const window = useMemo(() => causeWindow(span, today * DAY_MS), [span, today]);
  const byPhasors = line.goesBy === 'phasors';
  const query = useQuery({
    queryKey: ['composition', line.key, span, today],
    queryFn: ({ signal }) => fetchComposition({ key: line.key, signal }, window),
    enabled: byPhasors,
    staleTime: EVERY_MS,
    refetchInterval: EVERY_MS,
  });
  const history = query.data?.history ?? NO_HISTORY;
  const composition = query.data?.phases[phase];
  const step = standing.find((each) => each.phase === phase)?.step ?? null;
  const caution =
    composition?.kind === 'separated'
      ? (stepInWindowWords(composition, step, site.timeZone) ?? weakWords(composition))
      : undefined;
  const title = `The causes by day, phase ${site.phaseLetters[phase]}`;
  const table = causeTable(history, phase, {
    caption: title,
    letter: site.phaseLetters[phase],
    unit,
    ratingAmps: line.ratingAmps,
  });
  const caption =
    composition?.kind === 'separated'
      ? `Magnitudes stacked, each day told by the days around it (window: ${countedWords(composition)}); the line is their sum as phasors, lower where causes point apart`
      : 'What the standing level consisted of on each day';
  return (
    <ChartPanel
      title={title}
      caption={caption}
      controls={
        byPhasors && (
          <Choice legend="Days shown" name="cause-span" value={span} options={SPANS} onChoose={onSpan} />
        )
      }
      table={table.rows.length === 0 ? undefined : table}
      fileName={csvName([line.key, 'causes', site.phaseLetters[phase], span], nowMs)}
      timeZone={site.timeZone}
    >
      {!byPhasors ? (
        <p className="py-4 text-ink-2">
          This line goes by reported magnitudes: its causes can’t be told from this feed.
        </p>
      ) : composition === undefined ? (
        <div className="h-64 py-6">
          <FetchState
            what={`the causes of the last ${span}`}
            error={query.error}
            onTryAgain={() => void query.refetch()}
          />
        </div>
      ) : composition.kind === 'not separable' ? (
        <p className="max-w-[60ch] py-4">
          <strong className="font-semibold">Not separable in this window.</strong> {composition.reason}
        </p>
      ) : (
        <>
          {caution !== undefined && <p className="mb-2 max-w-[110ch] text-pretty">{caution}</p>}
          <Stack {...props} window={window} history={history} label={`${title}. ${caption}.`} />
        </>
      )}
    </ChartPanel>
  );
}

interface StackProps extends Props {
  readonly window: ReturnType<typeof causeWindow>;
  readonly history: LineComposition['history'];
  readonly label: string;
}

function Stack({ line, site, unit, phase, window, history, label }: StackProps) {
  const ink = useChartInk();
  const narrow = useNarrow();
  const { ratingAmps } = line;
  const { timeZone } = site;
  const option = useMemo(() => {
    if (ink === undefined) return undefined;
    const unitAmps = unit === 'amperes' ? 1 : ratingAmps;
    const shown = (level: number) => tenthsText(level * unitAmps, { unit, ratingAmps });
    return historyOption({
      ink,
      window,
      ticks: timeTicks(window, { timeZone, most: narrow ? 5 : 10 }),
      days: stackedDays(history, phase, unitAmps),
      levelName: `magnitudes, ${unitWords(unit, ratingAmps)}`,
      tooltip: (day) => dayLines(day, { shown, timeZone }),
    });
  }, [ink, window, history, phase, unit, ratingAmps, timeZone, narrow]);
  return (
    <div>
      <ul className="m-0 flex list-none flex-wrap gap-x-5 gap-y-1 p-0 text-caption text-ink-2">
        {STACKED_CAUSES.map((cause) => (
          <li key={cause} className="flex items-center gap-1.5">
            <FillOfCause cause={cause} />
            {CAUSE_NAMES[cause]}
          </li>
        ))}
        <li className="flex items-center gap-1.5">
          <span className="w-[26px] border-t-2 border-ink" aria-hidden="true" />
          differential
        </li>
      </ul>
      <ChartPlace option={option} label={label} className="h-64" />
    </div>
  );
}

function dayLines(
  { startMs, shares, differential }: StackedDay,
  { shown, timeZone }: { shown: (level: number) => string; timeZone: string },
): string[] {
  const causes = STACKED_CAUSES.map(
    (cause) => `${CAUSE_NAMES[cause]} ${shown(shares[cause].high - shares[cause].low)}`,
  );
  return [
    dateText(startMs + DAY_MS / 2, timeZone),
    ...causes.reverse(),
    `differential ${shown(differential)}`,
  ];
}
