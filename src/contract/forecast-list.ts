import type { FollowUpInFull } from './follow-ups';
import type { LineSummary } from './lines';
import type { MarginRow, StandingVerdict } from './standing';

/** Levels day by day from a first day on; null for days without. Short, since a page carries hundreds of these. */
export interface ForecastHistory {
  readonly from: string;
  readonly levelsAmps: readonly (number | null)[];
}

/** What a list is drawn and sorted by; the rest of the findings is told in words. */
export type ForecastVerdict = Pick<
  StandingVerdict,
  'phase' | 'pickupAmps' | 'shareOfPickup' | 'likelyCause' | 'near' | 'pickup'
>;

/** What a planner needs of one phase: how it rises, when it gets there, and what has moved. */
export interface ForecastWords {
  readonly lead: string;
  readonly when: string;
  /** empty where there is nothing to say of the causes */
  readonly why: string;
}

/** One phase whose standing level rises, or stands beyond the near mark already. */
export interface ForecastPhase {
  readonly verdict: ForecastVerdict;
  readonly words: ForecastWords;
  /** of the drift that counts; null where the level stands beyond the mark and does not rise */
  readonly creepVerdict: MarginRow['creepVerdict'];
  /** daily standing levels of this phase; undefined when there are none */
  readonly history: ForecastHistory | undefined;
}

export interface ForecastLine {
  readonly key: string;
  readonly name: string;
  /** null when not recorded */
  readonly owner: string | null;
  readonly voltageKv: number;
  readonly substations: LineSummary['substations'];
  readonly phases: readonly ForecastPhase[];
}

/** What the Forecast page stands on. */
export interface ForecastList {
  readonly at: string;
  readonly lines: readonly ForecastLine[];
  /** lines beyond the near mark, and lines on their way to it, also those left out below */
  readonly beyondCount: number;
  readonly comingCount: number;
  /** lines with findings of which no phase rises */
  readonly steadyCount: number;
  /** lines in service of which nothing has been computed yet */
  readonly unknownCount: number;
  /** lines that the list leaves out because it holds no more; the most urgent ones are there */
  readonly leftOutCount: number;
  /** the open ones, the one due first first */
  readonly followUps: readonly FollowUpInFull[];
  /** the ones done last, newest first */
  readonly doneFollowUps: readonly FollowUpInFull[];
}
