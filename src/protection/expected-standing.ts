import { apparentDifferentialFactor, timeErrorAngleRad } from './channel';
import type { ClassBudget } from './ct-class';

/** What makes a healthy line carry a differential current. */
export type StandingCause = 'charging' | 'transformers' | 'channel';

/** What is known of a line's causes, for one phase. */
export interface StandingCauses {
  /** the through current that transformer and channel errors act on, amperes rms primary */
  readonly throughAmps: number;
  /** charging current that is left uncompensated, amperes: 0 when it is compensated, undefined when a constant is missing */
  readonly chargingAmps: number | undefined;
  /** undefined when a terminal's class is not known */
  readonly classBudget: ClassBudget | undefined;
  /** undefined where the scheme takes its time from elsewhere and channel delays do not matter to it */
  readonly channel: { readonly timeErrorMs: number | undefined; readonly frequencyHz: number } | undefined;
}

/**
 * The standing differential current to be expected, amperes rms primary. Totals are `undefined` as long as a
 * cause is missing: a sum without it would look like the whole.
 */
export interface ExpectedStanding {
  readonly terms: readonly { readonly cause: StandingCause; readonly amps: number }[];
  readonly missing: readonly StandingCause[];
  /** all causes in phase with each other */
  readonly worstCaseAmps: number | undefined;
  /** the causes as independent of each other */
  readonly rootSumSquareAmps: number | undefined;
  /** the least that must be left: the greater of charging and channel, less all that could oppose it */
  readonly leastAmps: number | undefined;
}

/**
 * Where a measured standing level lies: `above` the worst case, `far below` half of what must be left at the
 * least, which is as suspicious (frozen values, or charging compensated twice), or `within`.
 */
export type StandingJudgement = 'within' | 'above' | 'far below';

/** Below this share of the least to be expected, a standing level is far below it. */
const FAR_BELOW_SHARE = 0.5;

/**
 * The expected standing level of one phase. Charging and channel are known quantities and always there; the
 * transformers' budget is a limit, and what they leave may be anything from nothing up to it.
 */
export function expectedStanding(causes: StandingCauses): ExpectedStanding {
  const amps = causeAmps(causes);
  const terms = amps.flatMap(([cause, value]) => (value === undefined ? [] : [{ cause, amps: value }]));
  const missing = amps.flatMap(([cause, value]) => (value === undefined ? [cause] : []));
  if (missing.length > 0) {
    return {
      terms,
      missing,
      worstCaseAmps: undefined,
      rootSumSquareAmps: undefined,
      leastAmps: undefined,
    };
  }
  const worstCaseAmps = terms.reduce((total, term) => total + term.amps, 0);
  const standing = terms.filter(({ cause }) => cause !== 'transformers').map((term) => term.amps);
  return {
    terms,
    missing,
    worstCaseAmps,
    rootSumSquareAmps: Math.sqrt(terms.reduce((total, term) => total + term.amps ** 2, 0)),
    leastAmps: Math.max(0, 2 * Math.max(...standing) - worstCaseAmps),
  };
}

/** How a measured standing level in amperes lies to the expected one; `undefined` while a cause is missing. */
export function standingJudgement(
  measuredAmps: number,
  { worstCaseAmps, leastAmps }: ExpectedStanding,
): StandingJudgement | undefined {
  if (worstCaseAmps === undefined || leastAmps === undefined) return undefined;
  if (measuredAmps > worstCaseAmps) return 'above';
  return measuredAmps < FAR_BELOW_SHARE * leastAmps ? 'far below' : 'within';
}

function causeAmps({
  throughAmps,
  chargingAmps,
  classBudget,
  channel,
}: StandingCauses): (readonly [StandingCause, number | undefined])[] {
  const transformersAmps = classBudget && classBudget.differentialRatio * throughAmps;
  const known: (readonly [StandingCause, number | undefined])[] = [
    ['charging', chargingAmps],
    ['transformers', transformersAmps],
  ];
  if (channel === undefined) return known;
  const { timeErrorMs, frequencyHz } = channel;
  const ratio =
    timeErrorMs === undefined
      ? undefined
      : apparentDifferentialFactor(timeErrorAngleRad(timeErrorMs, frequencyHz));
  return [...known, ['channel', ratio === undefined ? undefined : ratio * throughAmps]];
}
