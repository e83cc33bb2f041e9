import type { Condition } from '../contract/condition';
import type { WarningKind } from '../contract/warning';

/** What is known of a line when its condition is asked for. */
export interface Sighting {
  /** kinds of the warnings that stand */
  readonly standing: ReadonlySet<WarningKind>;
  /** the register or the arithmetic cannot judge this line at all: no settings, or a zone not evaluated yet */
  readonly notEvaluated: boolean;
  /** taken out of service in the register, or every breaker open */
  readonly outOfService: boolean;
}

/**
 * A line's condition. Over and near come before blind only while the line is seen: a line that cannot be seen is
 * blind, whatever was last known of it.
 */
export function lineCondition({ standing, notEvaluated, outOfService }: Sighting): Condition {
  if (notEvaluated) return 'not evaluated';
  if (standing.has('blind')) return 'blind';
  if (standing.has('over')) return 'over';
  if (standing.has('near')) return 'near';
  if (standing.has('rising')) return 'rising';
  return outOfService ? 'out of service' : 'settled';
}
