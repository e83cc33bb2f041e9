import { describe, test } from 'vitest';
import { PHASES, perPhase } from '../../src/protection/phase';
import {
  angleRad,
  conjugate,
  magnitude,
  multiply,
  phasor,
  phasorFromPolar,
  rotate,
} from '../../src/protection/phasor';
import { scale, sum } from '../../src/protection/phasor';
import type { Phasor } from '../../src/protection/phasor';
import { restraintAmps } from '../../src/protection/restraint';
import { differentialAmps } from '../../src/protection/terminal-currents';
import { expectFigure, printed } from './tolerance';

const RAD_PER_DEGREE = Math.PI / 180;
const HALF_SUM = { kind: 'scaled-sum', factor: 0.5 } as const;

function polar(magnitude: number, degrees: number): Phasor {
  return phasorFromPolar(magnitude, degrees * RAD_PER_DEGREE);
}

/** Ratio of the remote to the local current, I_R / I_L. */
function ratio(remote: Phasor, local: Phasor): Phasor {
  return scale(multiply(remote, conjugate(local)), 1 / magnitude(local) ** 2);
}

// Reference cases computed outside the project, in per unit of the load.
describe('two terminals', () => {
  test('transformers at opposite limits of ±1 % and ±60′ leave 0.04023 of the load', () => {
    expectFigure(differentialAmps([polar(1.01, 1), polar(0.99, 180 - 1)]), printed('0.04023'));
  });

  describe('load 1 on a line whose charging 0.2 is split between its ends', () => {
    const local = phasor(1, 0.1);
    const remote = phasor(-1, 0.1);

    test('the differential current is the charging', () => {
      expectFigure(differentialAmps([local, remote]), { value: 0.2, tolerance: 1e-12 });
    });
    test('the half-sum restraint is 1.00499', () => {
      expectFigure(restraintAmps(HALF_SUM, [local, remote]), printed('1.00499'));
    });
    test('the ratio of both currents is 1 at 168.5788°', () => {
      expectFigure(magnitude(ratio(remote, local)), { value: 1, tolerance: 1e-12 });
      expectFigure(angleRad(ratio(remote, local)) / RAD_PER_DEGREE, printed('168.5788'));
    });
  });

  test.each([
    {
      what: 'an internal fault fed 5∠0 and 3∠0',
      local: polar(5, 0),
      remote: polar(3, 0),
      sum: 8,
      k: 0.6,
      deg: 0,
    },
    {
      what: 'outfeed 0.4∠100 against 2∠−80',
      local: polar(2, -80),
      remote: polar(0.4, 100),
      sum: 1.6,
      k: 0.2,
      deg: 180,
    },
  ])('$what leaves $sum at a ratio of $k∠$deg°', ({ local, remote, sum, k, deg }) => {
    expectFigure(differentialAmps([local, remote]), { value: sum, tolerance: 1e-12 });
    expectFigure(magnitude(ratio(remote, local)), { value: k, tolerance: 1e-12 });
    expectFigure(Math.abs(angleRad(ratio(remote, local))) / RAD_PER_DEGREE, { value: deg, tolerance: 1e-9 });
  });
});

// Facts of the trade: common practice, no source.
describe('wiring mistakes under load', () => {
  const load = { a: polar(1, 0), b: polar(1, -120), c: polar(1, 120) };
  const leaving = perPhase((phase) => rotate(load[phase], Math.PI));

  test('a reversed end leaves twice the load', () => {
    for (const phase of PHASES) {
      expectFigure(differentialAmps([load[phase], load[phase]]), { value: 2, tolerance: 1e-12 });
    }
  });

  test('two swapped phases leave √3 times the load in both, and nothing in the third', () => {
    const swapped = { a: leaving.b, b: leaving.a, c: leaving.c };
    expectFigure(magnitude(sum([load.a, swapped.a])), { value: Math.sqrt(3), tolerance: 1e-12 });
    expectFigure(magnitude(sum([load.b, swapped.b])), { value: Math.sqrt(3), tolerance: 1e-12 });
    expectFigure(magnitude(sum([load.c, swapped.c])), { value: 0, tolerance: 1e-12 });
  });
});
