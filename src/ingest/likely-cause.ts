import type { CompositionOnWire, PolygonOnWire } from '../contract/composition';
import type { Cause } from '../contract/standing';

/** The term that a level grows by, or else its largest: and where a mismatch it is, of which terminal. */
export interface LikelyCause {
  readonly cause: Cause;
  readonly terminal: string | null;
}

const PARTS = [
  ['charging', 'chargingAmps'],
  ['ratio mismatch', 'ratioAmps'],
  ['angle mismatch', 'angleAmps'],
  ['rest', 'restAmps'],
] as const satisfies readonly (readonly [Cause, keyof PolygonOnWire])[];

/**
 * Of a level that drifts, the part that differs most from what it was before; of one that stands still, or has no
 * before, the largest part. `before` is only given for a level that drifts: two windows at different loads differ
 * in every part that follows the load.
 */
export function likelyCause(now: CompositionOnWire, before: CompositionOnWire | null): LikelyCause {
  if (now.kind === 'not separable' || now.polygon === null) return { cause: 'not told', terminal: null };
  const earlier = before?.kind === 'separated' ? before.polygon : null;
  const moved = PARTS.map(([cause, part]) => {
    const [re, im] = now.polygon![part];
    const [reBefore, imBefore] = earlier?.[part] ?? [0, 0];
    return { cause, amps: Math.hypot(re - reBefore, im - imBefore) };
  });
  const { cause } = moved.reduce((most, each) => (each.amps > most.amps ? each : most));
  return { cause, terminal: cause.endsWith('mismatch') ? mismatchedTerminal(now) : null };
}

/** The terminal that differs most from the first. */
function mismatchedTerminal(now: CompositionOnWire & { kind: 'separated' }): string | null {
  const sorted = now.mismatches.toSorted((one, other) => sizeOf(other) - sizeOf(one));
  return sorted[0]?.terminal ?? null;
}

const sizeOf = ({ ratio, angleDeg }: { ratio: { value: number }; angleDeg: { value: number } }): number =>
  Math.hypot(ratio.value, (angleDeg.value * Math.PI) / 180);
