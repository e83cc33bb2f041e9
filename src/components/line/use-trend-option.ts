import { useMemo } from 'react';
import type { LineSummary } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import type { Creep } from '../../contract/warning';
import { currentText } from '../../view/line-figures';
import { unitWords } from '../../view/line-unit';
import type { CurrentUnit } from '../../view/line-unit';
import type { PhaseName } from '../../view/phase';
import { phaseCondition } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import { pickupSteps } from '../../view/trend-pickup';
import { senPoints } from '../../view/trend-sen';
import { shownStretches, trendLevelMax } from '../../view/trend-shape';
import { timeTicks } from '../../view/trend-ticks';
import { trendTooltip } from '../../view/trend-words';
import type { ChartInk } from '../charts/chart-ink';
import { phaseColour } from './phase-colour';
import { trendOption } from './trend-option';
import type { Trend } from './use-trend';

export interface TrendOptionInput {
  readonly line: LineSummary;
  readonly settings: readonly SettingsVersion[];
  readonly trend: Trend;
  readonly phases: readonly PhaseName[];
  /** the drift to draw; undefined where there is none or several phases are shown */
  readonly creep: Creep | undefined;
  readonly unit: CurrentUnit;
  readonly site: SiteCustom;
  readonly ink: ChartInk | undefined;
  readonly faded: boolean;
  readonly narrow: boolean;
}

/** The trend's drawing; undefined until the theme's colours are known. */
export function useTrendOption(input: TrendOptionInput) {
  const { line, settings, trend, phases, creep, unit, site, ink, faded, narrow } = input;
  return useMemo(() => {
    if (ink === undefined) return undefined;
    const unitAmps = unit === 'amperes' ? 1 : line.ratingAmps;
    const pickup = pickupSteps(settings, trend.window).map((step) => ({
      ...step,
      pickupAmps: step.pickupAmps / unitAmps,
    }));
    const sen =
      creep === undefined
        ? []
        : senPoints(creep, trend.window).map((point) => ({
            atMs: point.atMs,
            levelAmps: point.levelAmps / unitAmps,
            lowAmps: point.lowAmps / unitAmps,
            highAmps: point.highAmps / unitAmps,
          }));
    const lines = phases.map((phase, index) => ({
      phase,
      letter: site.phaseLetters[phase],
      colour: lineColour(ink, input, phase),
      dash: index === 2 ? ('dashed' as const) : ('solid' as const),
      stretches: shownStretches(trend.series[phase], trend.source, unitAmps),
      bandShown: phases.length === 1,
    }));
    const { timeZone, nearRatio } = site;
    const told = phases.map((phase) => ({ letter: site.phaseLetters[phase], points: trend.series[phase] }));
    return trendOption({
      ink,
      window: trend.window,
      ticks: timeTicks(trend.window, { timeZone, most: narrow ? 5 : 10 }),
      levelMax: trendLevelMax(
        lines.flatMap((each) => each.stretches),
        pickup,
        sen,
      ),
      lines,
      pickup,
      nearRatio,
      sen,
      levelName: `differential, ${unitWords(unit, line.ratingAmps)}`,
      levelText: (level) => currentText(level * unitAmps, unit, line.ratingAmps),
      tooltip: (atMs) =>
        trendTooltip(told, atMs, {
          source: trend.source,
          unit,
          ratingAmps: line.ratingAmps,
          nowMs: trend.window.toMs,
          timeZone,
        }),
    });
    // `input` itself is new each time; its parts below are what the drawing depends on.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [
    line,
    settings,
    trend.window,
    trend.series,
    trend.source,
    phases,
    creep,
    unit,
    site,
    ink,
    faded,
    narrow,
  ]);
}

/** The state's colour where the phase has earned one. Alone it is ink; among others the second stands back. */
function lineColour(
  ink: ChartInk,
  { line, phases, site, faded }: TrendOptionInput,
  phase: PhaseName,
): string {
  const colour = phaseColour(ink, phaseCondition(line, phase, site.nearRatio), { faded });
  return phases.length > 1 && colour === ink.ink && phase === 'b' ? ink.ink2 : colour;
}
