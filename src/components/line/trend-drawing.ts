import type { PhaseName } from '../../protection/phase';
import type { PlacedMark } from '../../view/trend-marks';
import type { PickupStep } from '../../view/trend-pickup';
import type { TrendPoint } from '../../view/trend-points';
import type { SenPoint } from '../../view/trend-sen';
import type { TrendWindow } from '../../view/trend-span';
import type { TimeTick } from '../../view/trend-ticks';
import type { ChartInk } from '../charts/chart-ink';

/** Everything the trend draws; levels and pickups in the unit shown. */
export interface TrendDrawing {
  readonly ink: ChartInk;
  readonly window: TrendWindow;
  readonly ticks: readonly TimeTick[];
  readonly levelMax: number;
  readonly lines: readonly TrendLine[];
  readonly pickup: readonly PickupStep[];
  readonly nearRatio: number;
  readonly sen: readonly SenPoint[];
  /** steps and changes of the settings, named in a strip above the plot */
  readonly changes: readonly PlacedMark[];
  readonly levelName: string;
  /** a level as a figure with its unit */
  levelText(level: number): string;
  /** what the tooltip says of an instant, line by line */
  tooltip(atMs: number): readonly string[];
}

export interface TrendLine {
  readonly phase: PhaseName;
  readonly letter: string;
  readonly colour: string;
  readonly dash: 'solid' | 'dashed';
  readonly stretches: readonly (readonly TrendPoint[])[];
  readonly bandShown: boolean;
}
