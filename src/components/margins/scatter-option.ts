import type { LineSeriesOption, ScatterSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import { percentText } from '../../view/figures';
import { quarterCircle, scatterMax, type ScatterPoint } from '../../view/margin-scatter';
import { PHASES } from '../../view/phase';
import type { PhaseLetters } from '../../view/site-custom';
import { axisBase, chartBase, CHART_TYPE, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';

interface Drawing {
  readonly ink: ChartInk;
  readonly points: readonly ScatterPoint[];
  readonly nearRatio: number;
  readonly letters: PhaseLetters;
  /** on a phone the circles' words would meet */
  readonly narrow: boolean;
}

const SYMBOLS = {
  a: { symbol: 'circle', symbolSize: 8 },
  b: { symbol: 'diamond', symbolSize: 10 },
  c: { symbol: 'rect', symbolSize: 7 },
} as const;

/** Charging against mismatch, with the quarter circles on which both together reach near mark and pickup. */
export function scatterOption(drawing: Drawing): EChartsCoreOption {
  const { ink, points, nearRatio } = drawing;
  const max = scatterMax(points, nearRatio);
  const perCent = (value: number) => `${Math.round(value * 100)}`;
  const axis = { ...axisBase(ink), max, axisLabel: { ...CHART_TYPE, color: ink.ink2, formatter: perCent } };
  const name = { ...CHART_TYPE, color: ink.ink2 };
  return {
    ...chartBase(ink),
    grid: {
      left: 8,
      right: 16,
      top: 30,
      bottom: 26,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    tooltip: { ...tooltipBase(ink), trigger: 'item' },
    xAxis: {
      ...axis,
      splitLine: { show: false },
      axisLine: { show: true, onZero: true, lineStyle: { color: ink.rule, width: 1 } },
      name: 'charging, % of pickup',
      nameLocation: 'end',
      nameGap: 0,
      nameTextStyle: { ...name, align: 'right', verticalAlign: 'top', padding: [25, 0, 0, 0] },
    },
    yAxis: {
      ...axis,
      name: 'mismatch, % of pickup',
      nameLocation: 'end',
      nameGap: 12,
      nameTextStyle: { ...name, align: 'left' },
      splitNumber: 4,
      axisLabel: { ...axis.axisLabel, showMaxLabel: false },
    },
    series: [
      ...circle(nearRatio, 'near mark', { ...drawing, max, dashed: true }),
      ...circle(1, 'pickup', { ...drawing, max, dashed: false }),
      ...PHASES.map((phase) => markSeries(phase, drawing)),
    ],
  };
}

function circle(
  share: number,
  word: string,
  { ink, max, dashed, narrow }: Drawing & { max: number; dashed: boolean },
): LineSeriesOption[] {
  if (share > max * Math.SQRT2) return [];
  const inside = quarterCircle(share).filter(([x, y]) => x <= max && y <= max);
  const last = inside.at(-1);
  if (last === undefined) return [];
  return [
    {
      type: 'line',
      data: inside,
      symbol: 'none',
      silent: true,
      tooltip: { show: false },
      lineStyle: { color: dashed ? ink.ink2 : ink.ink, width: 1, type: dashed ? [2, 3] : 'solid' },
      endLabel: {
        show: true,
        formatter: narrow ? word : `${word}, both at right angles`,
        color: ink.ink2,
        ...CHART_TYPE,
        align: 'left',
        offset: [0, -10],
      },
    },
  ];
}

function markSeries(phase: ScatterPoint['phase'], drawing: Drawing): ScatterSeriesOption {
  const { ink, points, letters, nearRatio } = drawing;
  return {
    type: 'scatter',
    ...SYMBOLS[phase],
    cursor: 'pointer',
    data: points
      .filter((point) => point.phase === phase)
      .map((point) => ({
        name: point.key,
        value: [point.chargingShare, point.mismatchShare],
        itemStyle: {
          color: (point.shareOfPickup ?? 0) >= nearRatio ? ink.near : ink.ink,
          opacity: 0.75,
        },
      })),
    tooltip: {
      formatter: (hovered) => {
        const at = Array.isArray(hovered) ? hovered[0] : hovered;
        const point = points.find((one) => one.phase === phase && one.key === at?.name);
        return point === undefined ? '' : (tooltipLines(pointLines(point, letters)) as unknown as string);
      },
    },
  };
}

const pointLines = (point: ScatterPoint, letters: PhaseLetters): string[] => [
  `${point.lineName}, phase ${letters[point.phase]}`,
  `charging ${percentText(point.chargingShare)} of the pickup`,
  `mismatch ${percentText(point.mismatchShare)} of the pickup`,
  point.shareOfPickup === null
    ? 'no standing level of the last 24 hours'
    : `standing level ${percentText(point.shareOfPickup)} of the pickup`,
];
