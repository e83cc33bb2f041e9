import { describe, expect, it } from 'vitest';
import type { Terminal } from '../../src/contract/register';
import type { TerminalResult } from '../../src/contract/result';
import type { SettingsVersion } from '../../src/contract/settings-version';
import { lineFacts } from '../../src/view/line-facts';
import { missingFiguresReason, phaseRows } from '../../src/view/line-phase-rows';
import { settingsRows } from '../../src/view/line-settings-rows';
import { silences, terminalPanels } from '../../src/view/line-terminal-rows';
import { warningRows, withChangedWarnings } from '../../src/view/line-warning-rows';
import { phaseFromAddress, worstStandingPhase } from '../../src/view/trend-phase';
import { AT, AT_MS, blindLine, lineWith, phaseAt, SITE, warningWith } from './sample-lines';

const MINUTE_MS = 60_000;
const ago = (ms: number) => new Date(AT_MS - ms).toISOString();

const version = (id: number, validFrom: string): SettingsVersion => ({
  id,
  validFrom,
  characteristic: {
    kind: 'two-slope',
    pickupAmps: 60,
    slope1: 0.2,
    kneeAmps: 700,
    slope2: 0.6,
    slopeStart: 'from-zero',
  },
  restraint: { kind: 'scaled-sum', factor: 0.5 },
  chargingCompensation: false,
  note: 'First copy.',
  recordedBy: 'Maren Oduya',
  recordedAt: validFrom,
});

describe('the facts beside a name', () => {
  const context = {
    terminalCount: 3,
    inForce: version(1, '2026-05-12T10:00:00.000Z'),
    timeZone: 'Europe/Berlin',
  };

  it('say voltage, length and kind, terminals, settings and load', () => {
    expect(lineFacts(lineWith(), context)).toEqual([
      '110\u00a0kV',
      '18.4\u00a0km overhead',
      'three terminals',
      'settings of 12 May 2026',
      '50\u00a0% of rating',
    ]);
  });

  it('name the owner where one is recorded', () => {
    expect(lineFacts(lineWith({ owner: 'Tarnside Transmission' }), context)).toContain(
      'of Tarnside Transmission',
    );
  });

  it('name what makes a line special, and that settings are missing', () => {
    const special = lineWith({
      seriesCompensated: true,
      goesBy: 'reported',
      inZoneTransformer: {
        otherVoltageKv: 220,
        clockNumber: 5,
        otherTerminals: ['hask'],
        removesZeroSequence: { line: true, other: true },
      },
    });
    const facts = lineFacts(special, { ...context, inForce: undefined });
    expect(facts).toContain('series-compensated');
    expect(facts).toContain('by reported magnitudes');
    expect(facts).toContain('transformer in the zone to 220\u00a0kV');
    expect(facts).toContain('no settings recorded');
  });
});

const OTHER_KINDS = [
  {
    characteristic: {
      kind: 'adaptive',
      pickupAmps: 70,
      ctErrors: [{ terminal: 'hask', errorBelow: 0.01, errorAbove: 0.05, limitAmps: 1200 }],
      timeErrorMs: 0.05,
    },
    restraint: { kind: 'error-sum' },
    says: [
      'kind: adaptive restraint',
      'pickup: 70\u00a0A',
      'time error: 0.05\u00a0ms',
      'hask: 1\u00a0% up to 1200\u00a0A, 5\u00a0% above',
      'restraint: pickup and sum of errors',
    ],
  },
  {
    characteristic: { kind: 'alpha-plane', pickupAmps: 80, radius: 6, angleDeg: 195 },
    restraint: { kind: 'none' },
    says: ['kind: alpha plane', 'pickup: 80\u00a0A', 'radius: 6', 'angle: 195° around 180°'],
  },
  {
    characteristic: { kind: 'phase-comparison', toleranceDeg: 60, releaseAmps: 120 },
    restraint: { kind: 'none' },
    says: ['kind: phase comparison', 'tolerance: 60°', 'release: 120\u00a0A at both ends'],
  },
] satisfies (Pick<SettingsVersion, 'characteristic' | 'restraint'> & { says: string[] })[];

