import type { CompositionOnWire } from '../contract/composition';
import type { StandingVerdict } from '../contract/standing';
import { isComputable } from '../protection/evaluation';
import type { NotComputable } from '../protection/evaluation';
import { actingMismatch } from '../protection/line-model';
import { perPhase } from '../protection/phase';
import type { PerPhase } from '../protection/phase';
import { phasor } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import type { SeparatedOnWire } from './composition-words';
import { dateText } from './figures';
import { terminalsInService } from './review-line';
import type { ReviewLine } from './review-line';
import { FROM_MAGNITUDES_ALONE } from './review-now';

/** The newest composition of each phase; undefined until the levels have been looked at. */
export type ReviewCompositions = PerPhase<CompositionOnWire | undefined>;

export const reviewCompositions = (standing: readonly StandingVerdict[]): ReviewCompositions =>
  perPhase((phase) => standing.find((verdict) => verdict.phase === phase)?.composition);

/** A phase's answer to voltage and load as it was measured, before any compensation of its charging. */
export interface ComposedResponse {
  readonly admittanceMillisiemens: Phasor;
  /** E_k of terminals 2 to n, in the register's order */
  readonly mismatches: readonly Phasor[];
  readonly words: string;
}

type MismatchOnWire = SeparatedOnWire['mismatches'][number];

/** What a composition says of a phase's answer to load, or in a sentence why it says nothing. */
export function composedResponse(
  line: Pick<ReviewLine, 'goesBy' | 'terminals'>,
  composition: CompositionOnWire | undefined,
): ComposedResponse | NotComputable {
  if (line.goesBy === 'reported') return { notComputable: FROM_MAGNITUDES_ALONE };
  if (composition === undefined) return { notComputable: NOT_LOOKED_AT };
  if (composition.kind === 'not separable')
    return { notComputable: `The last 30 days’ composition is not separable. ${composition.reason}` };
  const { admittance } = composition;
  if (admittance === undefined) return { notComputable: NOT_KEPT };
  const mismatches = mismatchesOf(composition, terminalsInService(line));
  if (!isComputable(mismatches)) return mismatches;
  const [leakage, left] = admittance.leftMillisiemens;
  return {
    admittanceMillisiemens: phasor(leakage, left + admittance.compensatedMillisiemens),
    mismatches: mismatches.map(({ ratio, angleDeg }) =>
      actingMismatch(phasor(ratio.value, (angleDeg.value * Math.PI) / 180)),
    ),
    words: `Mismatches and charging measured: the last 30 days’ composition, ${windowWords(composition)}.`,
  };
}

const NOT_LOOKED_AT =
  'There is no composition yet: the standing level of this phase has not been looked at. That is done once an hour.';
const NOT_KEPT =
  'The newest composition was kept without what a prediction needs. The next look at the levels, within an hour, brings it.';

/** The mismatches in the order of the terminals in service, if it is just these that the composition is of. */
function mismatchesOf(
  { mismatches }: SeparatedOnWire,
  [first, ...others]: readonly string[],
): readonly MismatchOnWire[] | NotComputable {
  const found = others.flatMap((key) =>
    mismatches.filter(({ terminal, against }) => terminal === key && against === first),
  );
  return found.length === others.length && found.length === mismatches.length
    ? found
    : {
        notComputable:
          'The last 30 days’ composition is of other terminals than those that the register now has in service.',
      };
}

const DAY_MS = 86_400_000;
const WHOLE_DAYS = 30;

/** "1 Nov 2026 to 1 Dec 2026, 28 days with qualified snapshots": the days are those of UTC. */
function windowWords({ from, to, days }: SeparatedOnWire): string {
  const date = (day: string) => dateText(`${day}T12:00:00Z`, 'UTC');
  const isParted = Date.parse(to) - Date.parse(from) < WHOLE_DAYS * DAY_MS;
  return `${isParted ? 'since the last known mark only, ' : ''}${date(from)} to ${date(to)}, ${days} days with qualified snapshots`;
}
