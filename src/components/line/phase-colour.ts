import type { Condition } from '../../contract/condition';
import type { ChartInk } from '../charts/chart-ink';

/** The colour of a phase on a chart: its state's where it has earned one, ink otherwise; faded while not live. */
export function phaseColour(
  ink: ChartInk,
  condition: Condition | undefined,
  { faded }: { faded: boolean },
): string {
  if (faded) return ink.ink2;
  switch (condition) {
    case 'over':
      return ink.over;
    case 'near':
      return ink.near;
    case 'rising':
      return ink.rising;
    default:
      return ink.ink;
  }
}
