import { describe, expect, it } from 'vitest';
import type { Comparison } from '../../src/contract/standing';
import type { SettingsVersion } from '../../src/contract/settings-version';
import {
  comparedDate,
  comparisonSentence,
  comparisonTable,
  knownChanges,
  mostMovedPhase,
  turnedTable,
} from '../../src/view/line-comparison';
import { notSeparable, separatedWith, verdictWith } from './sample-compositions';
import { SITE } from './sample-lines';

type Phase = Comparison['phases'][number];
const phaseWith = (change: Partial<Phase> = {}): Phase => ({
  phase: 'b',
  before: { days: 60, medianAmps: 40, composition: separatedWith() },
  after: { days: 41, medianAmps: 28, composition: notSeparable },
  test: { pTwoSided: 3.2e-9, shiftAmps: { value: -12, low: -14, high: -10 } },
  atReference: null,
  ...change,
});
const context = { day: '2026-05-03', letters: SITE.phaseLetters };
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('the date in the address', () => {
  it.each([
    [null, { kind: 'none' }],
    ['', { kind: 'none' }],
    ['2026-05-03', { kind: 'date', day: '2026-05-03' }],
    ['2026-02-30', { kind: 'no date', typed: '2026-02-30' }],
    ['3 May', { kind: 'no date', typed: '3 May' }],
  ])('%s', (typed, date) => expect(comparedDate(typed)).toEqual(date));
});

describe('before and after in a sentence', () => {
  it('says lower by how much, with interval and p', () => {
    expect(plain(comparisonSentence(phaseWith(), context))).toBe(
      'After 3 May 2026 the standing level of phase L2 is lower by 12 A (95 %: 10 to 14), p < 0.0001; median 40 A on 60 days before, 28 A on 41 days after.',
    );
  });

  it('says higher, with a tenth for small shifts', () => {
    const test = { pTwoSided: 0.0123, shiftAmps: { value: 1.8, low: 0.4, high: 3.1 } };
    expect(plain(comparisonSentence(phaseWith({ test }), context))).toContain(
      'is higher by 1.8 A (95 %: 0.4 to 3.1), p = 0.0123;',
    );
  });

  it('goes by one and the same load where both sides have a composition', () => {
    const test = { pTwoSided: 0.0021, shiftAmps: { value: -5, low: -6.1, high: -4.2 } };
    const atReference = { throughAmps: 412, beforeAmps: 31, afterAmps: 26, test };
    expect(plain(comparisonSentence(phaseWith({ atReference }), context))).toBe(
      'After 3 May 2026 the standing level of phase L2 at one and the same load (412 A through) is lower by 5.0 A (95 %: 4.2 to 6.1), p = 0.0021; median 31 A on 60 days before, 26 A on 41 days after.',
    );
  });

  it('an interval that holds 0 tells no shift', () => {
    const test = { pTwoSided: 0.42, shiftAmps: { value: 0.3, low: -0.5, high: 1.1 } };
    expect(plain(comparisonSentence(phaseWith({ test }), context))).toContain(
      'no shift of the standing level of phase L2 can be told: +0.3 A (95 %: −0.5 to 1.1), p = 0.4200;',
    );
  });

  it('a level that drifts by itself is said to, and no shift is told', () => {
    expect(plain(comparisonSentence(phaseWith({ test: null }), context))).toBe(
      'The standing level of phase L2 drifts too much by itself to tell a shift on 3 May 2026 from it: median 40 A on 60 days before, 28 A on 41 days after.',
    );
  });

  it('too few days on a side are a sentence, and no number of amperes', () => {
    const sentence = comparisonSentence(
      phaseWith({ after: { days: 1, medianAmps: 28, composition: notSeparable }, test: null }),
      context,
    );
    expect(sentence).toBe(
      'For phase L2 there are 60 days with a standing level before 3 May 2026 and 1 day after it: too few to tell whether it has changed.',
    );
  });
});

describe('before and after in figures', () => {
  const comparison: Comparison = {
    line: 'skelder-hask',
    at: '2026-05-03',
    phases: [phaseWith({ phase: 'a', test: null }), phaseWith()],
  };

  it('a side that is not separable is empty, and not 0', () => {
    const { columns, rows } = comparisonTable(comparison, {
      letters: SITE.phaseLetters,
      name: 'Skelder – Hask',
    });
    const at = (head: string) => rows[1]![columns.findIndex((column) => column.head === head)];
    expect(at('charging before, A')).toBe(14);
    expect(at('charging after, A')).toBeNull();
    expect(at('p')).toBe('3.2e-9');
    expect(rows[0]![5]).toBeNull();
  });

  it('on the screen each figure is a row and each phase a column', () => {
    const table = comparisonTable(comparison, { letters: SITE.phaseLetters, name: 'Skelder – Hask' });
    const { heads, rows } = turnedTable(table);
    expect(heads).toEqual(['phase', 'L1', 'L2']);
    expect(rows.find(([name]) => name === 'shift, A')).toEqual(['shift, A', '–', '−12.00']);
  });

  it('the phase that moved most is shown first', () => {
    expect(mostMovedPhase(comparison)).toBe('b');
  });
});

describe('known changes', () => {
  const version = (validFrom: string) => ({ validFrom }) as SettingsVersion;

  it('are the later settings and the steps by the site’s day, newest first', () => {
    const step = {
      at: '2026-11-22T23:30:00.000Z',
      fromAmps: 28,
      toAmps: 60,
      cause: 'not told',
      place: null,
      isTime: false,
      channelPathChanged: false,
    } as const;
    const settings = [version('2026-05-12T08:00:00.000Z'), version('2022-06-20T08:00:00.000Z')];
    expect(knownChanges(settings, [verdictWith({ step })], SITE)).toEqual([
      { day: '2026-11-23', words: 'phase L2 stepped' },
      { day: '2026-05-12', words: 'settings changed' },
    ]);
  });
});
