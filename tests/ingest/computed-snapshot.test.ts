import { describe, expect, it } from 'vitest';
import type { Measurement } from '../../src/contract/feed';
import { allBreakersOpen, computedSnapshot, isUnderTest } from '../../src/ingest/computed-snapshot';
import { packFlags } from '../../src/store/snapshot-flags';
import type { RegisteredLine } from '../../src/store/register';
import {
  AT_MS,
  balanced,
  measurement,
  registeredLine,
  reportedMeasurement,
  rosterLine,
  settingsVersion,
  withTransformer,
} from './made-up-feed';

const CLOCK_LIMIT_US = 100;

function computed(
  sent: Readonly<Record<string, Measurement>>,
  { line, terminals, atMs }: { line?: Partial<RegisteredLine>; terminals?: string[]; atMs?: number } = {},
) {
  return computedSnapshot(
    {
      line: rosterLine(registeredLine(line, terminals)),
      atMs: atMs ?? AT_MS,
      measurements: new Map(Object.entries(sent)),
    },
    CLOCK_LIMIT_US,
  );
}
const with_ = (change: Partial<Measurement>) => measurement(change);
/** Load that goes in at Arden and comes out at Birk but for 8 A. */
const loaded = { arden: measurement(), birk: with_({ current: balanced(392, 180) }) };

describe('a hand-worked snapshot', () => {
  // half-sum restraint; threshold: the pickup of 120 A up to 400 A, then 30 % of restraint
  it.each([
    ['load in opposition', [400, 0], [392, 180], { D: 8, R: 396, T: 120, through: 396 }],
    ['a heavy mismatch on the slope', [1000, 0], [900, 180], { D: 100, R: 950, T: 285, through: 950 }],
    ['an internal fault', [3000, -80], [2000, -80], { D: 5000, R: 2500, T: 1050, through: 2500 }],
    ['an end turned by 120°', [100, 0], [100, 120], { D: 100, R: 100, T: 120, through: 100 }],
    ['an angle error of 2.3°', [600, 0], [600, 177.7], { D: 24.084, R: 600, T: 180, through: 600 }],
    ['no load but charging', [6, 90], [5, 90], { D: 11, R: 5.5, T: 120, through: 5.5 }],
  ] as const)('of %s has the exact figures', (_, arden, birk, { D, R, T, through }) => {
    const snapshot = computed({
      arden: with_({ current: balanced(arden[0], arden[1]) }),
      birk: with_({ current: balanced(birk[0], birk[1]) }),
    });
    for (const phase of ['a', 'b', 'c'] as const) {
      expect(snapshot.points?.[phase].differentialAmps).toBeCloseTo(D, 2);
      expect(snapshot.points?.[phase].restraintAmps).toBeCloseTo(R, 9);
      expect(snapshot.points?.[phase].thresholdAmps).toBeCloseTo(T, 9);
      expect(snapshot.points?.[phase].utilisation).toBeCloseTo(D / T, 5);
    }
    expect(snapshot.throughAmps).toBeCloseTo(through, 9);
    expect(snapshot).toMatchObject({ unevaluable: undefined, flags: 0 });
  });

  it('keeps the phases apart', () => {
    const snapshot = computed({
      arden: with_({ current: { a: [400, 0], b: [400, -120], c: [400, 120] } }),
      birk: with_({ current: { a: [400, 180], b: [390, 60], c: [340, -60] } }),
    });
    const differentials = [snapshot.points?.a, snapshot.points?.b, snapshot.points?.c].map(
      (point) => point?.differentialAmps,
    );
    expect(differentials[0]).toBeCloseTo(0, 9);
    expect(differentials[1]).toBeCloseTo(10, 9);
    expect(differentials[2]).toBeCloseTo(60, 9);
    expect(snapshot.throughAmps).toBeCloseTo((400 + 395 + 370) / 3, 9);
  });

  it('of three terminals adds all of them', () => {
    const snapshot = computed(
      {
        arden: with_({ current: balanced(500, 0) }),
        birk: with_({ current: balanced(300, 180) }),
        corl: with_({ current: balanced(190, 180) }),
      },
      { terminals: ['arden', 'birk', 'corl'] },
    );
    expect(snapshot.points?.a.differentialAmps).toBeCloseTo(10, 9);
    expect(snapshot.points?.a.restraintAmps).toBeCloseTo(495, 9);
    expect(snapshot.points?.a.thresholdAmps).toBeCloseTo(148.5, 9);
  });

  it('restrains by the greatest current where the settings say so', () => {
    const settings = [
      { ...settingsVersion(1, '2026-01-01T00:00:00.000Z', 120), restraint: { kind: 'maximum' } as const },
    ];
    const snapshot = computed(loaded, { line: { settings } });
    expect(snapshot.points?.b.restraintAmps).toBeCloseTo(400, 9);
    expect(snapshot.throughAmps).toBeCloseTo(396, 9);
  });
});

