import { phasorFromPolar } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { seededRandom } from './seeded-random';

/** Currents of two to five terminals, up to 2 kA each, at any angle: `sets` of them, the same every time. */
export function seededCurrents(sets: number): Phasor[][] {
  const random = seededRandom(87);
  return Array.from({ length: sets }, (_, index) =>
    Array.from({ length: 2 + (index % 4) }, () =>
      phasorFromPolar(2000 * random(), Math.PI * (2 * random() - 1)),
    ),
  );
}
