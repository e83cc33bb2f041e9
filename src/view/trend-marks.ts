import type { SettingsVersion } from '../contract/settings-version';
import type { StandingMark, StepOnWire } from '../contract/standing';
import { placedLabels } from './scale-labels';
import type { LabelAnchor } from './scale-labels';
import type { TrendWindow } from './trend-span';

/** An instant at which something is known to have changed, marked on the trend. */
export interface TrendMark {
  readonly kind: 'step' | 'settings' | 'mark';
  readonly atMs: number;
  readonly words: string;
}

/** A mark with the place of its words above the plot: row 0 is the lowest. */
export interface PlacedMark extends TrendMark {
  readonly anchor: LabelAnchor;
  readonly row: number;
}

/** Words of the marks that neither the steps nor the settings bring along. */
const MARK_WORDS: Readonly<Partial<Record<StandingMark['kind'], string>>> = {
  'work recorded': 'work',
  'channel path changed': 'channel path',
  'terminals changed': 'terminals',
};

/**
 * Steps, every change of the recorded settings, and the other marks that part the history, inside the window. The first
 * version changes nothing; a mark that several phases have stands once.
 */
export function trendMarks(
  {
    steps,
    settings,
    others,
  }: {
    steps: readonly { readonly step: StepOnWire; readonly words: string }[];
    settings: readonly SettingsVersion[];
    others: readonly StandingMark[];
  },
  { fromMs, toMs }: TrendWindow,
): TrendMark[] {
  const changes = settings
    .map(({ validFrom }) => Date.parse(validFrom))
    .sort((one, other) => one - other)
    .slice(1);
  const marks: TrendMark[] = [
    ...steps.map(({ step, words }) => ({ kind: 'step' as const, atMs: Date.parse(step.at), words })),
    ...changes.map((atMs) => ({ kind: 'settings' as const, atMs, words: 'settings' })),
    ...otherMarks(others),
  ];
  return marks.filter(({ atMs }) => atMs >= fromMs && atMs <= toMs);
}

function otherMarks(others: readonly StandingMark[]): TrendMark[] {
  const byDay = new Map(others.map(({ on, kind }) => [`${on} ${kind}`, { on, words: MARK_WORDS[kind] }]));
  return [...byDay.values()].flatMap(({ on, words }) =>
    words === undefined ? [] : [{ kind: 'mark' as const, atMs: Date.parse(`${on}T12:00:00Z`), words }],
  );
}

/** The marks with their words in as few rows as keep them apart, at this width of the plot and any greater one. */
export function placedMarks(
  marks: readonly TrendMark[],
  { fromMs, toMs }: TrendWindow,
  widthPx: number,
): PlacedMark[] {
  const labels = marks.map(({ atMs, words }) => ({
    words,
    at: (atMs - fromMs) / (toMs - fromMs),
    anchors: ['start', 'end'] as const,
  }));
  const places = placedLabels(labels, widthPx);
  return marks.map((mark, index) => ({
    ...mark,
    anchor: places[index]!.anchor,
    row: places[index]!.row,
  }));
}

const DAY_MS = 86_400_000;

/** Whether a trend over so many daily levels, which end now, reaches back beyond the step. */
export function fittedAcross(step: StepOnWire | null, days: number, nowMs: number): boolean {
  return step !== null && (nowMs - Date.parse(step.at)) / DAY_MS + 1 < days;
}
