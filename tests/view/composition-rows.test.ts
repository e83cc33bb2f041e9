import { describe, expect, it } from 'vitest';
import { againstRows, causeRows, qualityWords } from '../../src/view/composition-rows';
import { estimate, mismatchWith, notSeparable, separatedWith } from './sample-compositions';
import { lineWith } from './sample-lines';

const context = { unit: 'amperes', ratingAmps: 800, substations: lineWith().substations } as const;
const plain = (text: string | undefined) => text?.replaceAll('\u00a0', ' ');

describe('the causes in figures', () => {
  it('names the end that a mismatch points to, and gives charging with its interval', () => {
    const rows = causeRows(separatedWith(), null, context);
    expect(rows.map(({ name }) => name)).toEqual([
      'charging',
      'ratio mismatch of Hask against Skelder',
      'angle mismatch of Hask against Skelder',
      'rest',
      'differential',
    ]);
    expect(plain(rows[0]!.now!.figure)).toBe('14.0 A');
    expect(rows[0]!.now!.interval).toBe('13.2 to 14.8');
    expect(plain(rows[1]!.now!.figure)).toBe('27.1 A');
    expect(rows.every(({ before }) => before === undefined)).toBe(true);
  });

  it('with several ends the sums of their mismatches carry no end’s name', () => {
    const mismatches = [mismatchWith(), mismatchWith({ terminal: 'skelder' })];
    const names = causeRows(separatedWith({ mismatches }), null, context).map(({ name }) => name);
    expect(names).toContain('ratio mismatch');
  });

  it('a window that is not separable has no figure at all', () => {
    const rows = causeRows(notSeparable, separatedWith(), context);
    expect(rows.every(({ now }) => now === undefined)).toBe(true);
    expect(rows.every(({ before }) => before !== undefined)).toBe(true);
  });

  it('charging that no voltage tells is not told, and not 0 A', () => {
    const [charging] = causeRows(separatedWith({ chargingAmps: null }), null, context);
    expect(charging!.now!.figure).toBe('not told');
  });

  it('per unit is of the rating', () => {
    const [charging] = causeRows(separatedWith(), null, { ...context, unit: 'per unit' });
    expect(plain(charging!.now!.figure)).toBe('0.018 pu');
    expect(charging!.now!.interval).toBe('0.0165 to 0.0185');
  });
});

describe('held against the register', () => {
  it('charging against the expected one, mismatches against the class budget in words, the angle as asymmetry', () => {
    const rows = againstRows(separatedWith(), null, context);
    expect(rows.map(({ name, now }) => `${name}: ${plain(now.words)}`)).toEqual([
      'charging: 14.0 A (13.2 to 14.8), expected 13.8 A',
      'ratio of Hask: 4.90 % (4.60 to 5.20), beyond the class budget',
      'angle of Hask: −0.52° (−0.60 to −0.44), within the class budget',
      'that angle as channel asymmetry: −0.058 ms (−0.067 to −0.049)',
    ]);
    expect(rows.map(({ now }) => now.beyond)).toEqual([false, true, false, false]);
  });

  it('charging off the expected one is said to be so only beyond its interval', () => {
    const off = againstRows(separatedWith({ chargingAmps: estimate(16.56, 0.5) }), null, context);
    expect(plain(off[0]!.now.words)).toBe('16.6 A (16.1 to 17.1), expected 13.8 A: 20 % more');
  });

  it('a missing line constant and a missing class are said', () => {
    const rows = againstRows(
      separatedWith({ expectedChargingAmps: null, mismatches: [mismatchWith({ ratioBudget: null })] }),
      null,
      context,
    );
    expect(rows[0]!.now.words).toContain('a line constant is missing');
    expect(rows[1]!.now.words).toContain('no class to hold it against');
  });

  it('the small print carries days, snapshots, residual and condition', () => {
    expect(plain(qualityWords(separatedWith(), context))).toBe(
      '30 days, 1,980 qualified snapshots; residual 0.8 A rms; condition number 41.6',
    );
    expect(qualityWords(notSeparable, context)).toBe('4 days, 800 qualified snapshots');
  });
});
