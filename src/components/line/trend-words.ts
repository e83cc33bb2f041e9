import type { CustomSeriesOption } from 'echarts/charts';
import { labelPlaces } from '../../view/plane-labels';
import { CHART_TYPE } from '../charts/chart-axes';
import type { TrendDrawing } from './trend-option';

/** The names of the marks, and the letters at the ends of the lines where several are drawn. */
export function trendWordsSeries(drawing: TrendDrawing): CustomSeriesOption {
  return {
    id: 'words',
    type: 'custom',
    silent: true,
    z: 6,
    data: [0],
    tooltip: { show: false },
    renderItem: (_params, api) => {
      const at = (atMs: number, level: number) => {
        const [x = 0, y = 0] = api.coord([atMs, level]);
        return { x, y };
      };
      return { type: 'group', children: [...markNames(drawing, at), ...letters(drawing, at)] };
    },
  };
}

type At = (atMs: number, level: number) => { x: number; y: number };

/** A line's name stands clear of the line, halo and all. */
const MARK_NAME_ABOVE = 10;

/** The pickup is named at the right and the near mark at the left, so that they cannot meet. */
function markNames({ ink, pickup, nearRatio, levelText }: TrendDrawing, at: At) {
  const first = pickup[0];
  const last = pickup[pickup.length - 1];
  if (first === undefined || last === undefined) return [];
  const near = at(first.fromMs, nearRatio * first.pickup);
  const end = at(last.toMs, last.pickup);
  const style = {
    ...CHART_TYPE,
    fill: ink.ink2,
    stroke: ink.panel,
    lineWidth: 3,
    verticalAlign: 'middle' as const,
  };
  return [
    {
      type: 'text' as const,
      x: near.x + 6,
      y: near.y - MARK_NAME_ABOVE,
      style: {
        ...style,
        text: `near mark ${levelText(nearRatio * first.pickup)}`,
        align: 'left' as const,
      },
    },
    {
      type: 'text' as const,
      x: end.x,
      y: end.y - MARK_NAME_ABOVE,
      style: { ...style, text: `pickup ${levelText(last.pickup)}`, align: 'right' as const },
    },
  ];
}

function letters({ ink, lines, window, levelMax }: TrendDrawing, at: At) {
  if (lines.length < 2) return [];
  const marks = lines.flatMap((line) => {
    const stretch = line.stretches[line.stretches.length - 1];
    const point = stretch?.[stretch.length - 1];
    return point === undefined || point.medianAmps === null
      ? []
      : [{ name: line.letter, ...at(point.atMs, point.medianAmps) }];
  });
  const topRight = at(window.toMs, levelMax);
  const origin = at(window.fromMs, 0);
  const box = { left: origin.x, right: topRight.x + 40, top: topRight.y, bottom: origin.y };
  return labelPlaces(marks, box).map((place) => ({
    type: 'text' as const,
    x: place.labelX - 6,
    y: place.labelY,
    style: {
      text: place.name,
      ...CHART_TYPE,
      fontWeight: 500,
      fill: lines.find((line) => line.letter === place.name)?.colour ?? ink.ink,
      stroke: ink.panel,
      lineWidth: 3,
      align: 'left' as const,
      verticalAlign: 'middle' as const,
    },
  }));
}
