import type { CompositionOnWire, EstimateOnWire } from '../contract/composition';
import type { LineSummary } from '../contract/lines';
import type { StandingMark, StandingVerdict, StepOnWire } from '../contract/standing';
import type { Creep, ForecastDatesOnWire } from '../contract/warning';
import { causeName, movedAndStill, movedCauses, TIME_WORDS } from './cause-names';
import { dateText, percentText, timeText } from './figures';
import { MONTHS } from './forecast';
import { currentText } from './line-figures';
import { inUnit, unitSign } from './line-unit';
import type { CurrentUnit } from './line-unit';
import type { SiteCustom } from './site-custom';

export type SeparatedOnWire = Extract<CompositionOnWire, { kind: 'separated' }>;
export type MismatchOnWire = SeparatedOnWire['mismatches'][number];

/** What the sentences about a standing level are written with. */
export interface StandingWordsContext {
  readonly unit: CurrentUnit;
  readonly ratingAmps: number;
  readonly substations: LineSummary['substations'];
  readonly site: SiteCustom;
  readonly nowMs: number;
}

type AmpsContext = Pick<StandingWordsContext, 'unit' | 'ratingAmps'>;

/** Where a mismatch stands against the class limits of both transformers together. */
export function budgetWords(verdict: MismatchOnWire['ratioBudget']): string {
  switch (verdict) {
    case 'within':
      return 'within the class budget';
    case 'beyond':
      return 'beyond the class budget';
    case 'undecided':
      return 'on either side of the class budget, undecided';
    case null:
      return 'no class to hold it against';
  }
}

/** A current with a tenth, as a composition needs it: "14.0 A", "104 A", "0.021 pu". */
export function tenthsText(amps: number, { unit, ratingAmps }: AmpsContext): string {
  if (unit === 'per unit' || !Number.isFinite(amps)) return currentText(amps, unit, ratingAmps);
  return `${signed(amps.toFixed(Math.abs(amps) < 99.95 ? 1 : 0))}\u00a0A`;
}

/** "13.2 to 14.8": the limits of an interval, with so many decimals; their unit stands with the value. */
export function intervalText({ low, high }: EstimateOnWire, digits: number): string {
  return `${signed(low.toFixed(digits))} to ${signed(high.toFixed(digits))}`;
}

/** A hyphen is too short for a minus, and a zero has no sign. */
const signed = (figure: string): string =>
  Number(figure) === 0 ? figure.replace('-', '') : figure.replace('-', '−');

/**
 * A step as a sentence: "On 22 Nov 2026 at 14:00 the level stepped from 28 to 60 A; the angle mismatch of Low
 * Pell moved, and the channel’s path changed at the same time."
 */
export function stepWords(step: StepOnWire, context: StandingWordsContext): string {
  const { timeZone } = context.site;
  const when = `On ${dateText(step.at, timeZone)} at ${timeText(step.at, timeZone).slice(0, 5)}`;
  const path = step.channelPathChanged
    ? ', and the channel’s path changed at the same time: that points to the channel'
    : '';
  return `${when} the level stepped from ${stepSizeWords(step, context)}; ${movedWords(step, context)}${path}.`;
}

/** "28 to 60 A" */
export function stepSizeWords({ fromAmps, toAmps }: StepOnWire, { unit, ratingAmps }: AmpsContext): string {
  const from = currentText(fromAmps, unit, ratingAmps).replace(/\s(A|pu)$/, '');
  return `${from} to ${currentText(toAmps, unit, ratingAmps)}`;
}

function movedWords({ cause, place, isTime }: StepOnWire, { substations }: StandingWordsContext): string {
  switch (cause) {
    case 'charging':
    case 'ratio mismatch':
    case 'angle mismatch':
      return `the ${causeName(cause, place, substations)} moved${isTime ? `, ${TIME_WORDS}` : ''}`;
    case 'rest':
      return 'what moved follows neither voltage nor load';
    case 'not told':
      return 'which cause moved can’t be told';
  }
}

/**
 * What a planner needs of a drift, in a sentence; undefined where no drift is significant. The drift at one and the
 * same load goes first, since load cycle and season are not in it.
 */
export function driftWords(verdict: StandingVerdict, context: StandingWordsContext): string | undefined {
  const { creep: drift, atReference } = driftOf(verdict);
  if (drift === undefined) return undefined;
  const letter = context.site.phaseLetters[verdict.phase];
  const load = atReference
    ? ` at one and the same load (${currentText(verdict.creepAtReference!.referenceThroughAmps, context.unit, context.ratingAmps)} through)`
    : measuredWords(verdict);
  const parts = [
    `Phase ${letter} ${slopeWords(drift, context)}${load}${sinceWords(verdict, context)}`,
    forecastPart(verdict, drift, context),
    causePart(verdict, context),
  ];
  return `${parts.filter((part) => part !== undefined).join('; ')}.`;
}

/** Where the load could be taken out and left no drift, or has changed as well, what was measured is no drift of its own. */
function measuredWords({ loadTakenOutBy, measuredCounts }: StandingVerdict): string {
  const measured = ' as measured, load included';
  if (loadTakenOutBy !== null) return `${measured}: none of it is left at one and the same load`;
  return measuredCounts ? measured : `${measured}: the load has changed as well, so it raises no warning`;
}

