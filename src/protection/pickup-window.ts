/** Common practice for how far a pickup stands above the standing level; each owner chooses their own. */
export const STANDING_MULTIPLE_PRESET = 2.5;

/** What a pickup has to stand between, amperes rms primary. */
export interface PickupBounds {
  /** expected standing level with nothing compensated, so that a lost voltage does not make the scheme operate */
  readonly uncompensatedStandingAmps: number;
  /** how many times that level the pickup is to be at the least */
  readonly multiple: number;
  /** least internal fault current on record; undefined when none is recorded */
  readonly leastInternalFaultAmps: number | undefined;
}

/** The window for a pickup, amperes rms primary, and where the recorded one lies. */
export interface PickupWindow {
  readonly lowerAmps: number;
  /** undefined when no least internal fault current is recorded */
  readonly upperAmps: number | undefined;
  /** `no window` when the lower bound is above the upper one, so that no pickup satisfies both */
  readonly pickupLies: 'within' | 'below' | 'above' | 'no window';
}

/** The window for a pickup in amperes rms primary; a pickup at a bound is within. */
export function pickupWindow(
  pickupAmps: number,
  { uncompensatedStandingAmps, multiple, leastInternalFaultAmps }: PickupBounds,
): PickupWindow {
  const lowerAmps = multiple * uncompensatedStandingAmps;
  const window = { lowerAmps, upperAmps: leastInternalFaultAmps };
  return { ...window, pickupLies: placeIn(window, pickupAmps) };
}

function placeIn(
  { lowerAmps, upperAmps = Infinity }: Pick<PickupWindow, 'lowerAmps' | 'upperAmps'>,
  pickupAmps: number,
): PickupWindow['pickupLies'] {
  if (lowerAmps > upperAmps) return 'no window';
  if (pickupAmps < lowerAmps) return 'below';
  return pickupAmps > upperAmps ? 'above' : 'within';
}
