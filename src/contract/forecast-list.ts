import type { LineSummary } from './lines';
import type { FollowUp, MarginRow, StandingVerdict } from './standing';

/** One phase whose standing level rises, or stands beyond the near mark already. */
export interface ForecastPhase {
  readonly verdict: StandingVerdict;
  /** of the drift that counts; null where the level stands beyond the mark and does not rise */
  readonly creepVerdict: MarginRow['creepVerdict'];
  /** daily standing levels of this phase, oldest first; null for days without */
  readonly dailyLevels: readonly { readonly day: string; readonly levelAmps: number | null }[];
}

export interface ForecastLine {
  readonly key: string;
  readonly name: string;
  readonly voltageKv: number;
  readonly substations: LineSummary['substations'];
  readonly phases: readonly ForecastPhase[];
}

/** What the Forecast page stands on. */
export interface ForecastList {
  readonly at: string;
  readonly lines: readonly ForecastLine[];
  /** lines with findings of which no phase rises */
  readonly steadyCount: number;
  /** lines in service of which nothing has been computed yet */
  readonly unknownCount: number;
  /** lines that the list leaves out because it holds no more; the most urgent ones are there */
  readonly leftOutCount: number;
  readonly followUps: readonly FollowUp[];
}
