import { describe, expect, test } from 'vitest';
import { complex, multiply, polar } from '../../simulator/plant/complex';
import type { Complex } from '../../simulator/plant/complex';
import { teeFlow } from '../../simulator/plant/line-flow';
import { evaluation } from '../../src/protection/evaluation';
import { evaluated } from './evaluated';
import type { Verdict } from './fault-theory';
import { adaptiveScheme, ALPHA_PLANE, PHASE_COMPARISON, TWO_SLOPE } from './schemes';

const SECTION = { impedanceOhm: complex(0.9, 7), susceptanceS: 6e-5 };
const DEGREE = Math.PI / 180;
const flow = teeFlow(
  [SECTION, SECTION, SECTION],
  { volts: polar(127_000, 0), throughAmps: polar(700, -0.2) },
  0.6,
).map(({ amps }) => amps);
const [first, second, third] = flow as [Complex, Complex, Complex];

const CASES: readonly {
  readonly what: string;
  readonly because: string;
  readonly currents: readonly Complex[];
  readonly verdict: Verdict;
}[] = [
  {
    what: 'a load that divides at the tee',
    because: 'only the charging of about 23 A is left, and the equivalent lies at −1',
    currents: flow,
    verdict: 'restrains',
  },
  {
    what: 'an internal fault fed from all three',
    because: 'kiloamperes within 15° of each other add up',
    currents: [polar(2000, -80 * DEGREE), polar(1500, -70 * DEGREE), polar(1000, -65 * DEGREE)],
    verdict: 'operates',
  },
  {
    what: 'an internal fault with a little outfeed',
    because: '2.5 kA are left, and what flows out is a tenth of what flows in: inside 1/6',
    currents: [polar(2000, -80 * DEGREE), polar(800, -75 * DEGREE), polar(300, 100 * DEGREE)],
    verdict: 'operates',
  },
  {
    what: 'a reversed transformer at the first terminal',
    because: 'twice its load is left and nothing opposes it',
    currents: [multiply(first, complex(-1, 0)), second, third],
    verdict: 'operates',
  },
];

describe.each(CASES)('$what: $because', ({ currents, verdict }) => {
  test.each([TWO_SLOPE, adaptiveScheme(3), ALPHA_PLANE])(
    '$characteristic.kind does as theory says',
    (scheme) => {
      expect(evaluated(scheme, currents).utilisation >= 1 ? 'operates' : 'restrains').toBe(verdict);
    },
  );

  test('phase comparison says that it weighs two terminals', () => {
    expect(evaluation(PHASE_COMPARISON, currents, { frequencyHz: 50 })).toHaveProperty('notComputable');
  });
});