describe('a snapshot without a differential', () => {
  it('is one that lacks a terminal, and names it', () => {
    const snapshot = computed({ birk: measurement() });
    expect(snapshot).toMatchObject({
      points: undefined,
      throughAmps: undefined,
      unevaluable: { by: 'feed', cause: { basis: 'terminal silent', terminals: ['arden'] } },
      flags: packFlags({ incomplete: true }),
    });
  });

  it('is one of which nothing came at all', () => {
    expect(computed({}).unevaluable).toEqual({
      by: 'feed',
      cause: { basis: 'terminal silent', terminals: ['arden', 'birk'] },
    });
  });

  it('is one with an invalid measurement', () => {
    expect(computed({ ...loaded, birk: with_({ validity: 'invalid' }) })).toMatchObject({
      points: undefined,
      unevaluable: { by: 'feed', cause: { basis: 'validity', terminals: ['birk'] } },
      flags: packFlags({ validityNotGood: true, validityInvalid: true }),
    });
  });

  it('is one with a clock that runs free', () => {
    expect(computed({ ...loaded, arden: with_({ clock: { source: 'free', error_us: 1 } }) })).toMatchObject({
      points: undefined,
      unevaluable: { by: 'feed', cause: { basis: 'clock', terminals: ['arden'] } },
      flags: packFlags({ clockBeyondLimit: true }),
    });
  });

  it('is one of a line without settings, though what flows through is known', () => {
    const snapshot = computed(loaded, { line: { settings: [] } });
    expect(snapshot).toMatchObject({
      points: undefined,
      unevaluable: { by: 'register', reason: 'The register holds no settings for this line.' },
      flags: packFlags({ notEvaluated: true }),
    });
    expect(snapshot.throughAmps).toBeCloseTo(396, 9);
  });

  it('is one of before the first settings were in force', () => {
    const snapshot = computed(loaded, { atMs: Date.parse('2025-12-31T23:59:58Z') });
    expect(snapshot.unevaluable).toEqual({
      by: 'register',
      reason: 'No settings were in force at this instant.',
    });
  });

  const unjudgeable: [string, Partial<RegisteredLine>, RegExp][] = [
    [
      'with a transformer in its zone and no terminal behind it',
      withTransformer(),
      /does not say which terminals are behind it/,
    ],
    ['with one terminal', { terminals: registeredLine().terminals.slice(0, 1) }, /at least two/],
  ];
  it.each(unjudgeable)('is one of a line %s', (_, line, reason) => {
    const snapshot = computed(loaded, { line });
    expect(snapshot.points).toBeUndefined();
    expect(snapshot.unevaluable).toMatchObject({
      by: 'register',
      reason: expect.stringMatching(reason) as string,
    });
  });
});

describe('the settings that judge a snapshot', () => {
  const settings = [
    settingsVersion(1, '2026-01-01T00:00:00.000Z', 120),
    settingsVersion(2, '2026-03-02T10:00:00.000Z', 160),
    settingsVersion(3, '2026-06-01T00:00:00.000Z', 200),
  ];

  it.each([
    ['the millisecond before a new version', AT_MS - 1, 1, 120],
    ['the instant from which it is valid', AT_MS, 2, 160],
    ['months later', Date.parse('2026-12-01T00:00:00Z'), 3, 200],
  ])('are those in force at its instant: %s', (_, atMs, version, thresholdAmps) => {
    const snapshot = computed(loaded, { line: { settings }, atMs });
    expect(snapshot.version?.id).toBe(version);
    expect(snapshot.points?.a.thresholdAmps).toBe(thresholdAmps);
  });
});

