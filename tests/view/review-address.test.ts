import { describe, expect, it } from 'vitest';
import { basisFromAddress, basisInAddress, MISMATCH_BASES } from '../../src/view/review-basis';
import { lagFromAddress, MULTIPLE_BOUNDS, numberFromAddress } from '../../src/view/review-number';
import { periodFromAddress, periodInAddress, periodWindow, periodWords } from '../../src/view/review-period';
import { pickupStrip } from '../../src/view/review-pickup-strip';
import { conventionWords, ohmsText, pickupWords } from '../../src/view/review-words';
import { ALPHA, TWO_SLOPE } from './sample-review';

const NOW_MS = Date.UTC(2026, 11, 1, 12);
const search = (text: string) => new URLSearchParams(text);

describe('the period of a review', () => {
  it('is the last 24 hours where the address holds none or nonsense', () => {
    for (const text of ['', 'period=3y', 'from=yesterday&to=today'])
      expect(periodFromAddress(search(text))).toEqual({ kind: 'preset', preset: '24h' });
  });

  it('two instants in order go before a preset', () => {
    const from = '2026-11-20T00:00:00.000Z';
    const to = '2026-11-27T00:00:00.000Z';
    const period = periodFromAddress(search(`from=${from}&to=${to}&period=7d`));
    expect(periodInAddress(period)).toEqual({ from, to, period: undefined });
    expect(periodWindow(period, NOW_MS)).toEqual({ fromMs: Date.parse(from), toMs: Date.parse(to) });
    expect(periodWords(period, 'Europe/Berlin')).toBe('20 Nov 2026, 01:00 to 27 Nov 2026, 01:00');
  });

  it('two instants out of order are no period', () => {
    const period = periodFromAddress(search('from=2026-11-27T00:00:00Z&to=2026-11-20T00:00:00Z'));
    expect(period.kind).toBe('preset');
  });

  it('a preset ends now, and the usual one leaves the address as it is', () => {
    const week = periodFromAddress(search('period=7d'));
    expect(periodWindow(week, NOW_MS).fromMs).toBe(NOW_MS - 7 * 86_400_000);
    expect(periodInAddress(week).period).toBe('7d');
    expect(periodInAddress({ kind: 'preset', preset: '24h' }).period).toBeUndefined();
  });
});

describe('numbers in the address', () => {
  it('a multiple outside its bounds is the preset', () => {
    expect(numberFromAddress('3', MULTIPLE_BOUNDS)).toBe(3);
    for (const text of [null, '', '0', '-2', '1e9', 'NaN', 'many'])
      expect(numberFromAddress(text, MULTIPLE_BOUNDS)).toBe(2.5);
  });

  it('an angle that is not offered is the usual one', () => {
    expect(lagFromAddress('45')).toBe('45');
    expect(lagFromAddress('1000')).toBe('30');
  });
});

describe('the basis of a prediction in the address', () => {
  it('is the composition where the address holds none or nonsense', () => {
    for (const text of [null, '', 'composition', 'guess']) expect(basisFromAddress(text)).toBe('composition');
  });

  it('is kept for the others alone, and read back as what it was', () => {
    expect(MISMATCH_BASES.map(basisInAddress)).toEqual([undefined, 'snapshot', 'class']);
    for (const basis of MISMATCH_BASES) expect(basisFromAddress(basisInAddress(basis) ?? null)).toBe(basis);
  });
});

describe('words of the review', () => {
  it('the convention of every figure names characteristic, restraint and charging', () => {
    expect(conventionWords(TWO_SLOPE)).toBe(
      'Amperes rms primary, positive into the line; two-slope restraint, first slope from zero; restraint is ½ sum of magnitudes; charging not compensated',
    );
    expect(conventionWords({ ...ALPHA, chargingCompensation: true })).toContain(
      'alpha plane; no restraint current; charging compensated from voltages',
    );
  });

  it('resistances carry their unit, and one that cannot be told is a dash', () => {
    expect([ohmsText(872.9), ohmsText(4.26), ohmsText(12_345), ohmsText(undefined)]).toEqual([
      '873\u00a0Ω',
      '4.3\u00a0Ω',
      '12\u00a0kΩ',
      '–',
    ]);
  });

  it('every place of a pickup has its sentence', () => {
    const bounds = { lowerAmps: 50, upperAmps: 620 };
    expect(pickupWords({ ...bounds, pickupLies: 'within' }, 60)).toContain('lies within the window');
    expect(pickupWords({ ...bounds, pickupLies: 'below' }, 40)).toContain(
      'below the lower bound of 50\u00a0A',
    );
    expect(pickupWords({ ...bounds, pickupLies: 'above' }, 700)).toContain('above the upper bound');
    expect(pickupWords({ lowerAmps: 700, upperAmps: 620, pickupLies: 'no window' }, 60)).toContain(
      'no window',
    );
    expect(pickupWords({ lowerAmps: 50, upperAmps: undefined, pickupLies: 'within' }, 60)).toContain(
      'at or above the lower bound',
    );
  });
});

describe('the strip of the pickup window', () => {
  it('ends before a fault current far beyond, and stays open', () => {
    const strip = pickupStrip({ lowerAmps: 50, upperAmps: 6_000, pickupLies: 'within', pickupAmps: 60 });
    expect(strip.open).toBe(true);
    expect(strip.band?.to).toBe(1);
    expect(strip.pickup).toBeGreaterThan(0.05);
  });

  it('has no band where the bounds leave no window', () => {
    const strip = pickupStrip({ lowerAmps: 700, upperAmps: 620, pickupLies: 'no window', pickupAmps: 60 });
    expect(strip.band).toBeUndefined();
  });
});
