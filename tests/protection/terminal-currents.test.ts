import { describe, expect, test } from 'vitest';
import { phasor } from '../../src/protection/phasor';
import { leastMagnitudeAmps } from '../../src/protection/terminal-currents';

describe('the least magnitude among the terminals', () => {
  test('is that of the one that carries least, whichever way', () => {
    expect(leastMagnitudeAmps([phasor(300, 400), phasor(-120, 0), phasor(0, -380)])).toBe(120);
  });

  test('is no number where one current is none, and is refused for no terminal', () => {
    expect(leastMagnitudeAmps([phasor(300, 0), phasor(NaN, 0)])).toBeNaN();
    expect(() => leastMagnitudeAmps([])).toThrow(RangeError);
  });
});
