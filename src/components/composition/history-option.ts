import type { CustomSeriesOption, LineSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import { causeOutline, dayStretches, STACKED_CAUSES, stackMost } from '../../view/composition-history';
import type { StackedCause, StackedDay } from '../../view/composition-history';
import type { TrendWindow } from '../../view/trend-span';
import type { TimeTick } from '../../view/trend-ticks';
import { axisBase, chartBase, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';
import { causeFill } from './cause-fill';

/** Everything the stacked history draws, in the unit shown. */
export interface HistoryDrawing {
  readonly ink: ChartInk;
  readonly window: TrendWindow;
  readonly ticks: readonly TimeTick[];
  readonly days: readonly StackedDay[];
  readonly levelName: string;
  tooltip(day: StackedDay): readonly string[];
}

const HALF_DAY_MS = 43_200_000;

export function historyOption(drawing: HistoryDrawing): EChartsCoreOption {
  const { ink, window, ticks, days } = drawing;
  const tickValues = ticks.map((tick) => tick.atMs);
  const labels = new Map(ticks.map((tick) => [tick.atMs, tick.label]));
  const stretches = dayStretches(days);
  return {
    ...chartBase(ink),
    grid: {
      left: 8,
      right: 24,
      top: 30,
      bottom: 6,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    tooltip: {
      ...tooltipBase(ink),
      trigger: 'axis',
      axisPointer: { type: 'line', lineStyle: { color: ink.rule, width: 1, type: 'solid' } },
      formatter: (params: unknown) => tooltipLines(toldAt(params, drawing)),
    },
    xAxis: {
      ...axisBase(ink),
      min: window.fromMs,
      max: window.toMs,
      splitLine: { show: false },
      axisLine: { show: true, lineStyle: { color: ink.rule, width: 1 } },
      axisTick: { show: true, customValues: tickValues, length: 4, lineStyle: { color: ink.rule } },
      axisLabel: {
        ...axisBase(ink).axisLabel,
        customValues: tickValues,
        hideOverlap: true,
        formatter: (atMs: number) => labels.get(atMs) ?? '',
      },
    },
    yAxis: {
      ...axisBase(ink),
      max: 1.12 * stackMost(days),
      name: drawing.levelName,
      nameLocation: 'end',
      nameGap: 12,
      nameTextStyle: { ...axisBase(ink).nameTextStyle, align: 'left' },
      splitNumber: 4,
      axisLabel: { ...axisBase(ink).axisLabel, showMaxLabel: false },
      splitLine: { ...axisBase(ink).splitLine, showMaxLine: false },
    },
    series: [
      ...STACKED_CAUSES.map((cause) => shareSeries(cause, stretches, ink)),
      differentialSeries(stretches, ink),
    ],
  };
}

function shareSeries(
  cause: StackedCause,
  stretches: readonly (readonly StackedDay[])[],
  ink: ChartInk,
): CustomSeriesOption {
  return {
    id: cause,
    type: 'custom',
    silent: true,
    clip: true,
    z: 2,
    tooltip: { show: false },
    data: [0],
    renderItem: (_params, api) => ({
      type: 'group',
      children: stretches.map((stretch) => ({
        type: 'polygon' as const,
        shape: { points: causeOutline(stretch, cause).map((corner) => api.coord(corner)) },
        style: { fill: causeFill(ink, cause), stroke: ink.ink2, lineWidth: 0.75 },
      })),
    }),
  };
}

/** The phasor sum: lower than the stack wherever causes point apart. */
function differentialSeries(stretches: readonly (readonly StackedDay[])[], ink: ChartInk): LineSeriesOption {
  const data = stretches.flatMap((stretch) => {
    const alone = stretch.length === 1;
    const points = stretch.map((day) => ({
      value: [day.startMs + HALF_DAY_MS, day.differential],
      symbol: alone ? 'circle' : 'none',
      symbolSize: 4,
    }));
    const end = stretch.at(-1)!.startMs + HALF_DAY_MS;
    return [...points, { value: [end, '-'], symbol: 'none', symbolSize: 0 }];
  });
  return {
    id: 'differential',
    type: 'line',
    data,
    connectNulls: false,
    z: 4,
    lineStyle: { color: ink.ink, width: 2 },
    itemStyle: { color: ink.ink },
    emphasis: { disabled: true },
  };
}

/** ECharts hands the axis' position in each of the parts it triggers. */
function toldAt(params: unknown, { days, tooltip }: HistoryDrawing): readonly string[] {
  const first: unknown = Array.isArray(params) ? params[0] : params;
  const atMs = Number((first as { axisValue?: unknown } | undefined)?.axisValue);
  const day = days.find(({ startMs }) => atMs >= startMs && atMs < startMs + 2 * HALF_DAY_MS);
  return day === undefined ? [] : tooltip(day);
}
