import type { HysteresisDelays } from './hysteresis';

/** When warnings rise and return; the near ratio and the period are the site's settings. */
export interface WarningLimits {
  readonly nearRatio: number;
  /** utilisation has to fall this far below the mark that raised it before a warning returns */
  readonly returnBand: number;
  readonly near: HysteresisDelays;
  readonly over: HysteresisDelays;
  readonly blind: HysteresisDelays;
  /** a line is blind when it could not be evaluated for this long */
  readonly blindAfterMs: number;
}

const PERIODS_MISSED = 3;

export function warningLimits({
  nearRatio,
  periodMs,
  latenessMs,
}: {
  nearRatio: number;
  periodMs: number;
  latenessMs: number;
}): WarningLimits {
  return {
    nearRatio,
    returnBand: 0.05,
    near: { onDelayMs: 60_000, offDelayMs: 60_000 },
    over: { onDelayMs: 0, offDelayMs: 30_000 },
    blind: { onDelayMs: 0, offDelayMs: PERIODS_MISSED * periodMs },
    // what a silence is judged by arrives one period and one lateness after the instant it stands for
    blindAfterMs: PERIODS_MISSED * periodMs + periodMs + latenessMs,
  };
}

/** A step up raises a warning while it is recent, and when it takes a noticeable share of the pickup. */
export const STEP_WARNING = { recentMs: 7 * 86_400_000, leastShareOfPickup: 0.1 } as const;
