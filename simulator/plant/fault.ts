import type { Complex, Three } from './complex';
import { add, complex, magnitude, multiply, polar, scale, subtract } from './complex';

/**
 * A line between two sources with a fault on it or behind its far end, solved by symmetrical components. Shunt
 * capacitance is left out: fault currents dwarf it.
 */

/** An impedance to the positive (and negative) sequence, and to the zero sequence, ohms. */
export type SequenceImpedance = { readonly positive: Complex; readonly zero: Complex };

export type SourcedLine = {
  readonly line: SequenceImpedance;
  readonly firstSource: SequenceImpedance;
  readonly secondSource: SequenceImpedance;
  /** voltages to earth behind the sources, volts rms, phase A; their angle drives the load */
  readonly firstVolts: Complex;
  readonly secondVolts: Complex;
};

export type Fault = {
  readonly kind: 'phase A to earth' | 'three-phase';
  /** share of the line's length from the first end, or behind the second end's transformers */
  readonly at: number | 'behind the second end';
  readonly resistanceOhm: number;
};

/** What truly flows, amperes rms into the line, by end and then by phase. */
export type TwoEnds = readonly [Three<Complex>, Three<Complex>];

/** The load alone. */
export const loadedLine = (network: SourcedLine): TwoEnds => {
  const load = phases({ ...NOTHING, positive: loadAmps(network) });
  return [load, turnedRound(load)];
};

/** The load with the fault on top. */
export function faultedLine(network: SourcedLine, fault: Fault): TwoEnds {
  const place = fault.at === 'behind the second end' ? 1 : fault.at;
  const sides = sidesOf(network, place);
  const load = loadAmps(network);
  const volts = subtract(network.firstVolts, multiply(sides.first.positive, load));
  const intoFault = faultAmps(fault, sides, volts);
  const fromFirst = {
    zero: multiply(intoFault.zero, share(sides.second.zero, sides.first.zero)),
    positive: multiply(intoFault.positive, share(sides.second.positive, sides.first.positive)),
    negative: multiply(intoFault.negative, share(sides.second.positive, sides.first.positive)),
  };
  const first = phases({ ...fromFirst, positive: add(load, fromFirst.positive) });
  // Seen from the line, whatever enters at the first end leaves for a fault behind the second one.
  if (fault.at === 'behind the second end') return [first, turnedRound(first)];
  return [
    first,
    phases({
      zero: subtract(intoFault.zero, fromFirst.zero),
      positive: subtract(subtract(intoFault.positive, fromFirst.positive), load),
      negative: subtract(intoFault.negative, fromFirst.negative),
    }),
  ];
}

type Sequences = { readonly zero: Complex; readonly positive: Complex; readonly negative: Complex };
type Sides = { readonly first: SequenceImpedance; readonly second: SequenceImpedance };

const ZERO = complex(0, 0);
const NOTHING: Sequences = { zero: ZERO, positive: ZERO, negative: ZERO };
const FORWARD = polar(1, (2 * Math.PI) / 3);
const BACKWARD = polar(1, (-2 * Math.PI) / 3);

function loadAmps({ line, firstSource, secondSource, firstVolts, secondVolts }: SourcedLine): Complex {
  const inSeries = add(line.positive, add(firstSource.positive, secondSource.positive));
  return quotient(subtract(firstVolts, secondVolts), inSeries);
}

/** What lies between the fault and each source. */
function sidesOf({ line, firstSource, secondSource }: SourcedLine, place: number): Sides {
  return {
    first: {
      positive: add(firstSource.positive, scale(line.positive, place)),
      zero: add(firstSource.zero, scale(line.zero, place)),
    },
    second: {
      positive: add(secondSource.positive, scale(line.positive, 1 - place)),
      zero: add(secondSource.zero, scale(line.zero, 1 - place)),
    },
  };
}

/** Sequence currents into the fault, given the voltage that stood there before it. */
function faultAmps({ kind, resistanceOhm }: Fault, { first, second }: Sides, volts: Complex): Sequences {
  const positive = parallel(first.positive, second.positive);
  const zero = parallel(first.zero, second.zero);
  if (kind === 'three-phase') {
    return { ...NOTHING, positive: quotient(volts, add(positive, complex(resistanceOhm, 0))) };
  }
  const inSeries = add(add(scale(positive, 2), zero), complex(3 * resistanceOhm, 0));
  const each = quotient(volts, inSeries);
  return { zero: each, positive: each, negative: each };
}

function phases({ zero, positive, negative }: Sequences): Three<Complex> {
  return [
    add(zero, add(positive, negative)),
    add(zero, add(multiply(BACKWARD, positive), multiply(FORWARD, negative))),
    add(zero, add(multiply(FORWARD, positive), multiply(BACKWARD, negative))),
  ];
}

function turnedRound([a, b, c]: Three<Complex>): Three<Complex> {
  return [scale(a, -1), scale(b, -1), scale(c, -1)];
}

function quotient(a: Complex, b: Complex): Complex {
  return scale(multiply(a, complex(b.re, -b.im)), 1 / magnitude(b) ** 2);
}

function parallel(a: Complex, b: Complex): Complex {
  return quotient(multiply(a, b), add(a, b));
}

/** The share of a current that takes the way past `own`, with `other` beside it. */
function share(other: Complex, own: Complex): Complex {
  return quotient(other, add(own, other));
}
