import { describe, expect, test } from 'vitest';
import { evaluation, isComputable } from '../../src/protection/evaluation';
import { generalisedEquivalent } from '../../src/protection/generalised-equivalent';
import {
  angleRad,
  conjugate,
  magnitude,
  multiply,
  phasor,
  phasorFromPolar,
  scale,
} from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import type { Scheme } from '../../src/protection/scheme';
import { expectFigure, printed } from './tolerance';

const RAD_PER_DEGREE = Math.PI / 180;

const polar = (magnitude: number, degrees: number): Phasor =>
  phasorFromPolar(magnitude, degrees * RAD_PER_DEGREE);

// R 6 and A 195° are the illustration that papers on the alpha plane use (from memory). The pickup is far below
// the currents here, so that the region alone decides.
const SCHEME: Scheme = {
  characteristic: { kind: 'alpha-plane', pickupAmps: 1e-6, radius: 6, angleDeg: 195 },
  restraint: { kind: 'none' },
};

describe('alpha plane with R 6 and A 195°', () => {
  test.each([
    { ratio: 1, degrees: 180, verdict: 'restrains' },
    { ratio: 1, degrees: 126, verdict: 'restrains' },
    { ratio: 1, degrees: 82.6, verdict: 'restrains' },
    { ratio: 1, degrees: 82, verdict: 'operates' },
    { ratio: 5.9, degrees: 180, verdict: 'restrains' },
    { ratio: 6.1, degrees: 180, verdict: 'operates' },
    { ratio: 0.1, degrees: 180, verdict: 'operates' },
    { ratio: 0.25, degrees: 180, verdict: 'restrains' },
  ])('k = $ratio∠$degrees° $verdict', ({ ratio, degrees, verdict }) => {
    // 1∠180 leaves no differential current, which restrains by the pickup as well.
    for (const localDegrees of [0, -80, 133]) {
      const local = polar(1, localDegrees);
      const found = evaluation(SCHEME, [local, multiply(local, polar(ratio, degrees))], { frequencyHz: 50 });
      if (!isComputable(found)) throw new Error(found.notComputable);
      expect(found.utilisation >= 1 ? 'operates' : 'restrains').toBe(verdict);
    }
  });
});

// Miller, Burger, Fischer and Kasztenny, 2010; figures recomputed outside the project.
describe('generalised two-terminal equivalent', () => {
  const ratio = ({ local, remote }: { local: Phasor; remote: Phasor }) =>
    scale(multiply(remote, conjugate(local)), 1 / magnitude(local) ** 2);

  test('5∠−80, 3∠−75 and 1∠−70 become 5.42904∠−80 and 3.57096∠−73.0012', () => {
    const found = generalisedEquivalent([polar(5, -80), polar(3, -75), polar(1, -70)]);
    expectFigure(magnitude(found.local), printed('5.42904'));
    expectFigure(angleRad(found.local) / RAD_PER_DEGREE, { value: -80, tolerance: 1e-9 });
    expectFigure(magnitude(found.remote), printed('3.57096'));
    expectFigure(angleRad(found.remote) / RAD_PER_DEGREE, printed('-73.0012'));
    expectFigure(magnitude(ratio(found)), printed('0.657752'));
    expectFigure(angleRad(ratio(found)) / RAD_PER_DEGREE, printed('6.9988'));
  });

  test('5∠−80 and 3∠−60 come back unchanged, with k 0.6∠20', () => {
    const found = generalisedEquivalent([polar(5, -80), polar(3, -60)]);
    expectFigure(magnitude(found.local), { value: 5, tolerance: 1e-12 });
    expectFigure(magnitude(found.remote), { value: 3, tolerance: 1e-12 });
    expectFigure(magnitude(ratio(found)), { value: 0.6, tolerance: 1e-12 });
    expectFigure(angleRad(ratio(found)) / RAD_PER_DEGREE, { value: 20, tolerance: 1e-9 });
  });
});

// Two-terminal reference cases computed outside the project; the two-terminal tests hold their currents.
describe('two-terminal cases in the alpha plane', () => {
  test.each([
    {
      what: 'charging 0.2 split over load 1',
      ends: [phasor(1, 0.1), phasor(-1, 0.1)],
      k: '1.0000',
      deg: '168.5788',
    },
    { what: 'internal 5∠0 and 3∠0', ends: [polar(5, 0), polar(3, 0)], k: '0.6000', deg: '0.0000' },
    {
      what: 'outfeed 0.4∠100 of 2∠−80',
      ends: [polar(2, -80), polar(0.4, 100)],
      k: '0.2000',
      deg: '180.0000',
    },
  ])('$what lies at $k∠$deg°', ({ ends, k, deg }) => {
    const found = evaluation(SCHEME, ends, { frequencyHz: 50 });
    if (!isComputable(found) || found.region?.kind !== 'alpha-plane') throw new Error('There is no place.');
    expectFigure(found.region.ratio, printed(k));
    expectFigure(Math.abs(found.region.angleRad) / RAD_PER_DEGREE, printed(deg));
  });
});