describe('a line that goes by reported magnitudes', () => {
  const line = { goesBy: 'reported' } as const;
  const recorded = (restraint: RegisteredLine['settings'][number]['restraint']) => ({
    ...line,
    settings: [{ ...settingsVersion(1, '2026-01-01T00:00:00.000Z', 120), restraint }],
  });

  it('stands where its first terminal says, against the recorded threshold', () => {
    const snapshot = computed({ arden: reportedMeasurement() }, { line });
    expect(snapshot.points).toEqual({
      a: { differentialAmps: 9, restraintAmps: 400, thresholdAmps: 120, utilisation: 9 / 120 },
      b: { differentialAmps: 8, restraintAmps: 410, thresholdAmps: 123, utilisation: 8 / 123 },
      c: { differentialAmps: 12, restraintAmps: 390, thresholdAmps: 120, utilisation: 12 / 120 },
    });
  });

  it('goes by them even where the terminal sends its own phasors as well', () => {
    const both = measurement({ reported: reportedMeasurement().reported });
    const snapshot = computed({ arden: both }, { line });
    expect(snapshot.points?.c.differentialAmps).toBe(12);
    expect(snapshot.throughAmps).toBe(400);
  });

  it.each([
    ['half the sum', { kind: 'scaled-sum', factor: 0.5 }, 400],
    ['the whole sum', { kind: 'scaled-sum', factor: 1 }, 200],
    ['the greatest current', { kind: 'maximum' }, 400],
  ] as const)('has a through current by what its restraint is formed from: %s', (_, restraint, through) => {
    expect(computed({ arden: reportedMeasurement() }, { line: recorded(restraint) }).throughAmps).toBe(
      through,
    );
  });

  it('has none while no settings say how the restraint is formed', () => {
    const snapshot = computed({ arden: reportedMeasurement() }, { line: { ...line, settings: [] } });
    expect(snapshot.throughAmps).toBeUndefined();
  });

  it('needs no common time: a free clock does not blind it', () => {
    const free = reportedMeasurement({ clock: { source: 'free', error_us: 900 } });
    expect(computed({ arden: free }, { line }).points?.a.differentialAmps).toBe(9);
  });
});

describe('what a snapshot is flagged with', () => {
  it.each([
    ['a questionable measurement', { validity: 'questionable' }, { validityNotGood: true }],
    ['a terminal under test', { test: true }, { test: true }],
    ['an open breaker', { breaker: 'open' }, { breakerOpen: true }],
    [
      'a clock error above the limit',
      { clock: { source: 'satellite', error_us: 101 } },
      { clockBeyondLimit: true },
    ],
    ['a clock error at the limit', { clock: { source: 'channel', error_us: 100 } }, {}],
  ] as const)('is %s of any terminal', (_, change, flags) => {
    const snapshot = computed({ ...loaded, birk: with_({ current: balanced(392, 180), ...change }) });
    expect(snapshot.flags).toBe(packFlags(flags));
    expect(snapshot.points?.a.differentialAmps).toBeCloseTo(8, 9);
  });

  it('does not depend on whether a terminal out of service was heard in time', () => {
    const [arden, birk, corl] = registeredLine({}, ['arden', 'birk', 'corl']).terminals;
    const line = { terminals: [arden!, birk!, { ...corl!, inService: false }] };
    const silent = computed(loaded, { line });
    const heard = computed(
      { ...loaded, corl: with_({ breaker: 'open', test: true, validity: 'invalid' }) },
      { line },
    );
    expect(heard.flags).toBe(silent.flags);
    expect(heard.points).toEqual(silent.points);
    expect(isUnderTest(heard)).toBe(false);
  });

  it('is under test when one terminal is', () => {
    expect(isUnderTest(computed({ ...loaded, arden: with_({ test: true }) }))).toBe(true);
  });
});

describe('a line whose breakers are all open', () => {
  const open = with_({ breaker: 'open', current: balanced(0, 0) });
  it('is told from one with a breaker closed, and from one of which nothing is known', () => {
    expect(allBreakersOpen(computed({ arden: open, birk: open }))).toBe(true);
    expect(allBreakersOpen(computed({ arden: open, birk: measurement() }))).toBe(false);
    expect(allBreakersOpen(computed({}))).toBe(false);
  });
});
