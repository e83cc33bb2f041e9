import { describe, expect, test } from 'vitest';
import {
  apparentDifferentialFactor,
  channelTimeErrorMs,
  timeErrorAngleRad,
} from '../../src/protection/channel';
import { phasorFromPolar } from '../../src/protection/phasor';
import { differentialAmps } from '../../src/protection/terminal-currents';

describe('channel', () => {
  test('equal delays leave no time error, however long they are', () => {
    expect(channelTimeErrorMs(17.3, 17.3)).toBe(0);
  });

  test('the time error is half the difference, positive where sending takes longer', () => {
    expect(channelTimeErrorMs(6, 4)).toBe(1);
    expect(channelTimeErrorMs(4, 6)).toBe(-1);
  });

  test('a time error of one period is a full turn', () => {
    expect(timeErrorAngleRad(20, 50)).toBeCloseTo(2 * Math.PI, 12);
  });

  test('the apparent differential current is that of a through current with one end turned', () => {
    for (const angleRad of [-0.4, 0, 0.01, 0.3, Math.PI]) {
      const ends = [phasorFromPolar(500, 0), phasorFromPolar(500, Math.PI + angleRad)];
      expect(500 * apparentDifferentialFactor(angleRad)).toBeCloseTo(differentialAmps(ends), 9);
    }
  });
});
