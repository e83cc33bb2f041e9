import { useMemo } from 'react';
import type { Condition } from '../../contract/condition';
import type { SettingsVersion } from '../../contract/settings-version';
import type { Creep } from '../../contract/warning';
import { currentText } from '../../view/line-figures';
import { unitWords } from '../../view/line-unit';
import type { CurrentUnit } from '../../view/line-unit';
import type { PhaseName } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { marksTold, placedMarks } from '../../view/trend-marks';
import type { TrendMark } from '../../view/trend-marks';
import { pickupSteps } from '../../view/trend-pickup';
import { senPoints } from '../../view/trend-sen';
import { shownStretches, trendLevelMax } from '../../view/trend-shape';
import { timeTicks } from '../../view/trend-ticks';
import { trendTooltip } from '../../view/trend-words';
import type { ChartInk } from '../charts/chart-ink';
import { phaseColour } from './phase-colour';
import { trendOption } from './trend-option';
import type { TrendDrawing } from './trend-drawing';
import type { Trend } from './use-trend';

/** A phase that is drawn, and the condition whose colour it may carry. */
export interface DrawnPhase {
  readonly phase: PhaseName;
  readonly condition: Condition;
}

export interface TrendInput {
  readonly settings: readonly SettingsVersion[];
  readonly trend: Trend;
  /** keeps its identity while it says the same, or the drawing is made anew with every snapshot */
  readonly drawn: readonly DrawnPhase[];
  /** the drift to draw; undefined where there is none or several phases are shown */
  readonly creep: Creep | undefined;
  /** keeps its identity while it says the same */
  readonly marks: readonly TrendMark[];
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
  readonly site: SiteCustom;
  readonly ink: ChartInk | undefined;
  readonly faded: boolean;
  readonly narrow: boolean;
}

/** The plot is at least this wide: words that keep apart here keep apart on any wider one. */
const PLOT_PX = 560;
const NARROW_PLOT_PX = 270;

/** The trend's drawing; undefined until the theme's colours are known. */
export function useTrendOption(input: TrendInput) {
  const { settings, trend, drawn, creep, marks, unit, ratingAmps, site, ink, faded, narrow } = input;
  const { window, series, source } = trend;
  return useMemo(() => {
    if (ink === undefined) return undefined;
    const unitAmps = unit === 'amperes' ? 1 : ratingAmps;
    const { timeZone, nearRatio, phaseLetters } = site;
    const pickup = pickupSteps(settings, window, unitAmps);
    const sen = creep === undefined ? [] : senPoints(creep, window, unitAmps);
    const lines = drawn.map(({ phase, condition }) => ({
      phase,
      letter: phaseLetters[phase],
      ...lineLook(ink, { phase, condition, faded, alone: drawn.length === 1 }),
      stretches: shownStretches(series[phase], source, unitAmps),
      bandShown: drawn.length === 1,
    }));
    const told = drawn.map(({ phase }) => ({ letter: phaseLetters[phase], points: series[phase] }));
    return trendOption({
      ink,
      window,
      ticks: timeTicks(window, { timeZone, most: narrow ? 5 : 10 }),
      levelMax: trendLevelMax(
        lines.flatMap((line) => line.stretches),
        pickup,
        sen,
      ),
      lines,
      pickup,
      nearRatio,
      sen,
      changes: placedMarks(marks, window, narrow ? NARROW_PLOT_PX : PLOT_PX),
      levelName: `differential, ${unitWords(unit, ratingAmps)}`,
      levelText: (level) => currentText(level * unitAmps, unit, ratingAmps),
      tooltip: (atMs) => [
        ...trendTooltip(told, atMs, { source, unit, ratingAmps, nowMs: window.toMs, timeZone }),
        ...marksTold(marks, atMs, source),
      ],
    });
  }, [settings, window, series, source, drawn, creep, marks, unit, ratingAmps, site, ink, faded, narrow]);
}

type LineLook = Pick<TrendDrawing['lines'][number], 'colour' | 'dash'>;

/** The state's colour where the phase has earned one. Among others the second stands back and the third is dashed. */
function lineLook(
  ink: ChartInk,
  { phase, condition, faded, alone }: DrawnPhase & { faded: boolean; alone: boolean },
): LineLook {
  const colour = phaseColour(ink, condition, { faded });
  if (alone) return { colour, dash: 'solid' };
  return {
    colour: colour === ink.ink && phase === 'b' ? ink.ink2 : colour,
    dash: phase === 'c' ? 'dashed' : 'solid',
  };
}
