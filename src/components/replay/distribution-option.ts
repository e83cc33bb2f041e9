import type { LineSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import type { Distribution } from '../../contract/replay';
import { PHASES, type PhaseName } from '../../view/phase';
import {
  histogramOutline,
  lastBin,
  total,
  shareAtOrAbove,
  spanOf,
  type SharePoint,
} from '../../view/replay-distribution';
import type { PhaseLetters } from '../../view/site-custom';
import { axisBase, chartBase, tooltipBase, tooltipLines } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';

export type DistributionForm = 'at or above' | 'histogram';

interface Drawing {
  readonly ink: ChartInk;
  readonly distribution: Distribution;
  readonly nearRatio: number;
  readonly letters: PhaseLetters;
  readonly form: DistributionForm;
  readonly narrow: boolean;
}

/** Where the logarithmic scale begins, in per cent: the power of ten below the share of one snapshot. */
function leastShare({ recorded, replayed }: Distribution): number {
  const most = Math.max(...PHASES.flatMap((phase) => [total(recorded[phase]), total(replayed[phase])]), 1);
  return 10 ** Math.floor(Math.log10(100 / most));
}

/** One small chart a phase, over the same scale: side by side, or one below the other on a narrow screen. */
export function distributionOption(drawing: Drawing): EChartsCoreOption {
  const { ink } = drawing;
  return {
    ...chartBase(ink),
    grid: PHASES.map((_, index) => gridPlace(index, drawing.narrow)),
    tooltip: {
      ...tooltipBase(ink),
      trigger: 'axis',
      formatter: (params: unknown) => tooltipOf(params, drawing),
    },
    xAxis: PHASES.map((_, index) => utilisationAxis(index, drawing)),
    yAxis: PHASES.map((phase, index) => shareAxis(phase, index, drawing)),
    series: PHASES.flatMap((phase, index) => phaseSeries(phase, index, drawing)),
  };
}

function gridPlace(index: number, narrow: boolean) {
  const inner = { outerBoundsMode: 'none' as const };
  if (narrow) return { ...inner, left: 44, right: 14, top: `${index * 33.3 + 5}%`, height: '22%' };
  return { ...inner, left: `${index * 33.3 + 4}%`, width: '28%', top: 34, bottom: 40 };
}

function utilisationAxis(index: number, { ink, distribution, form }: Drawing) {
  const [first, last] = spanOf(distribution);
  const binPercent = 100 * distribution.binRatio;
  const isShare = form === 'at or above';
  const most = Math.max((last + 1) * binPercent, isShare ? 110 : 0);
  return {
    ...axisBase(ink),
    gridIndex: index,
    min: isShare ? 0 : Math.max(0, Math.floor((first * binPercent) / 5) * 5),
    max: Math.ceil(most / 5) * 5,
    splitNumber: 5,
    splitLine: { show: false },
    axisLine: { show: true, onZero: false, lineStyle: { color: ink.rule, width: 1 } },
    axisLabel: { ...axisBase(ink).axisLabel, hideOverlap: true, showMaxLabel: !isShare },
    name: 'utilisation, %',
    nameLocation: 'end',
    nameGap: 0,
    nameTextStyle: {
      ...axisBase(ink).nameTextStyle,
      align: 'right',
      verticalAlign: 'top',
      padding: [22, 0, 0, 0],
    },
  };
}

const POWERS = ['10⁻³', '10⁻⁴', '10⁻⁵'];

function powerText(share: number): string {
  const power = Math.round(Math.log10(share));
  return power <= -3 ? (POWERS[-3 - power] ?? '') : String(Number(share.toPrecision(2)));
}

function shareAxis(phase: PhaseName, index: number, { ink, distribution, letters, form }: Drawing) {
  const shared = {
    ...axisBase(ink),
    gridIndex: index,
    name: `phase ${letters[phase]}, share in %`,
    nameLocation: 'end',
    nameGap: 10,
    nameTextStyle: { ...axisBase(ink).nameTextStyle, align: 'left', padding: [0, 0, 0, -36] },
  };
  if (form === 'histogram') return { ...shared, splitNumber: 4 };
  return {
    ...shared,
    type: 'log',
    min: leastShare(distribution),
    max: 100,
    axisLabel: { ...shared.axisLabel, formatter: powerText },
  };
}

function phaseSeries(phase: PhaseName, index: number, drawing: Drawing): LineSeriesOption[] {
  const { ink, distribution, nearRatio, form } = drawing;
  const shared = {
    type: 'line' as const,
    xAxisIndex: index,
    yAxisIndex: index,
    symbol: 'none',
    emphasis: { disabled: true },
  };
  const side = (which: 'recorded' | 'replayed'): LineSeriesOption => ({
    ...shared,
    id: `${phase}-${which}`,
    name: which,
    data: pointsOf(distribution[which][phase], drawing).map((point) => [...point]),
    ...(form === 'at or above' && { step: 'end' as const }),
    lineStyle:
      which === 'replayed' ? { color: ink.accent, width: 2 } : { color: ink.ink, width: 1.5, type: [5, 4] },
    z: which === 'replayed' ? 4 : 3,
  });
  const floor = form === 'at or above' ? leastShare(distribution) : 0;
  const mark = (atPercent: number, width: number, type: 'dotted' | 'solid'): LineSeriesOption => ({
    ...shared,
    id: `${phase}-mark-${atPercent}`,
    name: 'mark',
    silent: true,
    data: [
      [atPercent, floor],
      [atPercent, 100],
    ],
    lineStyle: { color: ink.rule, width, type },
    z: 2,
  });
  const marks = form === 'at or above' ? [mark(100 * nearRatio, 1, 'dotted'), mark(100, 2.5, 'solid')] : [];
  return [...marks, side('recorded'), side('replayed')];
}

function pointsOf(counts: readonly number[], { distribution, form }: Drawing): SharePoint[] {
  const { binRatio } = distribution;
  if (form === 'histogram') return histogramOutline(counts, { binRatio, span: spanOf(distribution) });
  const points = shareAtOrAbove(counts, binRatio);
  const end = (lastBin([counts]) + 1) * binRatio * 100;
  return points.length === 0 ? [] : [...points, [Number(end.toPrecision(10)), leastShare(distribution)]];
}

interface Pointed {
  readonly seriesName?: string;
  readonly axisIndex?: number;
  readonly value?: readonly [number, number];
}

const NAMES: Readonly<Record<string, string>> = { replayed: 'these settings', recorded: 'recorded' };

function tooltipOf(params: unknown, { form }: Drawing): HTMLElement {
  const pointed = (Array.isArray(params) ? params : [params]) as readonly Pointed[];
  const shown = pointed.filter(({ seriesName }) => seriesName !== undefined && seriesName in NAMES);
  const at = shown[0]?.value?.[0];
  if (at === undefined) return tooltipLines([]);
  const lead = form === 'at or above' ? `at or above ${at} %` : `from ${at} %`;
  const lines = shown.map(
    ({ seriesName, value }) =>
      `${NAMES[seriesName!]}: ${Number((value?.[1] ?? 0).toPrecision(3))} % of snapshots`,
  );
  return tooltipLines([lead, ...new Set(lines)]);
}
