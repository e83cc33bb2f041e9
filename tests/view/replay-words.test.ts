import { describe, expect, it } from 'vitest';
import type { ReplayPhase, ReplaySide, ReplaySummary } from '../../src/contract/replay';
import {
  coverageSentences,
  markSentence,
  resultSentence,
  utilisationText,
} from '../../src/view/replay-words';

const letters = { a: 'L1', b: 'L2', c: 'L3' };
const plain = (text: string | undefined) => text?.replaceAll('\u00a0', ' ');

const phase = (utilisation: number | null, change: Partial<ReplayPhase> = {}): ReplayPhase => ({
  evaluated: 10,
  greatest:
    utilisation === null
      ? null
      : {
          at: '2026-03-02T10:00:00.000Z',
          utilisation,
          differentialAmps: 100 * utilisation,
          restraintAmps: 500,
          thresholdAmps: 100,
          region: null,
          settingsVersion: 1,
        },
  near: { snapshots: 0, durationMs: 0 },
  over: { snapshots: 0, durationMs: 0 },
  ...change,
});

const side = (a: number | null, b: number | null, change: Partial<ReplaySide> = {}): ReplaySide => ({
  evaluated: 10,
  notComputable: [],
  compensationFellBack: 0,
  phases: { a: phase(a), b: phase(b), c: phase(0.01) },
  ...change,
});

const summary = (recorded: ReplaySide, replayed: ReplaySide, snapshots = 10): ReplaySummary => ({
  line: 'arden-birk',
  settings: {
    characteristic: { kind: 'alpha-plane', pickupAmps: 1, radius: 2, angleDeg: 90 },
    restraint: { kind: 'none' },
    chargingCompensation: false,
  },
  from: '2026-03-01T10:00:00.000Z',
  to: '2026-03-02T10:00:00.000Z',
  nearRatio: 0.7,
  snapshots,
  firstAt: null,
  lastAt: null,
  underTest: 0,
  recorded,
  replayed,
});
const NOTHING: ReplaySide = {
  ...side(null, null),
  evaluated: 0,
  phases: { a: phase(null), b: phase(null), c: phase(null) },
};

describe('the sentence of a replay', () => {
  it.each([
    [
      summary(side(0.2, 0.48), side(0.3, 0.61)),
      'With these settings phase L2 would have reached at most 61 % of the threshold; with the recorded ones 48 %.',
    ],
    [
      summary(side(0.5, 0.48), side(0.3, 0.61)),
      'With these settings phase L2 would have reached at most 61 % of the threshold; with the recorded ones the greatest was 50 %, of phase L1.',
    ],
    [
      summary(NOTHING, side(0.3, 0.61)),
      'With these settings phase L2 would have reached at most 61 % of the threshold; with the recorded ones nothing could be evaluated.',
    ],
    [summary(side(0.2, 0.4), NOTHING), 'None of the 10 snapshots could be evaluated under these settings.'],
    [
      summary(NOTHING, NOTHING, 0),
      'Nothing is stored of this line in this period, so there is nothing to replay.',
    ],
  ])('says what both sides came to', (given, sentence) => {
    expect(plain(resultSentence(given, letters))).toBe(sentence);
  });

  it('speaks of utilisation where a side has no threshold', () => {
    const region = side(0.2, 0.5);
    const point = { ...region.phases.b.greatest!, thresholdAmps: null, restraintAmps: null };
    const given = summary(side(0.2, 0.4), {
      ...region,
      phases: { ...region.phases, b: { ...region.phases.b, greatest: point } },
    });
    expect(plain(resultSentence(given, letters))).toBe(
      'With these settings phase L2 would have reached a utilisation of at most 50 %; with the recorded ones 40 %.',
    );
  });

  it('never rounds a utilisation across a mark', () => {
    expect([0.0444, 0.0996, 0.6999, 0.9999, 1].map((ratio) => plain(utilisationText(ratio, 0.7)))).toEqual([
      '4.4 %',
      '10 %',
      '69.9 %',
      '99.9 %',
      '100 %',
    ]);
    expect(utilisationText(null, 0.7)).toBe('not computable');
  });

  it('adds what a mark that was reached means', () => {
    expect(markSentence(summary(side(0.2, 0.4), side(0.3, 0.6)))).toBeUndefined();
    const over = side(0.3, 1.2);
    const b = { ...over.phases.b, over: { snapshots: 3, durationMs: 6_000 } };
    const given = summary(side(0.2, 0.4), { ...over, phases: { ...over.phases, b } });
    expect(plain(markSentence(given))).toBe(
      'At or above 100 % a scheme operates: 3 snapshots, 6.0 s of that phase.',
    );
  });
});

describe('what is said of the snapshots', () => {
  it('is how many were evaluated and why others were not, on each side where they differ', () => {
    const silent = { reason: 'Nothing was heard of Birk.', snapshots: 2 };
    const recorded = side(0.2, 0.4, {
      evaluated: 7,
      notComputable: [silent, { reason: 'No settings were in force at this instant.', snapshots: 1 }],
    });
    const replayed = side(0.2, 0.4, { evaluated: 8, notComputable: [silent], compensationFellBack: 4 });
    expect(coverageSentences({ ...summary(recorded, replayed, 11), underTest: 1 })).toEqual([
      'Of 11 snapshots, 8 were evaluated with these settings and 7 with the recorded ones.',
      'Not computable with these settings: Nothing was heard of Birk (2 snapshots).',
      'Not computable with the recorded ones: Nothing was heard of Birk (2 snapshots); No settings were in force at this instant (1 snapshot).',
      'Set aside, since a terminal was under test: 1 snapshot.',
      'With these settings, the charging current stayed in for want of valid voltages in 4 snapshots.',
    ]);
  });

  it('is short where all were evaluated', () => {
    expect(coverageSentences(summary(side(0.1, 0.2), side(0.1, 0.2)))).toEqual([
      '10 snapshots, all evaluated.',
    ]);
  });
});
