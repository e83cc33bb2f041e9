import type { Cause } from '../../contract/standing';
import type { SeparatedComposition } from '../../standing/composition';
import { minus, modulus } from '../../standing/complex';
import { compositionPolygon, partsAt } from '../../standing/operating-point';
import type { ComposedWindow } from './composed-window';

/**
 * Of a level that moved, the part of its composition that changed most, both taken at the load of now: two windows at
 * different loads differ in every part that follows the load. Of one that stands still, or has no window before, the
 * largest part.
 */
export function likelyCause(now: ComposedWindow, before: ComposedWindow | undefined): Cause {
  const parts = partsOf(now, now);
  if (parts === undefined) return 'not told';
  const earlier = before && partsOf(before, now);
  const moved = parts.map(({ cause, amps }, index) => ({
    cause,
    amps: modulus(earlier === undefined ? amps : minus(amps, earlier[index]!.amps)),
  }));
  return moved.reduce((most, each) => (each.amps > most.amps ? each : most)).cause;
}

/** The parts of one window's composition at the load of another one's; undefined where it is not separable. */
function partsOf({ composition, total }: ComposedWindow, load: ComposedWindow) {
  const own = isTold(composition) && total ? compositionPolygon(total, composition) : undefined;
  const point =
    load.total && isTold(load.composition) && compositionPolygon(load.total, load.composition)?.point;
  if (!isTold(composition) || own === undefined || !point) return undefined;
  const { chargingAmps, ratioAmps, angleAmps } = partsAt(composition, point);
  return [
    { cause: 'charging', amps: chargingAmps },
    { cause: 'ratio mismatch', amps: ratioAmps },
    { cause: 'angle mismatch', amps: angleAmps },
    { cause: 'rest', amps: own.restAmps },
  ] as const;
}

/** Separated, with the charging apart from the mismatches: that takes a voltage. */
export const isTold = (composition: ComposedWindow['composition']): composition is SeparatedComposition =>
  composition.kind === 'separated' && composition.shape.hasVoltage;
