import { describe, expect, it } from 'vitest';
import type { RegisterLine } from '../../src/contract/register';
import type { SettingsVersion } from '../../src/contract/settings-version';
import {
  comparedPair,
  comparedSentence,
  comparedVersions,
  conventionCaution,
} from '../../src/view/register-compare';
import { missingConstants } from '../../src/view/register-missing';
import { hindrances } from '../../src/view/register-words';
import { newLine, settingsSent, terminalSent } from './made-up-line';

function version(id: number, change: Record<string, unknown> = {}): SettingsVersion {
  const recorded = { id, recordedBy: 'Mira Holt', recordedAt: '2026-03-01T10:00:00.000Z' };
  return { ...recorded, chargingCompensation: false, ...settingsSent(change) } as unknown as SettingsVersion;
}
const twoSlope = settingsSent().characteristic as object;
const first = version(1);
const second = version(2, {
  validFrom: '2026-04-01T00:00:00.000Z',
  characteristic: { ...twoSlope, pickupAmps: 120.4, slope2: 0.605 },
  restraint: { kind: 'maximum' },
});
const alpha = version(3, {
  validFrom: '2026-05-01T00:00:00.000Z',
  characteristic: { kind: 'alpha-plane', pickupAmps: 100, radius: 6, angleDeg: 195 },
  restraint: { kind: 'none' },
});
const comparison = { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 120 };

function line(change: Record<string, unknown> = {}): RegisterLine {
  const { terminals, ...entry } = newLine(change);
  return {
    ...entry,
    terminals: terminals.map((one, position) => ({ ...one, position })),
    settings: [first],
  };
}

describe('two versions', () => {
  it('are compared field by field, to the last decimal', () => {
    const compared = comparedVersions(first, second, 'UTC');
    expect(
      compared.settings.filter(({ changed }) => changed).map(({ name, from, to }) => [name, from, to]),
    ).toEqual([
      ['pickup', '120 A', '120.4 A'],
      ['second slope', '60 %', '60.5 %'],
      ['restraint', '½ sum of magnitudes', 'greatest magnitude'],
    ]);
    expect(comparedSentence(compared)).toBe('3 settings differ.');
    expect(comparedSentence(comparedVersions(first, first, 'UTC'))).toContain('same settings');
  });

  it('of two kinds show what only one of them has', () => {
    const { settings } = comparedVersions(first, alpha, 'UTC');
    expect(settings.find(({ name }) => name === 'knee')).toMatchObject({ from: '1500 A', to: undefined });
    expect(settings.find(({ name }) => name === 'radius')).toMatchObject({ from: undefined, to: '6' });
  });

  it('with restraints of two conventions are drawn with that said', () => {
    expect(conventionCaution({ from: first, to: second })).toContain('the greatest magnitude in the later');
    expect(conventionCaution({ from: first, to: first })).toBeUndefined();
  });

  it('are the ones asked for, else the one in force and the one before it', () => {
    const settings = [first, second, alpha];
    const ids = (from: number, to: number) => {
      const pair = comparedPair(settings, { from, to, inForceId: 2 });
      return [pair?.from.id, pair?.to.id];
    };
    expect(ids(3, 1)).toEqual([3, 1]);
    expect(ids(NaN, NaN)).toEqual([1, 2]);
    expect(ids(NaN, 3)).toEqual([2, 3]);
    expect(comparedPair([first], { from: NaN, to: NaN, inForceId: 1 })).toBeUndefined();
  });
});

describe('a line', () => {
  it('names the constants that it lacks and what needs them', () => {
    const missing = missingConstants(line({ capacitanceNfPerKm: null }));
    expect(missing.map(({ constant }) => constant)).toEqual([
      'Capacitance',
      'Least internal fault current',
      'Transformer class at Birk',
    ]);
    expect(missing[0]?.needed).toContain('charging current');
  });

  it('that was given a third terminal says that its phase comparison no longer fits', () => {
    const inForce = version(4, { characteristic: comparison, restraint: { kind: 'none' } });
    const three = line({ terminals: ['a', 'b', 'c'].map(terminalSent) });
    expect(hindrances(three, inForce)).toEqual([
      'The settings in force do not fit the line. A phase comparison weighs two terminals against each other; this line has 3.',
    ]);
    expect(hindrances(line(), inForce)).toEqual([]);
  });

  it('whose feed holds magnitudes says that a scheme of phasors is not evaluated', () => {
    expect(hindrances(line({ goesBy: 'reported' }), alpha)[0]).toContain('holds magnitudes alone');
  });
});
