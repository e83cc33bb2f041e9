import type { PickupWindow } from '../protection/pickup-window';
import { roundEnd } from './review-strip';

/** The pickup window on a scale from zero, as shares of its width. */
export interface PickupStripShape {
  readonly mostAmps: number;
  readonly pickup: number;
  /** undefined when the bounds leave no window */
  readonly band: { readonly from: number; readonly to: number } | undefined;
  /** no upper bound is recorded, or it lies beyond the scale */
  readonly open: boolean;
}

/** A fault current is often far beyond the pickup: the scale then ends before it, and the band stays open. */
const FARTHEST_OVER_PICKUP = 6;

export function pickupStrip({
  lowerAmps,
  upperAmps,
  pickupAmps,
}: PickupWindow & { readonly pickupAmps: number }): PickupStripShape {
  const nearAmps = Math.max(lowerAmps, pickupAmps);
  const wantedAmps = Math.min(upperAmps ?? Infinity, FARTHEST_OVER_PICKUP * nearAmps);
  const mostAmps = roundEnd(1.15 * Math.max(nearAmps, upperAmps === undefined ? 1.4 * nearAmps : wantedAmps));
  const to = Math.min(1, (upperAmps ?? Infinity) / mostAmps);
  const from = lowerAmps / mostAmps;
  return {
    mostAmps,
    pickup: pickupAmps / mostAmps,
    band: from > to ? undefined : { from, to },
    open: upperAmps === undefined || upperAmps > mostAmps,
  };
}
