import type { CustomSeriesOption, LineSeriesOption } from 'echarts/charts';
import type { TrendDrawing, TrendLine } from './trend-drawing';

/** A phase's levels. What stands alone between two gaps is a dot, since a line of one point is none. */
export function levelSeries(line: TrendLine): LineSeriesOption {
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

/** From the 5th to the 95th percentile, for each stretch without a gap. */
export function bandSeries({ ink }: TrendDrawing, line: TrendLine): CustomSeriesOption {
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
export function markSeries({ ink, pickup, nearRatio }: TrendDrawing): LineSeriesOption[] {
  const steps = (ratio: number) =>
    pickup.flatMap((step) => [
      [step.fromMs, ratio * step.pickup],
      [step.toMs, ratio * step.pickup],
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

/** The Sen line, dashed, in the fan of its slope's 95 % limits. */
export function senSeries({ sen, lines }: TrendDrawing): (LineSeriesOption | CustomSeriesOption)[] {
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
            ...sen.map((point) => api.coord([point.atMs, point.high])),
            ...sen.map((point) => api.coord([point.atMs, point.low])).reverse(),
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
      data: sen.map((point) => [point.atMs, point.level]),
      lineStyle: { color: colour, width: 1.25, type: [5, 4] },
      emphasis: { disabled: true },
    },
  ];
}
