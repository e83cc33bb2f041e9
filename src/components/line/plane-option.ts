import type { CustomSeriesOption, LineSeriesOption, ScatterSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import type { PerPhase } from '../../protection/phase';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { TailPlace } from '../../view/plane-shape';
import { axisBase, chartBase, CHART_TYPE, hatching, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { PlaneDrawing, PlaneMark } from './plane-drawing';
import { planeWordsSeries } from './plane-words';

/** Shapes tell the phases apart; the rectangle is a little smaller to weigh the same. */
const SYMBOLS = {
  a: { symbol: 'circle', symbolSize: 11 },
  b: { symbol: 'diamond', symbolSize: 13 },
  c: { symbol: 'rect', symbolSize: 10 },
} as const satisfies PerPhase<{ symbol: string; symbolSize: number }>;

export function planeOption(drawing: PlaneDrawing): EChartsCoreOption {
  const { ink, window, names } = drawing;
  return {
    ...chartBase(ink),
    grid: {
      left: 8,
      right: 14,
      top: 30,
      bottom: 26,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    tooltip: { ...tooltipBase(ink), trigger: 'item' },
    xAxis: {
      ...axisBase(ink),
      max: window.restraintMax,
      splitLine: { show: false },
      axisLine: { show: true, onZero: true, lineStyle: { color: ink.rule, width: 1 } },
      name: names.restraint,
      nameLocation: 'end',
      nameGap: 0,
      nameTextStyle: {
        ...CHART_TYPE,
        color: ink.ink2,
        align: 'right',
        verticalAlign: 'top',
        padding: [25, 0, 0, 0],
      },
      splitNumber: 6,
    },
    yAxis: {
      ...axisBase(ink),
      max: window.differentialMax,
      name: names.differential,
      nameLocation: 'end',
      nameGap: 12,
      nameTextStyle: { ...CHART_TYPE, color: ink.ink2, align: 'left' },
      splitNumber: 4,
      // the window ends at a round figure that need not be one of the ticks
      axisLabel: { ...axisBase(ink).axisLabel, showMaxLabel: false },
      splitLine: { ...axisBase(ink).splitLine, showMaxLine: false },
    },
    series: [
      ...thresholdSeries(drawing),
      ...cloudSeries(drawing),
      ...pathSeries(drawing),
      ...PHASES.map((phase) => tailSeries(drawing, phase)),
      ...drawing.points.map((mark) => pointSeries(mark, drawing)),
      planeWordsSeries(drawing),
    ],
  };
}

function thresholdSeries({ ink, threshold }: PlaneDrawing): LineSeriesOption[] {
  if (threshold.length === 0) return [];
  return [
    {
      id: 'threshold',
      type: 'line',
      data: threshold.map((point) => [point.restraint, point.differential]),
      symbol: 'none',
      silent: true,
      z: 2,
      lineStyle: { color: ink.ink, width: 2 },
      areaStyle: { origin: 'end', color: hatching(ink.hairline), opacity: 1 },
    },
  ];
}

function cloudSeries({ ink, cloud = [] }: PlaneDrawing): CustomSeriesOption[] {
  if (cloud.length === 0) return [];
  return [
    {
      id: 'cloud',
      type: 'custom',
      silent: true,
      clip: true,
      z: 3,
      data: [0],
      renderItem: (_params, api) => ({
        type: 'group',
        children: cloud.map(({ from, to, density }) => {
          const [left = 0, bottom = 0] = api.coord([from.restraint, from.differential]);
          const [right = 0, top = 0] = api.coord([to.restraint, to.differential]);
          return {
            type: 'rect' as const,
            // a patch under a pixel would vanish, and with it the snapshots that lay there
            shape: {
              x: left,
              y: top,
              width: Math.max(1.5, right - left),
              height: Math.max(1.5, bottom - top),
            },
            style: { fill: ink.ink2, opacity: 0.12 + 0.6 * density },
          };
        }),
      }),
    },
  ];
}

function pathSeries({ ink, path }: PlaneDrawing): LineSeriesOption[] {
  if (path === undefined || path.places.length === 0) return [];
  const end = path.places.length - 1;
  return [
    {
      id: 'path',
      type: 'line',
      silent: true,
      z: 4,
      symbol: (_value: unknown, { dataIndex }: { dataIndex: number }) =>
        dataIndex === end ? 'circle' : 'none',
      symbolSize: 8,
      showAllSymbol: true,
      data: path.places.map((place, index) => ({
        value: [place.restraint, place.differential],
        label: {
          show: index === end,
          formatter: path.label,
          position: 'top' as const,
          distance: 5,
          ...CHART_TYPE,
          color: ink.accent,
          textBorderColor: ink.panel,
          textBorderWidth: 3,
        },
      })),
      lineStyle: { color: ink.accent, width: 1.5, type: 'dashed' },
      itemStyle: { color: ink.panel, borderColor: ink.accent, borderWidth: 1.5 },
    },
  ];
}

/** The way of the last ten minutes: the older, the fainter. */
function tailSeries({ tails, points }: PlaneDrawing, phase: PhaseName): CustomSeriesOption {
  const colour = points.find((mark) => mark.phase === phase)?.colour;
  return {
    id: `tail-${phase}`,
    type: 'custom',
    silent: true,
    clip: true,
    z: 3,
    data: colour === undefined ? [] : [0],
    renderItem: (_params, api) => ({
      type: 'group',
      children: tails[phase].flatMap((stretch) =>
        fadingPieces(stretch).map((piece) => ({
          type: 'polyline' as const,
          shape: { points: piece.map((p) => api.coord([p.restraint, p.differential])) },
          style: {
            stroke: colour ?? 'none',
            fill: 'none',
            lineWidth: 2,
            lineJoin: 'round' as const,
            opacity: 0.5 * (1 - (piece[piece.length - 1]?.ageRatio ?? 1)) + 0.06,
          },
        })),
      ),
    }),
  };
}

const PIECES = 8;

type Tail = readonly TailPlace[];

/** A stretch cut into overlapping pieces, each of one age and so of one faintness. */
function fadingPieces(stretch: Tail): Tail[] {
  const length = Math.max(2, Math.ceil(stretch.length / PIECES));
  const pieces: Tail[] = [];
  for (let start = 0; start < stretch.length - 1; start += length) {
    pieces.push(stretch.slice(start, start + length + 1));
  }
  return pieces;
}

function pointSeries(mark: PlaneMark, { faded, ink }: PlaneDrawing): ScatterSeriesOption {
  return {
    id: `point-${mark.phase}`,
    type: 'scatter',
    ...SYMBOLS[mark.phase],
    z: 5,
    data: [[mark.restraint, mark.differential]],
    itemStyle: faded
      ? { color: ink.panel, borderColor: mark.colour, borderWidth: 1.25, opacity: 1 }
      : { color: mark.colour, borderColor: ink.panel, borderWidth: 1, opacity: 1 },
    emphasis: { scale: false },
    tooltip: { formatter: () => tooltipLines(mark.lines) },
  };
}
