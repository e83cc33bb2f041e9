import type { CustomSeriesOption } from 'echarts/charts';
import type { PlacedMark } from '../../view/trend-marks';
import { CHART_TYPE } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';
import type { TrendDrawing } from './trend-drawing';

const ROW_PX = 16;

/** The room that the words of the marks take above the plot. */
export const stripHeight = (changes: readonly PlacedMark[]): number =>
  ROW_PX * Math.max(0, ...changes.map(({ row }) => row + 1));

/** Beside their words, so that no mark is told by its words alone. */
const DASHES: Readonly<Record<PlacedMark['kind'], number[] | undefined>> = {
  step: undefined,
  settings: [4, 3],
  work: [10, 3, 2, 3],
  mark: [4, 3],
};

/** What is known to have changed: a line at its instant, solid for a step and dashed for settings and work, and its words. */
export function changeSeries({ ink, changes, levelMax }: TrendDrawing): CustomSeriesOption {
  return {
    id: 'changes',
    type: 'custom',
    silent: true,
    z: 5,
    data: [0],
    tooltip: { show: false },
    renderItem: (_params, api) => {
      const placed = changes.map((change) => {
        const [x = 0, top = 0] = api.coord([change.atMs, levelMax]);
        const [, bottom = 0] = api.coord([change.atMs, 0]);
        return { ...change, x, y: top - ROW_PX * (change.row + 0.5), bottom };
      });
      // words over all the lines: one may run through the words of a lower row
      return {
        type: 'group',
        children: [
          ...placed.map((change) => markLine(change, ink)),
          ...placed.map((change) => markWords(change, ink)),
        ],
      };
    },
  };
}

interface DrawnMark extends PlacedMark {
  readonly x: number;
  readonly y: number;
  readonly bottom: number;
}

function markLine({ kind, x, y, bottom }: DrawnMark, ink: ChartInk) {
  const lineDash = DASHES[kind];
  return {
    type: 'line' as const,
    shape: { x1: x, y1: y - ROW_PX / 2, x2: x, y2: bottom },
    style: {
      stroke: kind === 'settings' || kind === 'mark' ? ink.rule : ink.ink,
      lineWidth: kind === 'step' ? 1.25 : 1,
      ...(lineDash !== undefined && { lineDash }),
    },
  };
}

const markWords = ({ kind, words, anchor, x, y }: DrawnMark, ink: ChartInk) => ({
  type: 'text' as const,
  x: anchor === 'end' ? x - 5 : x + 5,
  y,
  style: {
    ...CHART_TYPE,
    text: words,
    fill: kind === 'settings' || kind === 'mark' ? ink.ink2 : ink.ink,
    stroke: ink.panel,
    lineWidth: 3,
    align: anchor === 'end' ? ('right' as const) : ('left' as const),
    verticalAlign: 'middle' as const,
  },
});
