import type { ReplayPoint, ReplaySide, ReplaySummary } from '../contract/replay';
import { dateText, durationText, NOT_COMPUTABLE, percentOfMarkText, timeText, zoneText } from './figures';
import { PHASES, type PhaseName } from './phase';
import type { PhaseLetters } from './site-custom';

export interface WorstOfSide {
  readonly phase: PhaseName;
  readonly point: ReplayPoint;
}

/** The phase whose greatest utilisation is the greatest of a side; undefined when nothing was evaluated. */
export function worstOf(side: ReplaySide): WorstOfSide | undefined {
  let worst: WorstOfSide | undefined;
  for (const phase of PHASES) {
    const point = side.phases[phase].greatest;
    if (point !== null && (worst === undefined || point.utilisation > worst.point.utilisation))
      worst = { phase, point };
  }
  return worst;
}

/** "61 %", "7.4 %" below ten; never rounded across the near mark or 100 %. */
export function utilisationText(ratio: number | null | undefined, nearRatio: number): string {
  if (ratio === null || ratio === undefined || !Number.isFinite(ratio)) return NOT_COMPUTABLE;
  if (ratio < 0.0995) return `${(ratio * 100).toFixed(1)}\u00a0%`;
  return ratio < nearRatio ? percentOfMarkText(ratio, nearRatio) : percentOfMarkText(ratio);
}

export type MarkState = 'settled' | 'near' | 'over';
export const utilisationState = (ratio: number, nearRatio: number): MarkState =>
  ratio >= 1 ? 'over' : ratio >= nearRatio ? 'near' : 'settled';

/** The answer in a sentence. */
export function resultSentence(summary: ReplaySummary, letters: PhaseLetters): string {
  const { recorded, replayed, nearRatio, snapshots } = summary;
  if (snapshots === 0) return 'Nothing is stored of this line in this period, so there is nothing to replay.';
  const tried = worstOf(replayed);
  if (tried === undefined)
    return `None of the ${countText(snapshots)} could be evaluated under these settings.`;
  const was = worstOf(recorded);
  const hasThresholds = [tried, was].every((side) => side === undefined || side.point.thresholdAmps !== null);
  const reached = utilisationText(tried.point.utilisation, nearRatio);
  const lead = hasThresholds
    ? `With these settings phase ${letters[tried.phase]} would have reached at most ${reached} of the threshold`
    : `With these settings phase ${letters[tried.phase]} would have reached a utilisation of at most ${reached}`;
  if (was === undefined) return `${lead}; with the recorded ones nothing could be evaluated.`;
  const before = utilisationText(was.point.utilisation, nearRatio);
  return was.phase === tried.phase
    ? `${lead}; with the recorded ones ${before}.`
    : `${lead}; with the recorded ones the greatest was ${before}, of phase ${letters[was.phase]}.`;
}

/** What a mark that was reached means; undefined when none was. */
export function markSentence({ replayed, nearRatio }: ReplaySummary): string | undefined {
  const worst = worstOf(replayed);
  if (worst === undefined) return undefined;
  const state = utilisationState(worst.point.utilisation, nearRatio);
  if (state === 'settled') return undefined;
  const { over, near } = replayed.phases[worst.phase];
  return state === 'over'
    ? `At or above 100 % a scheme operates: ${countText(over.snapshots)}, ${durationText(over.durationMs)} of that phase.`
    : `At or above the near mark of ${percentOfMarkText(nearRatio)}: ${countText(near.snapshots)}, ${durationText(near.durationMs)} of that phase.`;
}

export const countText = (count: number): string =>
  `${count.toLocaleString('en-GB', { useGrouping: 'min2' })} ${count === 1 ? 'snapshot' : 'snapshots'}`;

export const momentText = (instant: string | number, timeZone: string): string =>
  `${dateText(instant, timeZone)}, ${timeText(instant, timeZone)}`;

/** "24 Nov 2026, 10:00 to 1 Dec 2026, 10:00 CET" */
export function periodText({ from, to }: Pick<ReplaySummary, 'from' | 'to'>, timeZone: string): string {
  const minute = (instant: string) => momentText(instant, timeZone).slice(0, -3);
  return `${minute(from)} to ${minute(to)} ${zoneText(to, timeZone)}`;
}

/** What was looked at, and what could not be: whole sentences. */
export function coverageSentences(summary: ReplaySummary): string[] {
  const { snapshots, underTest, recorded, replayed } = summary;
  if (snapshots === 0) return [];
  const sentences = [evaluatedSentence(summary)];
  const same = JSON.stringify(recorded.notComputable) === JSON.stringify(replayed.notComputable);
  if (same) sentences.push(...reasonsSentence('Not computable', replayed));
  else
    sentences.push(
      ...reasonsSentence('Not computable with these settings', replayed),
      ...reasonsSentence('Not computable with the recorded ones', recorded),
    );
  if (underTest > 0) sentences.push(`Set aside, since a terminal was under test: ${countText(underTest)}.`);
  sentences.push(
    ...fallbackSentence('With these settings', replayed),
    ...fallbackSentence('With the recorded ones', recorded),
  );
  return sentences;
}

function evaluatedSentence({ snapshots, recorded, replayed }: ReplaySummary): string {
  const figure = (count: number) => count.toLocaleString('en-GB', { useGrouping: 'min2' });
  if (recorded.evaluated !== replayed.evaluated)
    return `Of ${countText(snapshots)}, ${figure(replayed.evaluated)} were evaluated with these settings and ${figure(recorded.evaluated)} with the recorded ones.`;
  return replayed.evaluated === snapshots
    ? `${countText(snapshots)}, all evaluated.`
    : `Of ${countText(snapshots)}, ${figure(replayed.evaluated)} were evaluated.`;
}

const REASONS_SHOWN = 4;

function reasonsSentence(lead: string, { notComputable }: ReplaySide): string[] {
  if (notComputable.length === 0) return [];
  const shown = notComputable
    .slice(0, REASONS_SHOWN)
    .map(({ reason, snapshots }) => `${reason.replace(/\.$/, '')} (${countText(snapshots)})`);
  const rest = notComputable.slice(REASONS_SHOWN).reduce((total, { snapshots }) => total + snapshots, 0);
  return [`${lead}: ${[...shown, ...(rest > 0 ? [`other reasons (${countText(rest)})`] : [])].join('; ')}.`];
}

const fallbackSentence = (lead: string, { compensationFellBack }: ReplaySide): string[] =>
  compensationFellBack === 0
    ? []
    : [
        `${lead}, the charging current stayed in for want of valid voltages in ${countText(compensationFellBack)}.`,
      ];
