import { describe, expect, test } from 'vitest';
import { normalCdf, normalQuantile } from '../../src/standing/normal';

describe('normal distribution', () => {
  test('is symmetrical about zero', () => {
    for (const x of [0, 0.4, 1.7, 2.999, 3.001, 6]) {
      expect(normalCdf(x) + normalCdf(-x)).toBeCloseTo(1, 14);
    }
  });

  test('joins where its two methods meet', () => {
    const slope = (normalCdf(-3 + 1e-6) - normalCdf(-3 - 1e-6)) / 2e-6;
    expect(slope).toBeCloseTo(Math.exp(-4.5) / Math.sqrt(2 * Math.PI), 9);
  });

  test('has its quantiles where its probabilities are', () => {
    for (const p of [1e-12, 0.0005, 0.025, 0.3, 0.5, 0.9, 0.995]) {
      expect(normalCdf(normalQuantile(p)) / p).toBeCloseTo(1, 11);
    }
  });

  test('reaches 0 and 1 only at infinity', () => {
    expect([normalQuantile(0), normalQuantile(1)]).toEqual([-Infinity, Infinity]);
    expect([normalCdf(-Infinity), normalCdf(Infinity)]).toEqual([0, 1]);
  });

  test('refuses what is no probability and no number', () => {
    for (const p of [-0.1, 1.1, NaN]) expect(() => normalQuantile(p)).toThrow(RangeError);
    expect(() => normalCdf(NaN)).toThrow(RangeError);
  });
});
