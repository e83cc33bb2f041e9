/** A judgement that neither chatters on nor off: it turns only after its condition has lasted. */
export interface Hysteresis {
  readonly active: boolean;
  /** since when the condition to turn has held without a break; undefined while it does not hold */
  readonly turningSinceMs: number | undefined;
}

export const AT_REST: Hysteresis = { active: false, turningSinceMs: undefined };
export const STANDING: Hysteresis = { active: true, turningSinceMs: undefined };

export interface HysteresisDelays {
  readonly onDelayMs: number;
  readonly offDelayMs: number;
}

/** What is seen at an instant: `raise` asks to turn on, `clear` to turn off; between the two nothing changes. */
export interface Sight {
  readonly atMs: number;
  readonly raise: boolean;
  readonly clear: boolean;
}

/** The judgement after one more sight; instants are in ascending order. */
export function stepHysteresis(state: Hysteresis, sight: Sight, delays: HysteresisDelays): Hysteresis {
  const turns = state.active ? sight.clear : sight.raise;
  if (!turns)
    return state.turningSinceMs === undefined ? state : { active: state.active, turningSinceMs: undefined };
  const sinceMs = state.turningSinceMs ?? sight.atMs;
  const delayMs = state.active ? delays.offDelayMs : delays.onDelayMs;
  if (sight.atMs - sinceMs < delayMs) return { active: state.active, turningSinceMs: sinceMs };
  return { active: !state.active, turningSinceMs: undefined };
}
