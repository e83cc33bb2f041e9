import { evaluation, isComputable } from '../../src/protection/evaluation';
import type { Evaluated } from '../../src/protection/evaluation';
import type { Phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';

/** The evaluation at 50 Hz of currents that a scheme can be evaluated for. */
export function evaluated(scheme: Scheme, currents: readonly Phasor[]): Evaluated {
  const found = evaluation(scheme, currents, { frequencyHz: 50 });
  if (!isComputable(found)) throw new Error(found.notComputable);
  return found;
}
