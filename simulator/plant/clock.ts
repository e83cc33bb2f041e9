import { hashed } from './noise';
import { type Ramp, ramped } from './ramp';

/** Where a terminal's time comes from as long as nothing is wrong. */
export type TimeFrom = 'satellite' | 'channel';

/** A receiver that loses its satellites now and then, by a timetable from the site's epoch. */
export type ClockLoss = { readonly firstMs: number; readonly everyMs: number; readonly lastsMs: number };

/** What a terminal knows of its clock, and in the end how far it truly is off. */
export type ClockState = {
  readonly source: TimeFrom | 'free';
  readonly errorUs: number;
  readonly trueOffsetUs: number;
};

const RUNS_OFF_US_PER_S = 2.1;

export function clockState(
  clock: {
    readonly timeFrom: TimeFrom;
    readonly loss?: ClockLoss | undefined;
    readonly drift?: Ramp | undefined;
    readonly seed: number;
  },
  { atMs, epochMs }: { readonly atMs: number; readonly epochMs: number },
): ClockState {
  const driftUs = clock.drift === undefined ? 0 : ramped(clock.drift, atMs - epochMs);
  const lostMs = clock.loss === undefined ? undefined : lostForMs(clock.loss, atMs - epochMs);
  if (lostMs !== undefined) {
    const offUs = 2 + (RUNS_OFF_US_PER_S * lostMs) / 1000;
    return { source: 'free', errorUs: offUs, trueOffsetUs: offUs + driftUs };
  }
  const spread = hashed(clock.seed, Math.floor(atMs / 2000));
  return clock.timeFrom === 'satellite'
    ? { source: 'satellite', errorUs: 1 + Math.floor(3 * spread), trueOffsetUs: driftUs }
    : { source: 'channel', errorUs: 18 + Math.floor(14 * spread), trueOffsetUs: driftUs };
}

function lostForMs(loss: ClockLoss, sinceEpochMs: number): number | undefined {
  const intoMs = (((sinceEpochMs - loss.firstMs) % loss.everyMs) + loss.everyMs) % loss.everyMs;
  return intoMs < loss.lastsMs ? intoMs : undefined;
}
