import type { CompositionOnWire, EstimateOnWire } from '../contract/composition';
import type { LineSummary } from '../contract/lines';
import type { Cause, CausePlace, StandingVerdict } from '../contract/standing';
import { listed, terminalName } from './line-words';

type Substations = LineSummary['substations'];

/** What an angle that is alike in all three phases comes from. */
export const TIME_WORDS =
  'alike in all three phases: that is time, by the channel or a clock, rather than a transformer';

/**
 * A cause as a name, with the terminal that it points to: "ratio mismatch of Low Pell", or "ratio mismatch of Low Pell
 * against Skelder" where the currents tell only that the two differ.
 */
export function causeName(cause: Cause, place: CausePlace | null, substations: Substations): string {
  switch (cause) {
    case 'charging':
      return 'charging';
    case 'ratio mismatch':
    case 'angle mismatch':
      return `${cause}${placeWords(place, substations)}`;
    case 'rest':
      return 'what follows neither voltage nor load';
    case 'not told':
      return 'a cause that can’t be told';
  }
}

function placeWords(place: CausePlace | null, substations: Substations): string {
  if (place === null) return '';
  const against = place.against === null ? '' : ` against ${terminalName(place.against, substations)}`;
  return ` of ${terminalName(place.terminal, substations)}${against}`;
}

type Moves = Pick<StandingVerdict, 'likelyCause' | 'causePlace'> & {
  readonly composition: CompositionOnWire;
  readonly compositionBefore: CompositionOnWire;
};

/**
 * Which causes have moved beyond their 95 % intervals between two windows, and of charging whether it stayed.
 * Undefined where one of them is not separable.
 */
export function movedCauses(
  { composition: now, compositionBefore: before, likelyCause, causePlace }: Moves,
  substations: Substations,
): { moved: string[]; still: string[] } | undefined {
  if (now.kind !== 'separated' || before.kind !== 'separated') return undefined;
  const pairs: { name: string; one: EstimateOnWire; other: EstimateOnWire; always: boolean }[] = [];
  if (now.chargingAmps !== null && before.chargingAmps !== null)
    pairs.push({ name: 'charging', one: now.chargingAmps, other: before.chargingAmps, always: true });
  for (const mismatch of now.mismatches) {
    const earlier = before.mismatches.find(({ terminal }) => terminal === mismatch.terminal);
    if (earlier === undefined) continue;
    const { terminal, against } = mismatch;
    // between two terminals the place that was found for this cause is surer than "one against the other"
    const name = (cause: Cause) => {
      const isFound = now.mismatches.length === 1 && cause === likelyCause && causePlace !== null;
      return causeName(cause, isFound ? causePlace : { terminal, against }, substations);
    };
    pairs.push(
      { name: name('ratio mismatch'), one: mismatch.ratio, other: earlier.ratio, always: false },
      { name: name('angle mismatch'), one: mismatch.angleDeg, other: earlier.angleDeg, always: false },
    );
  }
  const isMoved = ({ one, other }: (typeof pairs)[number]) => one.low > other.high || one.high < other.low;
  return {
    moved: pairs.filter(isMoved).map(({ name }) => name),
    still: pairs.filter((pair) => pair.always && !isMoved(pair)).map(({ name }) => name),
  };
}

/** "ratio mismatch of Hask moved, charging did not" */
export const movedAndStill = (moved: readonly string[], still: readonly string[]): string =>
  still.length === 0 ? `${listed(moved)} moved` : `${listed(moved)} moved, ${listed(still)} did not`;
