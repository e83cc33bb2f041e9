import { creepVerdict, daysNeededOf, pOfRise } from './creep';
import type { CreepLimits, CreepVerdict, DailyLevel } from './creep';
import { mannKendall } from './mann-kendall';

/** What the levels are watched for, and the steps that are known of. */
export interface CreepWatchPlan extends CreepLimits {
  /**
   * Days since the epoch on which settings, the channel path or the plant were changed, or on which a step was
   * found. The day itself is half before and half after, and belongs to neither side.
   */
  readonly markDays: readonly number[];
  /** Spans before the last day that are searched for a drift, days; 30, 60, 120 and 365 unless given. */
  readonly spansDays?: readonly number[];
}

/** A verdict with what of the history it was taken from. */
export interface WatchedCreep {
  readonly verdict: CreepVerdict;
  /** First and last day of the levels it was taken from; `undefined` for no levels. */
  readonly fromDay: number | undefined;
  readonly toDay: number | undefined;
  /** The last known step, where the levels begin after it: nothing before it is in the verdict. */
  readonly markDay: number | undefined;
}

const SPANS_DAYS: readonly number[] = [30, 60, 120, 365];

/**
 * A drift is asked for every day, in every span. Of 365 answers a year some are extreme by chance; this is the
 * two-sided probability below which a single one counts.
 */
const P_OF_ONE_LOOK = 2e-5;

/**
 * Whether the daily levels of one phase creep, looked at day after day. The levels since the last known step are
 * searched over spans of several lengths: a drift that began last month is a small part of a year, and one that is
 * slow hides in the noise of a month. Of the spans with a significant rise the one with the least p gives the
 * verdict; with none, the longest does. A trend is never fitted across a known step.
 */
export function watchedCreep(levels: readonly DailyLevel[], plan: CreepWatchPlan): WatchedCreep {
  const { levels: since, markDay } = levelsSinceMark(levels, plan.markDays);
  const limits = { ...plan, pMost: plan.pMost ?? P_OF_ONE_LOOK };
  return surestRise(since, { ...limits, markDay }) ?? watched(since, { limits, markDay });
}

/**
 * The rise of the levels that is surest over all spans, as `watchedCreep` has it; `undefined` for no significant
 * one. Cheap where nothing rises, so that a fleet can be searched.
 */
export function surestRise(
  levels: readonly DailyLevel[],
  plan: Omit<CreepWatchPlan, 'markDays'> & { readonly markDay: number | undefined },
): WatchedCreep | undefined {
  const limits = { ...plan, pMost: plan.pMost ?? P_OF_ONE_LOOK };
  let surest: { span: readonly DailyLevel[]; p: number } | undefined;
  for (const span of spansOf(levels, plan.spansDays ?? SPANS_DAYS)) {
    if (span.length < daysNeededOf(limits) || !mayRise(span, limits.pMost)) continue;
    const p = pOfRise(span);
    if (p !== undefined && p < (surest?.p ?? limits.pMost)) surest = { span, p };
  }
  const found = surest && watched(surest.span, { limits, markDay: plan.markDay });
  return found?.verdict.kind === 'creep' || found?.verdict.kind === 'within margin' ? found : undefined;
}

function watched(
  span: readonly DailyLevel[],
  { limits, markDay }: { limits: CreepLimits; markDay: number | undefined },
): WatchedCreep {
  return {
    verdict: creepVerdict(span, limits),
    fromDay: span[0]?.day,
    toDay: span.at(-1)?.day,
    markDay,
  };
}

/** Every allowance for autocorrelation only raises the plain p, so that what fails by it need not be looked at. */
function mayRise(levels: readonly DailyLevel[], pMost: number): boolean {
  const plain = mannKendall(levels.map(({ levelAmps }) => levelAmps));
  return plain !== undefined && plain.s > 0 && plain.pTwoSided < pMost;
}

/** The levels after the last known step that has levels on both sides, and the day of that step. */
export function levelsSinceMark(
  levels: readonly DailyLevel[],
  markDays: readonly number[],
): { readonly levels: readonly DailyLevel[]; readonly markDay: number | undefined } {
  const [first, last] = [levels[0], levels.at(-1)];
  if (first === undefined || last === undefined) return { levels, markDay: undefined };
  const within = markDays.filter((day) => day >= first.day && day <= last.day);
  if (within.length === 0) return { levels, markDay: undefined };
  const markDay = Math.max(...within);
  return { levels: levels.filter(({ day }) => day > markDay), markDay };
}

/** The levels of each span before the last day, the longest first; spans that reach further than the levels once. */
function spansOf(levels: readonly DailyLevel[], spansDays: readonly number[]): (readonly DailyLevel[])[] {
  const last = levels.at(-1);
  if (last === undefined) return [];
  const spans = new Map<number, readonly DailyLevel[]>();
  for (const days of [...spansDays].sort((a, b) => b - a)) {
    const from = levels.findIndex(({ day }) => day > last.day - days);
    if (!spans.has(from)) spans.set(from, levels.slice(from));
  }
  return [...spans.values()];
}
