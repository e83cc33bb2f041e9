import type { CustomSeriesOption, LineSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import type { PhaseName } from '../../protection/phase';
import type { PickupStep } from '../../view/trend-pickup';
import type { TrendPoint } from '../../view/trend-points';
import type { SenPoint } from '../../view/trend-sen';
import type { TrendWindow } from '../../view/trend-span';
import type { TimeTick } from '../../view/trend-ticks';
import { axisBase, chartBase, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';
import { trendWordsSeries } from './trend-words';

/** Everything the trend draws; levels and pickups in the unit shown. */
export interface TrendDrawing {
  readonly ink: ChartInk;
  readonly window: TrendWindow;
  readonly ticks: readonly TimeTick[];
  readonly levelMax: number;
  readonly lines: readonly TrendLine[];
  readonly pickup: readonly PickupStep[];
  readonly nearRatio: number;
  readonly sen: readonly SenPoint[];
  readonly levelName: string;
  /** a level as a figure with its unit */
  levelText(level: number): string;
  /** what the tooltip says of an instant, line by line */
  tooltip(atMs: number): readonly string[];
}

export interface TrendLine {
  readonly phase: PhaseName;
  readonly letter: string;
  readonly colour: string;
  readonly dash: 'solid' | 'dashed';
  readonly stretches: readonly (readonly TrendPoint[])[];
  readonly bandShown: boolean;
}

export function trendOption(drawing: TrendDrawing): EChartsCoreOption {
  const { ink, window, ticks } = drawing;
  const tickValues = ticks.map((tick) => tick.atMs);
  const labels = new Map(ticks.map((tick) => [tick.atMs, tick.label]));
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
      formatter: (params: unknown) => tooltipLines(drawing.tooltip(pointedAt(params))),
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
      max: drawing.levelMax,
      name: drawing.levelName,
      nameLocation: 'end',
      nameGap: 12,
      nameTextStyle: { ...axisBase(ink).nameTextStyle, align: 'left' },
      splitNumber: 4,
      axisLabel: { ...axisBase(ink).axisLabel, showMaxLabel: false },
    },
    series: [
      ...drawing.lines.filter((line) => line.bandShown).map((line) => bandSeries(drawing, line)),
      ...markSeries(drawing),
      ...senSeries(drawing),
      ...drawing.lines.map(levelSeries),
      trendWordsSeries(drawing),
    ],
  };
}

/** ECharts hands the axis' position in each of the parts it triggers. */
function pointedAt(params: unknown): number {
  const first: unknown = Array.isArray(params) ? params[0] : params;
  const value = (first as { axisValue?: unknown } | undefined)?.axisValue;
  return typeof value === 'number' ? value : Number(value);
}

function levelSeries(line: TrendLine): LineSeriesOption {
  const data = line.stretches.flatMap((stretch) => {
    const alone = stretch.length === 1;
    const points = stretch.map((point) => ({
      value: [point.atMs, point.medianAmps ?? '-'],
      symbol: alone ? 'circle' : 'none',
      symbolSize: 4,
    }));
    const end = stretch[stretch.length - 1]?.atMs ?? 0;
    return [...points, { value: [end, '-'], symbol: 'none', symbolSize: 0 }];
  });
  return {
    id: `level-${line.phase}`,
    type: 'line',
    data,
    connectNulls: false,
    z: 4,
    lineStyle: { color: line.colour, width: 1.75, type: line.dash === 'solid' ? 'solid' : [6, 3] },
    itemStyle: { color: line.colour },
    emphasis: { disabled: true },
  };
}

function bandSeries({ ink }: TrendDrawing, line: TrendLine): CustomSeriesOption {
  return {
    id: `band-${line.phase}`,
    type: 'custom',
    silent: true,
    clip: true,
    z: 1,
    tooltip: { show: false },
    data: [0],
    renderItem: (_params, api) => ({
      type: 'group',
      children: line.stretches.map((stretch) => {
        const spread = stretch.filter((point) => point.lowAmps !== null && point.highAmps !== null);
        const upper = spread.map((point) => api.coord([point.atMs, point.highAmps!]));
        const lower = spread.map((point) => api.coord([point.atMs, point.lowAmps!])).reverse();
        return {
          type: 'polygon' as const,
          shape: { points: [...upper, ...lower] },
          style: { fill: ink.band },
        };
      }),
    }),
  };
}

/** The recorded pickup and the near mark, each for the time its version was in force. */
function markSeries({ ink, pickup, nearRatio }: TrendDrawing): LineSeriesOption[] {
  const steps = (ratio: number) =>
    pickup.flatMap((step) => [
      [step.fromMs, ratio * step.pickupAmps],
      [step.toMs, ratio * step.pickupAmps],
    ]);
  const common = { type: 'line' as const, symbol: 'none', silent: true, z: 2, emphasis: { disabled: true } };
  return [
    { ...common, id: 'pickup', data: steps(1), lineStyle: { color: ink.ink, width: 1.5 } },
    {
      ...common,
      id: 'near-mark',
      data: steps(nearRatio),
      lineStyle: { color: ink.rule, width: 1.25, type: [1.5, 3] },
    },
  ];
}

function senSeries({ sen, lines }: TrendDrawing): (LineSeriesOption | CustomSeriesOption)[] {
  const colour = lines[0]?.colour;
  if (sen.length === 0 || colour === undefined) return [];
  return [
    {
      id: 'sen-fan',
      type: 'custom',
      silent: true,
      clip: true,
      z: 2,
      data: [0],
      renderItem: (_params, api) => ({
        type: 'polygon',
        shape: {
          points: [
            ...sen.map((point) => api.coord([point.atMs, point.highAmps])),
            ...sen.map((point) => api.coord([point.atMs, point.lowAmps])).reverse(),
          ],
        },
        style: { fill: colour, opacity: 0.16 },
      }),
    },
    {
      id: 'sen-line',
      type: 'line',
      symbol: 'none',
      silent: true,
      z: 3,
      data: sen.map((point) => [point.atMs, point.levelAmps]),
      lineStyle: { color: colour, width: 1.25, type: [5, 4] },
      emphasis: { disabled: true },
    },
  ];
}