describe('the rows of the phases', () => {
  it('a phase that cannot be computed has dashes and the reason stands beside', () => {
    const [row] = phaseRows(blindLine(), 'amperes', SITE);
    expect([row?.differential, row?.restraint, row?.threshold, row?.utilisation]).toEqual([
      '–',
      '–',
      '–',
      '–',
    ]);
    expect(missingFiguresReason(blindLine())).toBe('Hask has sent nothing.');
  });

  it('a line that is computed has no reason to give', () => {
    expect(missingFiguresReason(lineWith())).toBeUndefined();
  });

  it('the standing level is told against the pickup', () => {
    const line = lineWith({
      condition: 'near',
      lastDay: { a: { standingAmps: 45, p05Amps: 40, p95Amps: 50 }, b: null, c: null },
    });
    const [a, b] = phaseRows(line, 'amperes', SITE);
    expect(a).toMatchObject({
      letter: 'L1',
      standing: '45\u00a0A',
      shareOfPickup: '75\u00a0%',
      condition: 'near',
    });
    expect(b).toMatchObject({ standing: '–', shareOfPickup: '–' });
  });

  it('per unit is of the rating', () => {
    const [row] = phaseRows(lineWith(), 'per unit', SITE);
    expect(row?.differential).toBe('0.013\u00a0pu');
  });
});

describe('the phase worth looking at first', () => {
  it('is the one in the worst condition', () => {
    const line = lineWith({ phases: { a: phaseAt(0.2), b: phaseAt(0.3), c: phaseAt(0.8) } });
    expect(worstStandingPhase(line, 0.7)).toBe('c');
  });

  it('is the one that stands highest where all are settled', () => {
    const band = (standingAmps: number) => ({ standingAmps, p05Amps: 1, p95Amps: 30 });
    expect(worstStandingPhase(lineWith({ lastDay: { a: band(9), b: band(12), c: band(8) } }), 0.7)).toBe('b');
  });

  it('is read from the address where that names one', () => {
    expect(phaseFromAddress('c')).toBe('c');
    expect(phaseFromAddress('all')).toBe('all');
    expect(phaseFromAddress('d')).toBeUndefined();
  });
});

describe('the terminals', () => {
  const terminal = (key: string, position: number): Terminal => ({
    key,
    position,
    substation: key,
    substationName: key === 'hask' ? 'Hask' : 'Skelder',
    ctPrimaryAmps: 1_000,
    ctClass: '5P20',
    inService: true,
  });
  const result = (key: string, change: Partial<TerminalResult> = {}): TerminalResult => ({
    key,
    present: true,
    current: { a: [412.3, -12.7], b: [410.9, -132.4], c: [411.8, 107.5] },
    voltage: null,
    frequencyHz: 49.98,
    breaker: 'closed',
    clock: { source: 'satellite', error_us: 2 },
    channel: { send_ms: 4.1, receive_ms: 4.7, loss_ppm: 3, path: 'main' },
    validity: 'good',
    test: false,
    ...change,
  });
  const context = {
    goesBy: 'phasors' as const,
    letters: SITE.phaseLetters,
    substations: lineWith().substations,
    silentSince: new Map(),
  };

  it('come in the order of the register, each with what it says', () => {
    const panels = terminalPanels([terminal('hask', 1), terminal('skelder', 0)], [result('hask')], context);
    expect(panels.map((panel) => panel.name)).toEqual(['Skelder', 'Hask']);
    expect(panels[0]?.trouble).toBe('Nothing has been heard of it yet.');
    expect(panels[1]?.phasors[0]).toMatchObject({
      letter: 'L1',
      current: '412\u00a0A',
      currentAngle: '−12.7°',
    });
    expect(panels[1]?.facts).toContainEqual({ name: 'asymmetry', value: '0.60 ms', bad: false });
  });

  it('a silent one says since when', () => {
    const line = blindLine({
      warnings: [
        warningWith({
          kind: 'blind',
          cause: { basis: 'terminal silent', terminals: ['hask'] },
          openedAt: ago(200_000),
          returnedAt: null,
        }),
      ],
    });
    const silentSince = silences(line.warnings, { nowMs: AT_MS, timeZone: 'Europe/Berlin' });
    const silent = result('hask', {
      present: false,
      current: null,
      validity: null,
      breaker: null,
      clock: null,
    });
    const [panel] = terminalPanels([terminal('hask', 0)], [silent], { ...context, silentSince });
    expect(panel?.trouble).toBe('Silent since 14:28:48, for 3\u00a0min 20\u00a0s.');
    expect(panel?.phasors[0]).toMatchObject({ current: '–', currentAngle: '–', voltage: '–' });
    expect(panel?.facts).toEqual([]);
  });

  it('on a line by reported magnitudes one terminal speaks and the silence of the other is no trouble', () => {
    const reported = { ...context, goesBy: 'reported' as const };
    const spoken = result('skelder', { current: null });
    const panels = terminalPanels([terminal('skelder', 0), terminal('hask', 1)], [spoken], reported);
    expect(panels.map(({ trouble }) => trouble)).toEqual([
      undefined,
      'Nothing is expected of it: this line goes by what another terminal reports.',
    ]);
  });

  it('what is not as it should be is marked', () => {
    const odd = result('hask', {
      validity: 'questionable',
      clock: { source: 'free', error_us: 900 },
      breaker: 'open',
      test: true,
    });
    const [panel] = terminalPanels([terminal('hask', 0)], [odd], context);
    expect(panel?.facts.filter(({ bad }) => bad).map(({ name }) => name)).toEqual([
      'values',
      'breaker',
      'clock',
      'test',
    ]);
  });
});

