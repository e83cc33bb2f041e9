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

/** Of what moved, a mismatch that moved less than this share of the one that moved most is not worth a word. */
const WORTH_SHARE = 1 / 4;

interface Move {
  readonly name: string;
  readonly one: EstimateOnWire;
  readonly other: EstimateOnWire;
  /** how far a mismatch moved, per unit or radians; undefined for the charging */
  readonly size: number | undefined;
}

/**
 * Which causes have moved beyond their 95 % intervals between two windows, the mismatch that moved most first, and of
 * charging whether it stayed. Undefined where one of them is not separable.
 */
export function movedCauses(
  { composition: now, compositionBefore: before, likelyCause, causePlace }: Moves,
  substations: Substations,
): { moved: string[]; still: string[] } | undefined {
  if (now.kind !== 'separated' || before.kind !== 'separated') return undefined;
  const charging: Move[] =
    now.chargingAmps === null || before.chargingAmps === null
      ? []
      : [{ name: 'charging', one: now.chargingAmps, other: before.chargingAmps, size: undefined }];
  const mismatches = now.mismatches.flatMap((mismatch): Move[] => {
    const earlier = before.mismatches.find(({ terminal }) => terminal === mismatch.terminal);
    if (earlier === undefined) return [];
    const { terminal, against } = mismatch;
    // between two terminals the place that was found for this cause is surer than "one against the other"
    const name = (cause: Cause) => {
      const isFound = now.mismatches.length === 1 && cause === likelyCause && causePlace !== null;
      return causeName(cause, isFound ? causePlace : { terminal, against }, substations);
    };
    const ratio = { one: mismatch.ratio, other: earlier.ratio };
    const angle = { one: mismatch.angleDeg, other: earlier.angleDeg };
    return [
      { name: name('ratio mismatch'), ...ratio, size: Math.abs(ratio.one.value - ratio.other.value) },
      {
        name: name('angle mismatch'),
        ...angle,
        size: (Math.abs(angle.one.value - angle.other.value) * Math.PI) / 180,
      },
    ];
  });
  const isMoved = ({ one, other }: Move) => one.low > other.high || one.high < other.low;
  const movedMismatches = mismatches.filter(isMoved).sort((one, other) => other.size! - one.size!);
  const worthAWord = movedMismatches.filter(({ size }) => size! >= WORTH_SHARE * movedMismatches[0]!.size!);
  return {
    moved: [...worthAWord, ...charging.filter(isMoved)].map(({ name }) => name),
    still: charging.filter((move) => !isMoved(move)).map(({ name }) => name),
  };
}

/** "ratio mismatch of Hask moved, charging did not" */
export const movedAndStill = (moved: readonly string[], still: readonly string[]): string =>
  still.length === 0 ? `${listed(moved)} moved` : `${listed(moved)} moved, ${listed(still)} did not`;
