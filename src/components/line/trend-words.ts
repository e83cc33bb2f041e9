import type { CustomSeriesOption } from 'echarts/charts';
import { labelPlaces } from '../../view/plane-labels';
import { CHART_TYPE } from '../charts/chart-axes';
import type { TrendDrawing } from './trend-drawing';

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

/** Barlow at 12 px is narrower than this on average. */
const CHARACTER_PX = 6;

/** Where a name begins so that no marked change runs through it: where it would like to, or beyond the last such one. */
function clearOf(
  changesPx: readonly number[],
  { startPx, widthPx }: { startPx: number; widthPx: number },
): number {
  const through = changesPx
    .filter((px) => px > startPx - 4 && px < startPx + widthPx)
    .sort((one, other) => one - other);
  const first = through[0];
  return first === undefined ? startPx : clearOf(changesPx, { startPx: first + 6, widthPx });
}

/** A line's name stands clear of the line, halo and all. */
const MARK_NAME_ABOVE = 10;

/**
 * The pickup is named at the right and the near mark at the left of what was longest in force, so that they cannot
 * meet, and neither stands across a change of the settings.
 */
function markNames(drawing: TrendDrawing, at: At) {
  const { ink, pickup, nearRatio, levelText } = drawing;
  const last = pickup[pickup.length - 1];
  if (last === undefined) return [];
  const longest = pickup.reduce((most, step) =>
    step.toMs - step.fromMs > most.toMs - most.fromMs ? step : most,
  );
  const near = at(longest.fromMs, nearRatio * longest.pickup);
  const end = at(last.toMs, last.pickup);
  const nearName = `near mark ${levelText(nearRatio * longest.pickup)}`;
  const pickupName = `pickup ${levelText(last.pickup)}`;
  const changesPx = drawing.changes.map(({ atMs }) => at(atMs, 0).x);
  // The name at the right grows to the left: seen from the end it is the same question.
  const mirrored = changesPx.map((px) => end.x - px);
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
      x: clearOf(changesPx, { startPx: near.x + 6, widthPx: nearName.length * CHARACTER_PX }),
      y: near.y - MARK_NAME_ABOVE,
      style: {
        ...style,
        text: nearName,
        align: 'left' as const,
      },
    },
    {
      type: 'text' as const,
      x: end.x - clearOf(mirrored, { startPx: 0, widthPx: pickupName.length * CHARACTER_PX }),
      y: end.y - MARK_NAME_ABOVE,
      style: { ...style, text: pickupName, align: 'right' as const },
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
