import type { EChartsCoreOption } from 'echarts/core';
import { axisBase, chartBase, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { TrendDrawing } from './trend-drawing';
import { changeSeries, stripHeight } from './trend-changes';
import { bandSeries, levelSeries, markSeries, senSeries } from './trend-series';
import { trendWordsSeries } from './trend-words';

export function trendOption(drawing: TrendDrawing): EChartsCoreOption {
  const { ink, window, ticks } = drawing;
  const tickValues = ticks.map((tick) => tick.atMs);
  const labels = new Map(ticks.map((tick) => [tick.atMs, tick.label]));
  return {
    ...chartBase(ink),
    grid: {
      left: 8,
      right: 24,
      top: 30 + stripHeight(drawing.changes),
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
      nameGap: 12 + stripHeight(drawing.changes),
      nameTextStyle: { ...axisBase(ink).nameTextStyle, align: 'left' },
      splitNumber: 4,
      axisLabel: { ...axisBase(ink).axisLabel, showMaxLabel: false },
      splitLine: { ...axisBase(ink).splitLine, showMaxLine: false },
    },
    series: [
      ...drawing.lines.filter((line) => line.bandShown).map((line) => bandSeries(drawing, line)),
      ...markSeries(drawing),
      ...senSeries(drawing),
      ...drawing.lines.map(levelSeries),
      changeSeries(drawing),
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
