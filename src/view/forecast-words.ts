import type { ForecastLine, ForecastWords } from '../contract/forecast-list';
import type { MarginRow, StandingVerdict, StepOnWire } from '../contract/standing';
import { causeName, movedAndStill, movedCauses, TIME_WORDS } from './cause-names';
import { sinceWords } from './composition-words';
import { countedDrift } from './counted-drift';
import { ampsText, dateText, percentText, timeText } from './figures';
import { forecastWords, halfMonthWords, slopeWords } from './forecast';
import { phasePlace, type ForecastSections } from './forecast-list';
import { capital, countWords } from './margin-sentence';
import type { SiteCustom } from './site-custom';

export interface ForecastContext {
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly substations: ForecastLine['substations'];
}

interface FoundPhase {
  readonly verdict: StandingVerdict;
  /** of the drift that counts */
  readonly creepVerdict: MarginRow['creepVerdict'];
}

/** One phase’s findings for a planner, in words. */
export function phaseWords(phase: FoundPhase, context: ForecastContext): ForecastWords {
  const { verdict } = phase;
  return {
    lead: leadWords(phase, context),
    when: whenWords(phase, context),
    why: [stepWords(verdict.step, context), causeMovedWords(verdict, context)].filter(Boolean).join(' '),
  };
}

function leadWords({ verdict, creepVerdict }: FoundPhase, { site }: ForecastContext): string {
  const phase = `Phase ${site.phaseLetters[verdict.phase]}`;
  const creep = creepVerdict === null ? undefined : countedDrift(verdict);
  if (creep !== undefined)
    return `${phase} rises ${slopeWords(creep)}${atReference(verdict)}${sinceWords(verdict, { site })}.`;
  return `${phase} stands at ${percentText(verdict.shareOfPickup)} of the pickup, beyond the near mark.`;
}

const atReference = ({ creepAtReference }: StandingVerdict): string =>
  creepAtReference === null ? '' : ` at a load of ${ampsText(creepAtReference.referenceThroughAmps)}`;

function whenWords(phase: FoundPhase, { site, nowMs }: ForecastContext): string {
  const { verdict } = phase;
  const rises = phase.creepVerdict !== null;
  if (phasePlace(phase, site.nearRatio) !== 'beyond')
    return `Near mark ${verdict.near === null ? 'not within five years' : forecastWords(verdict.near, nowMs)}.`;
  const level = `${ampsText(verdict.levelAmps)} of ${ampsText(verdict.pickupAmps)}`;
  if (!rises) return `${capital(level)}; it does not rise further.`;
  const pickup = verdict.pickup === null ? 'not within five years' : forecastWords(verdict.pickup, nowMs);
  return `It is beyond the near mark, at ${percentText(verdict.shareOfPickup)} of the pickup: ${level}. Pickup ${pickup}.`;
}

/** "Stepped from 12 A to 21 A on 4 Nov 2026, 13:00: angle mismatch; the channel’s path changed at the same time." */
function stepWords(step: StepOnWire | null, { site, substations }: ForecastContext): string | undefined {
  if (step === null) return undefined;
  const at = `${dateText(step.at, site.timeZone)}, ${timeText(step.at, site.timeZone).slice(0, 5)}`;
  const cause =
    step.cause === 'not told' ? 'its cause is not told' : causeName(step.cause, step.place, substations);
  const channel = step.channelPathChanged ? '; the channel’s path changed at the same time' : '';
  return `It stepped from ${ampsText(step.fromAmps)} to ${ampsText(step.toAmps)} on ${at}: ${cause}${channel}.`;
}

/** What moved in 90 days, where both compositions tell; else what is the likely cause alone. */
function causeMovedWords(verdict: StandingVerdict, { substations }: ForecastContext): string {
  const { compositionBefore } = verdict;
  const found = compositionBefore && movedCauses({ ...verdict, compositionBefore }, substations);
  const time = verdict.causeIsTime ? ` The angle is ${TIME_WORDS}.` : '';
  if (!found || found.moved.length === 0) return `${likelyCauseWords(verdict, substations)}${time}`;
  return `${capital(movedAndStill(found.moved, found.still))}.${time}`;
}

function likelyCauseWords(
  { likelyCause, causePlace, composition }: StandingVerdict,
  substations: ForecastContext['substations'],
): string {
  if (likelyCause === 'not told')
    return composition.kind === 'not separable'
      ? `The causes can’t be told apart: ${lowered(composition.reason)}`
      : 'The causes can’t be told apart.';
  return `Likely cause: ${causeName(likelyCause, causePlace, substations)}.`;
}

const lowered = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);

const lines = (count: number): string => `${countWords(count)} ${count === 1 ? 'line' : 'lines'}`;

interface ForecastHeadCounts {
  readonly beyondCount: number;
  readonly comingCount: number;
}

/** The head of the page: how many are beyond, how many are on the way and when the first is there. */
export function forecastSentence(
  { beyondCount, comingCount }: ForecastHeadCounts,
  coming: ForecastSections['coming'],
  nowMs: number,
) {
  return {
    beyond:
      beyondCount === 0
        ? undefined
        : capital(`${lines(beyondCount)} ${beyondCount === 1 ? 'stands' : 'stand'} beyond the near mark`),
    coming: comingCount === 0 ? undefined : capital(comingWords(comingCount, coming, nowMs)),
    rest: beyondCount + comingCount > 0 ? undefined : 'No line is beyond the near mark or on its way there',
  };
}

function comingWords(comingCount: number, coming: ForecastSections['coming'], nowMs: number): string {
  const first = coming
    .flatMap(({ phase }) => phase.verdict.near?.likely ?? [])
    .reduce((one, other) => (other < one ? other : one), '9999');
  const many = `${lines(comingCount)} ${comingCount === 1 ? 'is' : 'are'} on the way there`;
  if (first === '9999') return many;
  return `${many}, ${comingCount === 1 ? 'likely' : 'the first likely'} in ${halfMonthWords(first, nowMs)}`;
}

/** What the list does not show: lines that are steady, not known yet, or left out. */
export function unlistedWords(counts: {
  readonly steadyCount: number;
  readonly unknownCount: number;
  readonly leftOutCount: number;
}): string[] {
  const { steadyCount, unknownCount, leftOutCount } = counts;
  return [
    steadyCount === 0
      ? undefined
      : `${capital(lines(steadyCount))} ${steadyCount === 1 ? 'shows' : 'show'} no significant rise`,
    unknownCount === 0 ? undefined : `of ${lines(unknownCount)} nothing has been computed yet`,
    leftOutCount === 0
      ? undefined
      : `${lines(leftOutCount)} less urgent than these ${leftOutCount === 1 ? 'is' : 'are'} left out here: Margins has all`,
  ].filter((words) => words !== undefined);
}
