import type { StackedCause } from '../../view/composition-history';
import { hatching } from '../charts/chart-axes';
import type { ChartInk } from '../charts/chart-ink';

/** How a cause's share is filled: told apart by its pattern. */
export function causeFill(ink: ChartInk, cause: StackedCause) {
  switch (cause) {
    case 'charging':
      return ink.band;
    case 'ratio':
      return hatching(ink.ink2);
    case 'angle':
      return dotting(ink.ink2);
    case 'rest':
      return ink.panel;
  }
}

/** Light dots, drawn as a repeating tile. */
function dotting(color: string) {
  return {
    ...hatching(color),
    svgElement: {
      tag: 'path',
      key: 'dots',
      attrs: { d: 'M1 2a1 1 0 1 0 2 0a1 1 0 1 0 -2 0 M5 6a1 1 0 1 0 2 0a1 1 0 1 0 -2 0', fill: color },
    },
  };
}