describe('the versions of the settings', () => {
  it('come newest first, and the one in force is marked', () => {
    const rows = settingsRows(
      [version(1, ago(900 * MINUTE_MS)), version(3, ago(-60 * MINUTE_MS)), version(2, ago(60 * MINUTE_MS))],
      { nowMs: AT_MS, timeZone: 'Europe/Berlin' },
    );
    expect(rows.map(({ id, state }) => [id, state])).toEqual([
      [3, 'not yet'],
      [2, 'in force'],
      [1, 'past'],
    ]);
  });

  it('carry their units and the restraint convention', () => {
    const [row] = settingsRows([version(1, AT)], { nowMs: AT_MS, timeZone: 'Europe/Berlin' });
    expect(row?.values).toContainEqual({ name: 'first slope', value: '20\u00a0%, from zero' });
    expect(row?.values).toContainEqual({ name: 'restraint', value: '½ sum of magnitudes' });
    expect(row?.values).toContainEqual({ name: 'charging', value: 'not compensated' });
  });

  it.each(OTHER_KINDS)('of $characteristic.kind carry its own figures and no others', (settings) => {
    const recorded = { ...version(1, AT), ...settings, chargingCompensation: true };
    const [row] = settingsRows([recorded], { nowMs: AT_MS, timeZone: 'Europe/Berlin' });
    expect(row?.values.map(({ name, value }) => `${name}: ${value}`)).toEqual([
      ...settings.says,
      'charging: compensated from voltages',
    ]);
  });
});

describe('the warnings of a line', () => {
  const context = { site: SITE, nowMs: AT_MS, substations: lineWith().substations };
  const past = warningWith({
    id: 1,
    state: 'normal',
    openedAt: ago(60 * MINUTE_MS),
    returnedAt: ago(35 * MINUTE_MS),
    acknowledgedAt: ago(50 * MINUTE_MS),
    acknowledgedBy: 'Ida Brandt',
    note: 'Short peak.',
  });
  const open = warningWith({ id: 2, openedAt: ago(90 * MINUTE_MS), returnedAt: null });

  it('open ones stand before past ones, whatever their age', () => {
    expect(warningRows([past, open], context).map(({ id }) => id)).toEqual([2, 1]);
  });

  it('a past one says when it returned, who acknowledged it and with what note', () => {
    const [row] = warningRows([past], context);
    expect(row).toMatchObject({
      returned: '13:57:08, after 25\u00a0min',
      acknowledged: 'Ida Brandt, 13:42:08',
      note: 'Short peak.',
    });
  });

  it('a change from the stream takes its place unless it is older', () => {
    const newer = { ...open, state: 'acknowledged' as const, changedAt: ago(-1_000) };
    const older = { ...open, state: 'acknowledged' as const, changedAt: ago(9_999 * MINUTE_MS) };
    expect(withChangedWarnings([open], [newer])[0]?.state).toBe('acknowledged');
    expect(withChangedWarnings([open], [older])[0]?.state).toBe(open.state);
    expect(withChangedWarnings([], [newer])).toEqual([newer]);
  });
});
