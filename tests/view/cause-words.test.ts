import { describe, expect, it } from 'vitest';
import type { WarningCause } from '../../src/contract/warning';
import { causeWords, lineReason, type WordsContext } from '../../src/view/cause-words';
import {
  AT_MS,
  blindLine,
  CREEP,
  lineWith,
  NOTHING_COMPUTED,
  phaseAt,
  SITE,
  warningWith,
} from './sample-lines';

const context: WordsContext = { site: SITE, nowMs: AT_MS, substations: lineWith().substations };
const plain = ({ lead, rest }: { lead: string; rest: string }) => `${lead}|${rest}`.replaceAll('\u00a0', ' ');

describe('a cause in words', () => {
  const causes: readonly (readonly [WarningCause, string])[] = [
    [
      {
        basis: 'utilisation',
        phase: 'c',
        utilisation: 0.76,
        limit: 0.7,
        differentialAmps: 46.4,
        thresholdAmps: 61,
      },
      'Phase L3 at 76 % of its threshold|: 46 A against 61 A.',
    ],
    [
      { basis: 'standing level', phase: 'a', levelAmps: 45, pickupAmps: 60, limit: 0.7 },
      'Phase L1 has stood at 75 % of the pickup for a day|: 45 A of 60 A.',
    ],
    [
      { basis: 'creep', creep: CREEP },
      'Phase L2 rises 3.4 A a month (2.9 to 3.9).| Near mark likely in the second half of January (28 Dec 2026 to 4 Mar 2027).',
    ],
    [
      { basis: 'terminal silent', terminals: ['hask'] },
      'Hask is silent.| The differential cannot be computed.',
    ],
    [
      { basis: 'validity', terminals: ['hask', 'skelder'] },
      'Hask and Skelder mark their values as not good.| The differential cannot be computed.',
    ],
    [
      { basis: 'clock', terminals: ['skelder'] },
      'Skelder has lost its common time.| The differential cannot be computed.',
    ],
  ];
  it.each(causes)('%o', (cause, words) => expect(plain(causeWords(cause, context))).toBe(words));
});

describe("a line's reason", () => {
  it('tells the figure of now and how long the warning has stood', () => {
    const line = lineWith({
      condition: 'near',
      phases: { a: phaseAt(0.71), b: phaseAt(0.69), c: phaseAt(0.78) },
      warnings: [warningWith()],
      chargingAmps: 35,
    });
    expect(plain(lineReason(line, context))).toBe(
      'Phase L3 at 78 % of its threshold| for 4 min: 78 A against 100 A. Charging alone takes 58 % of the pickup.',
    );
  });

  it('tells the standing level when the utilisation of now is not what makes the line near', () => {
    const cause = { basis: 'standing level', phase: 'a', levelAmps: 45, pickupAmps: 60, limit: 0.7 } as const;
    const line = lineWith({ condition: 'near', warnings: [warningWith({ cause })] });
    expect(lineReason(line, context).lead.replaceAll('\u00a0', ' ')).toBe(
      'Phase L1 has stood at 75 % of the pickup for a day',
    );
  });

  it('tells whom a blind line misses and since when', () => {
    const cause: WarningCause = { basis: 'terminal silent', terminals: ['hask'] };
    const line = blindLine({ warnings: [warningWith({ kind: 'blind', cause })] });
    expect(plain(lineReason(line, context))).toBe(
      'Hask is silent.| The differential cannot be computed. Blind for 4 min.',
    );
  });

  it('goes by the reason of the result while no warning stands', () => {
    expect(lineReason(blindLine(), context)).toEqual({ lead: 'Hask has sent nothing.', rest: '' });
  });

  it('tells a line past its near mark when it meets the pickup', () => {
    const line = lineWith({ condition: 'rising', creep: [{ ...CREEP, levelNowAmps: 44 }] });
    expect(lineReason(line, context).rest).toBe(
      ' It is past the near mark; pickup likely in the second half of June (from 1 May 2027, latest beyond five years).',
    );
  });

  it.each(['over', 'near', 'rising', 'blind', 'not evaluated', 'out of service'] as const)(
    'of a line that is %s never prints NaN, null or undefined, whatever is missing',
    (condition) => {
      const line = blindLine({ condition, reason: null, pickupAmps: null, chargingAmps: null });
      const some = { ...line, phases: { ...line.phases, a: { ...NOTHING_COMPUTED, utilisation: 0.8 } } };
      for (const one of [line, some])
        expect(plain(lineReason(one, context))).not.toMatch(/NaN|null|undefined|Infinity/);
    },
  );
});
