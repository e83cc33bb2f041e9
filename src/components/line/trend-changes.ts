import type { CustomSeriesOption } from 'echarts/charts';
import type { PlacedMark } from '../../view/trend-marks';
import { CHART_TYPE } from '../charts/chart-axes';
import type { TrendDrawing } from './trend-drawing';

const ROW_PX = 16;

/** The room that the words of the marks take above the plot. */
export const stripHeight = (changes: readonly PlacedMark[]): number =>
  ROW_PX * Math.max(0, ...changes.map(({ row }) => row + 1));

/** What is known to have changed: a line at its instant, solid for a step and dashed for settings, and its words. */
export function changeSeries({ ink, changes, levelMax }: TrendDrawing): CustomSeriesOption {
  return {
    id: 'changes',
    type: 'custom',
    silent: true,
    z: 5,
    data: [0],
    tooltip: { show: false },
    renderItem: (_params, api) => ({
      type: 'group',
      children: changes.flatMap(({ kind, atMs, words, anchor, row }) => {
        const [x = 0, top = 0] = api.coord([atMs, levelMax]);
        const [, bottom = 0] = api.coord([atMs, 0]);
        const y = top - ROW_PX * (row + 0.5);
        const isStep = kind === 'step';
        return [
          {
            type: 'line' as const,
            shape: { x1: x, y1: y - ROW_PX / 2, x2: x, y2: bottom },
            style: {
              stroke: isStep ? ink.ink : ink.rule,
              lineWidth: isStep ? 1.25 : 1,
              ...(!isStep && { lineDash: [4, 3] }),
            },
          },
          {
            type: 'text' as const,
            x: anchor === 'end' ? x - 5 : x + 5,
            y,
            style: {
              ...CHART_TYPE,
              text: words,
              fill: isStep ? ink.ink : ink.ink2,
              align: anchor === 'end' ? ('right' as const) : ('left' as const),
              verticalAlign: 'middle' as const,
            },
          },
        ];
      }),
    }),
  };
}
