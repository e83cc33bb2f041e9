import type { CustomSeriesOption, LineSeriesOption, ScatterSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import type { PerPhase } from '../../protection/phase';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { PhasePlace, PlaneShape, TailPlace } from '../../view/plane-shape';
import { axisBase, chartBase, CHART_TYPE, hatching, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';
import { planeWordsSeries } from './plane-words';

/** Everything the plane draws, in the unit shown. */
export interface PlaneDrawing extends Omit<PlaneShape, 'points'> {
  readonly ink: ChartInk;
  readonly points: readonly PlaneMark[];
  /** values are not live: marks are outlines */
  readonly faded: boolean;
  readonly names: { readonly restraint: string; readonly differential: string };
}

export type PlaneMark = PhasePlace & {
  readonly letter: string;
  readonly colour: string;
  /** what the tooltip says, line by line */
  readonly lines: readonly string[];
};

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
    },
    series: [
      ...thresholdSeries(drawing),
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
