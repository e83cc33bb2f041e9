import type { CustomSeriesOption } from 'echarts/charts';
import { labelPlaces, wordPlace } from '../../view/plane-labels';
import { CHART_TYPE } from '../charts/chart-axes';
import type { PlaneDrawing } from './plane-drawing';

/** A drawing's words are placed together, in pixels, so that none lies on another or on a mark. */
export function planeWordsSeries(drawing: PlaneDrawing): CustomSeriesOption {
  return {
    id: 'words',
    type: 'custom',
    silent: true,
    z: 6,
    data: [0],
    renderItem: (_params, api) => {
      const at = (restraint: number, differential: number) => {
        const [x = 0, y = 0] = api.coord([restraint, differential]);
        return { x, y };
      };
      const marks = drawing.points.map((mark) => ({
        name: mark.letter,
        ...at(mark.restraint, mark.differential),
      }));
      const taken = [...marks, ...pathWord(drawing, at)];
      return { type: 'group', children: [...letters(drawing, marks, at), ...sides(drawing, taken, at)] };
    },
  };
}

type At = (restraint: number, differential: number) => { x: number; y: number };
type Mark = { name: string; x: number; y: number };

/** The word at the end of a predicted path takes room, too. */
function pathWord({ path }: PlaneDrawing, at: At): Mark[] {
  const end = path?.places.at(-1);
  if (end === undefined) return [];
  const { x, y } = at(end.restraint, end.differential);
  return [-30, 0, 30].map((beside) => ({ name: '', x: x + beside, y: y - 10 }));
}

function letters({ ink, window, points }: PlaneDrawing, marks: readonly Mark[], at: At) {
  const topRight = at(window.restraintMax, window.differentialMax);
  const origin = at(0, 0);
  const box = { left: origin.x, right: topRight.x, top: topRight.y, bottom: origin.y };
  return labelPlaces(marks, box).flatMap((place) => {
    const colour = points.find((mark) => mark.letter === place.name)?.colour ?? ink.ink;
    const outward = place.side === 'right' ? 1 : -1;
    const label = {
      type: 'text' as const,
      x: place.labelX,
      y: place.labelY,
      style: {
        text: place.name,
        ...CHART_TYPE,
        fontWeight: 500,
        fill: colour,
        stroke: ink.panel,
        lineWidth: 3,
        align: place.side === 'right' ? ('left' as const) : ('right' as const),
        verticalAlign: 'middle' as const,
      },
    };
    if (!place.leader) return [label];
    const leader = {
      type: 'line' as const,
      shape: { x1: place.x + 6 * outward, y1: place.y, x2: place.labelX - 2 * outward, y2: place.labelY },
      style: { stroke: ink.ink2, lineWidth: 0.75 },
    };
    return [leader, label];
  });
}

/** The two sides of the threshold, named where there is room; unnamed where there is none. */
function sides({ ink, window, threshold }: PlaneDrawing, marks: readonly Mark[], at: At) {
  const last = threshold[threshold.length - 1];
  const first = threshold[0];
  if (first === undefined || last === undefined) return [];
  const { restraintMax: right, differentialMax: top } = window;
  const above = [0.2, 0.4, 0.1].map((share) =>
    at(share * right, (top + thresholdOn(threshold, share * right)) / 2),
  );
  const below = [0.8, 0.6, 0.9, 0.35].flatMap((share) =>
    [0.3, 0.55].map((height) => at(share * right, height * thresholdOn(threshold, share * right))),
  );
  return (
    [
      ['operates', above],
      ['restrains', below],
    ] as const
  ).flatMap(([text, candidates]) => {
    const place = wordPlace(candidates, marks);
    if (place === undefined) return [];
    return [
      {
        type: 'text' as const,
        x: place.x,
        y: place.y,
        style: {
          text,
          ...CHART_TYPE,
          fill: ink.ink2,
          stroke: ink.panel,
          lineWidth: 4,
          align: 'center' as const,
          verticalAlign: 'middle' as const,
        },
      },
    ];
  });
}

function thresholdOn(threshold: PlaneDrawing['threshold'], restraint: number): number {
  const next = threshold.findIndex((point) => point.restraint >= restraint);
  const end = threshold[next];
  const start = threshold[next - 1];
  if (end === undefined) return threshold[threshold.length - 1]?.differential ?? 0;
  if (start === undefined) return end.differential;
  const share = (restraint - start.restraint) / (end.restraint - start.restraint);
  return start.differential + share * (end.differential - start.differential);
}
