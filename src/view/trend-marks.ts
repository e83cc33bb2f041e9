import type { SettingsVersion } from '../contract/settings-version';
import type { StandingMark, StepOnWire } from '../contract/standing';
import type { Work } from '../contract/works';
import { comparedDay } from './line-comparison';
import { placedLabels } from './scale-labels';
import type { LabelAnchor } from './scale-labels';
import { RUNG_MS } from './trend-points';
import type { TrendSource, TrendWindow } from './trend-span';
import { doneWorkWords, type NamedTerminals } from './work-words';

/** An instant at which something is known to have changed, marked on the trend. */
export interface TrendMark {
  readonly kind: 'step' | 'settings' | 'work' | 'mark';
  readonly atMs: number;
  /** beside the mark, where there is little room */
  readonly words: string;
  /** all there is to say of it */
  readonly told: string;
}

/** A mark with the place of its words above the plot: row 0 is the lowest. */
export interface PlacedMark extends TrendMark {
  readonly anchor: LabelAnchor;
  readonly row: number;
}

/** Words of the marks that neither the steps nor the settings nor the works bring along. */
const MARK_WORDS: Readonly<Partial<Record<StandingMark['kind'], string>>> = {
  'channel path changed': 'channel path',
  'terminals changed': 'terminals',
};

interface Marked {
  readonly steps: readonly { readonly step: StepOnWire; readonly words: string }[];
  readonly settings: readonly SettingsVersion[];
  /** as they are recorded now: those among the others are as old as the last look */
  readonly works: readonly Pick<Work, 'doneOn' | 'terminal' | 'what'>[];
  readonly terminals: NamedTerminals;
  readonly others: readonly StandingMark[];
}

const DAY_MS = 86_400_000;
/** Work is known by its day: in a shorter window a mark would say an hour that nobody knows. */
const WORK_WINDOW_DAYS = 2;

/**
 * Steps, every change of the recorded settings, recorded works, and the other marks that part the history, inside the
 * window. The first version changes nothing; a mark that several phases have stands once.
 */
export function trendMarks(
  { steps, settings, works, terminals, others }: Marked,
  { fromMs, toMs }: TrendWindow,
): TrendMark[] {
  const changes = settings
    .map(({ validFrom }) => Date.parse(validFrom))
    .sort((one, other) => one - other)
    .slice(1);
  const marks: TrendMark[] = [
    ...steps.map(({ step, words }) => ({
      kind: 'step' as const,
      atMs: Date.parse(step.at),
      words,
      told: words,
    })),
    ...changes.map((atMs) => ({
      kind: 'settings' as const,
      atMs,
      words: 'settings',
      told: 'settings changed',
    })),
    ...(toMs - fromMs < WORK_WINDOW_DAYS * DAY_MS ? [] : works).map((work) => ({
      kind: 'work' as const,
      atMs: middleOf(work.doneOn),
      words: 'work',
      told: doneWorkWords(work, terminals),
    })),
    ...otherMarks(others),
  ];
  return marks.filter(({ atMs }) => atMs >= fromMs && atMs <= toMs);
}

function otherMarks(others: readonly StandingMark[]): TrendMark[] {
  const byDay = new Map(others.map(({ on, kind }) => [`${on} ${kind}`, { on, kind }]));
  return [...byDay.values()].flatMap(({ on, kind }) => {
    const words = MARK_WORDS[kind];
    return words === undefined ? [] : [{ kind: 'mark' as const, atMs: middleOf(on), words, told: kind }];
  });
}

/** A day of UTC is marked where its level is drawn. */
const middleOf = (day: string): number => Date.parse(`${day}T12:00:00Z`);

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

const TOLD_CHARACTERS_MOST = 80;

/** What the marks within an hour or a day of rows say, cut to a line each; nothing between snapshots. */
export function marksTold(marks: readonly TrendMark[], atMs: number, source: TrendSource): string[] {
  if (source === 'snapshots') return [];
  const rowMs = RUNG_MS[source];
  return marks
    .filter((mark) => Math.floor(mark.atMs / rowMs) === Math.floor(atMs / rowMs))
    .map(({ told }) =>
      told.length <= TOLD_CHARACTERS_MOST ? told : `${told.slice(0, TOLD_CHARACTERS_MOST - 1)}…`,
    );
}

/** The day on which to compare before with after: the site's of an instant, and a mark's own where it is a day. */
export const markDay = ({ kind, atMs }: TrendMark, timeZone: string): string =>
  kind === 'work' || kind === 'mark'
    ? new Date(atMs).toISOString().slice(0, 10)
    : comparedDay(new Date(atMs).toISOString(), timeZone);

/** Whether a trend over so many daily levels, which end now, reaches back beyond the step. */
export function fittedAcross(step: StepOnWire | null, days: number, nowMs: number): boolean {
  return step !== null && (nowMs - Date.parse(step.at)) / DAY_MS + 1 < days;
}
