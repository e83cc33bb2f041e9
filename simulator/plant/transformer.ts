import type { Three } from './complex';
import { add, type Complex, eachPhase, multiply, polar, scale } from './complex';
import type { TerminalFlow } from './line-flow';

/** A transformer at a line's far end: line-side turns over far-side turns, and the clock number of the far side. */
export type TransformerTruth = { readonly ratio: number; readonly clockNumber: number };

const THIRD_RAD = (2 * Math.PI) / 3;
const FORWARD = polar(1, THIRD_RAD);
const BACKWARD = polar(1, -THIRD_RAD);

/**
 * What the far winding's terminal sees of the line side. A clock number n has the far side lag the line side by
 * n·30° in the positive sequence and lead by it in the negative; the zero sequence ends in the star point.
 */
export function farSide(line: Three<TerminalFlow>, transformer: TransformerTruth): Three<TerminalFlow> {
  const amps = turned(
    eachPhase((phase) => scale(line[phase].amps, transformer.ratio)),
    transformer.clockNumber,
  );
  const volts = turned(
    eachPhase((phase) => scale(line[phase].volts, 1 / transformer.ratio)),
    transformer.clockNumber,
  );
  return eachPhase((phase) => ({ amps: amps[phase], volts: volts[phase] }));
}

function turned([a, b, c]: Three<Complex>, clockNumber: number): Three<Complex> {
  const shiftRad = (clockNumber * Math.PI) / 6;
  const positive = scale(add(a, add(multiply(FORWARD, b), multiply(BACKWARD, c))), 1 / 3);
  const negative = scale(add(a, add(multiply(BACKWARD, b), multiply(FORWARD, c))), 1 / 3);
  const p = multiply(positive, polar(1, -shiftRad));
  const n = multiply(negative, polar(1, shiftRad));
  return [
    add(p, n),
    add(multiply(BACKWARD, p), multiply(FORWARD, n)),
    add(multiply(FORWARD, p), multiply(BACKWARD, n)),
  ];
}