function driftOf({ creep, creepAtReference }: StandingVerdict): {
  creep: Creep | undefined;
  atReference: boolean;
} {
  if (creepAtReference !== null) return { creep: creepAtReference.creep, atReference: true };
  return { creep: creep ?? undefined, atReference: false };
}

/** "rises 0.9 A a month, 95 % between 0.6 and 1.2" */
function slopeWords(drift: Creep, { unit, ratingAmps }: AmpsContext): string {
  const digits = unit === 'amperes' ? 1 : 4;
  const falls = drift.slopeAmpsPerMonth < 0;
  const figure = (amps: number) => signed((inUnit(amps, unit, ratingAmps) ?? 0).toFixed(digits));
  const limits = [drift.slopeLowAmpsPerMonth, drift.slopeHighAmpsPerMonth].map((slope) =>
    falls ? -slope : slope,
  );
  return (
    `${falls ? 'falls' : 'rises'} ${figure(Math.abs(drift.slopeAmpsPerMonth))} ${unitSign(unit)} a month, ` +
    `95 % between ${figure(Math.min(...limits))} and ${figure(Math.max(...limits))}`
  );
}

function forecastPart(
  verdict: StandingVerdict,
  drift: Creep,
  { site, nowMs }: StandingWordsContext,
): string | undefined {
  if (drift.slopeAmpsPerMonth <= 0) return undefined;
  const isPast = verdict.shareOfPickup !== null && verdict.shareOfPickup >= site.nearRatio;
  if (isPast) return `past the near mark, pickup ${monthsWords(verdict.pickup ?? drift.pickup, nowMs)}`;
  return `near mark ${monthsWords(verdict.near ?? drift.near, nowMs)}`;
}

/** "in March to June", "in December to March 2028", "from March on", "not within five years"; another year is named. */
export function monthsWords({ earliest, latest }: ForecastDatesOnWire, nowMs: number): string {
  if (earliest === null) return 'not within five years';
  const from = monthOf(earliest);
  if (latest === null) return `from ${from.month}${yearWords(from.year, nowMs)} on`;
  const to = monthOf(latest);
  if (from.year === to.year) {
    const months = from.month === to.month ? from.month : `${from.month} to ${to.month}`;
    return `in ${months}${yearWords(from.year, nowMs)}`;
  }
  return `in ${from.month}${yearWords(from.year, nowMs)} to ${to.month}${yearWords(to.year, nowMs)}`;
}

function monthOf(day: string): { year: number; month: string } {
  const [year = 0, month = 1] = day.split('-').map(Number);
  return { year, month: MONTHS[month - 1] ?? '' };
}

const yearWords = (year: number, nowMs: number): string =>
  year === new Date(nowMs).getUTCFullYear() ? '' : ` ${year}`;

function causePart(verdict: StandingVerdict, { substations }: StandingWordsContext): string {
  const { compositionBefore, likelyCause, causePlace, causeIsTime } = verdict;
  const time = causeIsTime ? `; ${TIME_WORDS}` : '';
  const likely =
    likelyCause === 'not told'
      ? 'which cause moves can’t be told'
      : `likely ${causeName(likelyCause, causePlace, substations)}${time}`;
  if (compositionBefore === null) return likely;
  const found = movedCauses({ ...verdict, compositionBefore }, substations);
  if (found === undefined) return likely;
  const { moved, still } = found;
  if (moved.length === 0) return `${likely}; no cause has moved beyond its interval in 90 days`;
  return `${movedAndStill(moved, still)}${time}`;
}

/**
 * Where utilisation at emergency rating is going, in a sentence: a level that is harmless at the load of every day may
 * not be at that of an emergency. Undefined where it does not rise.
 */
export function emergencyWords(verdict: StandingVerdict, context: StandingWordsContext): string | undefined {
  const { emergencyCreep: creep } = verdict;
  if (creep === null) return undefined;
  const points = (ratio: number) => signed((100 * ratio).toFixed(1));
  const slope = `${points(creep.slopePerMonth)} points a month, 95 % between ${points(creep.slopeLowPerMonth)} and ${points(creep.slopeHighPerMonth)}`;
  const isPast = creep.utilisationNow >= context.site.nearRatio;
  const when = isPast
    ? `past the near mark, the threshold ${monthsWords(creep.over, context.nowMs)}`
    : `near mark ${monthsWords(creep.near, context.nowMs)}`;
  const letter = context.site.phaseLetters[verdict.phase];
  return `Phase ${letter} would stand at ${percentText(creep.utilisationNow)} of its threshold at emergency rating, rising ${slope}; ${when}.`;
}

/** "since the settings change of 12 Oct 2026": what a drift is taken since, where a mark parts the history. */
export function sinceWords(
  { driftSince }: StandingVerdict,
  { site }: Pick<StandingWordsContext, 'site'>,
): string {
  if (driftSince === null) return '';
  return ` since ${MARK_NAMES[driftSince.kind]} of ${dateText(`${driftSince.on}T12:00:00Z`, site.timeZone)}`;
}

const MARK_NAMES: Readonly<Record<StandingMark['kind'], string>> = {
  'settings changed': 'the settings change',
  'channel path changed': 'the channel’s change of path',
  'work recorded': 'the work',
  'terminals changed': 'the change of terminals',
  step: 'the step',
};
