import type { Cause, CausePlace } from '../../contract/standing';
import { PHASES, type PhaseName } from '../../protection/phase';
import { mismatchFrom } from '../../standing/composition';
import { fittedCoefficients } from '../../standing/composition-fit';
import { type CompositionSums, shapeOf, totalOf } from '../../standing/composition-sums';
import { movedTerminal, type UnbalanceSides } from '../../standing/moved-terminal';
import { phaseUnbalance } from '../../standing/phase-unbalance';
import type { RosterLine } from '../roster';

export interface FoundPlace {
  readonly place: CausePlace | null;
  /** an angle that is alike in all three phases */
  readonly isTime: boolean;
}

const NOWHERE: FoundPlace = { place: null, isTime: false };

/** The sums of a window, by its place in time: counted in days, or in hours where a step is new. */
export interface SummedWindow {
  readonly at: number;
  readonly sums: CompositionSums;
}
export type SummedPhases = Readonly<Record<PhaseName, readonly SummedWindow[]>>;

/** Places in time, the last one not among them; counted as those of the windows are. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

export const inSpan = <Window extends { readonly at: number }>(
  windows: readonly Window[],
  { from, to }: Span,
): Window[] => windows.filter(({ at }) => at >= from && at < to);

/** Angles are alike where no phase's is further from their mean than this share of it. */
const ALIKE_SHARE = 1 / 3;

/**
 * Where a mismatch of this phase is: what changed of it between two windows, or what it is in the one where nothing
 * changed. Two terminals tell it only of a ratio that changed, by the unbalance of the phases.
 */
export function causePlace(
  line: RosterLine,
  sums: SummedPhases,
  { phase, cause, now, before }: { phase: PhaseName; cause: Cause; now: Span; before: Span | undefined },
): FoundPlace {
  if (cause !== 'ratio mismatch' && cause !== 'angle mismatch') return NOWHERE;
  const part = cause === 'ratio mismatch' ? 're' : 'im';
  const changeOf = (each: PhaseName): number[] | undefined => {
    const mismatches = mismatchesIn(sums[each], now);
    const earlier = before && mismatchesIn(sums[each], before);
    if (mismatches === undefined || (before && earlier?.length !== mismatches.length)) return undefined;
    return mismatches.map((mismatch, index) => mismatch[part] - (earlier?.[index]![part] ?? 0));
  };
  const changes = changeOf(phase);
  if (changes === undefined) return NOWHERE;
  const moved = movedTerminal(
    changes,
    before && part === 're' ? unbalanceSides(sums, { phase, now, before }) : undefined,
  );
  if (moved === undefined) return NOWHERE;
  const against = moved.kind === 'between' ? (line.expected[moved.against] ?? null) : null;
  const terminal = line.expected[moved.terminal];
  const ofPhases = PHASES.map((each) => changeOf(each));
  return {
    place: terminal === undefined ? null : { terminal, against },
    isTime: part === 'im' && areAlike(ofPhases, moved.kind === 'terminal' ? moved.terminal : 1),
  };
}

function mismatchesIn(windows: readonly SummedWindow[], span: Span) {
  const total = totalOf(inSpan(windows, span).map(({ sums }) => sums));
  const coefficients = total && fittedCoefficients(total);
  return total && coefficients?.slice(shapeOf(total).hasVoltage ? 1 : 0).map(mismatchFrom);
}

/** Whether the changes of one terminal are the same in every phase, or those of all others where it is the first. */
function areAlike(ofPhases: readonly (readonly number[] | undefined)[], terminal: number): boolean {
  const values = ofPhases.map((changes) => changes?.[Math.max(0, terminal - 1)]);
  if (!values.every((value) => value !== undefined)) return false;
  const mean = values.reduce((total, value) => total + value, 0) / values.length;
  return values.every((value) => Math.abs(value - mean) <= ALIKE_SHARE * Math.abs(mean));
}

/** The unbalance of a phase in every window of both sides that all three phases have sums of. */
export function unbalanceSides(
  sums: SummedPhases,
  { phase, now, before }: { phase: PhaseName; now: Span; before: Span },
): UnbalanceSides {
  const others = PHASES.filter((each) => each !== phase);
  const byPlace = others.map((each) => new Map(sums[each].map((window) => [window.at, window.sums])));
  const side = (span: Span) =>
    inSpan(sums[phase], span).flatMap(({ at, sums: own }) => {
      const theirs = byPlace.flatMap((windows) => windows.get(at) ?? []);
      const values = isPair(theirs) ? phaseUnbalance(own, theirs) : undefined;
      return values === undefined ? [] : [values];
    });
  return { before: side(before), after: side(now) };
}

const isPair = (sums: readonly CompositionSums[]): sums is [CompositionSums, CompositionSums] =>
  sums.length === 2;
