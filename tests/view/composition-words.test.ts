import { describe, expect, it } from 'vitest';
import type { CompositionOnWire } from '../../src/contract/composition';
import type { StepOnWire } from '../../src/contract/standing';
import {
  budgetWords,
  driftWords,
  emergencyWords,
  monthsWords,
  stepWords,
} from '../../src/view/composition-words';
import { movedCauses } from '../../src/view/cause-names';
import type { StandingWordsContext } from '../../src/view/composition-words';
import { stepInWindowWords, weakWords, whyTitle } from '../../src/view/composition-why';
import { estimate, mismatchWith, notSeparable, separatedWith, verdictWith } from './sample-compositions';
import { AT_MS, lineWith, SITE } from './sample-lines';

const { substations } = lineWith();
const context: StandingWordsContext = {
  unit: 'amperes',
  ratingAmps: 800,
  substations,
  site: SITE,
  nowMs: AT_MS,
};
const plain = (text: string | undefined) => text?.replaceAll('\u00a0', ' ');

const STEP: StepOnWire = {
  at: '2026-11-22T13:00:00.000Z',
  fromAmps: 28,
  toAmps: 60,
  cause: 'angle mismatch',
  place: { terminal: 'hask', against: null },
  isTime: false,
  channelPathChanged: true,
};

describe('a step in words', () => {
  it('says when by the site’s clock, how far, which term moved and that the channel’s path did', () => {
    expect(plain(stepWords(STEP, context))).toBe(
      'On 22 Nov 2026 at 14:00 the level stepped from 28 to 60 A; the angle mismatch of Hask moved, and the channel’s path changed at the same time: that points to the channel.',
    );
  });

  it('says that a cause can’t be told where none was', () => {
    const untold = {
      ...STEP,
      cause: 'not told',
      place: null,
      isTime: false,
      channelPathChanged: false,
    } as const;
    expect(plain(stepWords(untold, context))).toMatch(/to 60 A; which cause moved can’t be told\.$/);
  });
});

describe('a drift as a planner needs it', () => {
  it('goes by one and the same load, names the months and what moved', () => {
    expect(plain(driftWords(verdictWith(), context))).toBe(
      'Phase L2 rises 0.9 A a month, 95 % between 0.6 and 1.2 at one and the same load (412 A through); near mark in March to June 2027; ratio mismatch of Hask moved, charging did not.',
    );
  });

  it('as measured says that the load is in it, and whether it counts all the same', () => {
    const measured = (change: Parameters<typeof verdictWith>[0]) =>
      plain(driftWords(verdictWith({ creepAtReference: null, ...change }), context));
    expect(measured({ loadTakenOutBy: null, measuredCounts: true })).toMatch(
      /^Phase L2 rises 3\.4 A a month, 95 % between 2\.9 and 3\.9 as measured, load included;/,
    );
    expect(measured({ loadTakenOutBy: null, measuredCounts: false })).toContain(
      ' as measured, load included: the load has changed as well, so it raises no warning;',
    );
    expect(measured({ loadTakenOutBy: 'composition' })).toContain(
      ' as measured, load included: none of it is left at one and the same load;',
    );
  });

  it('without an earlier composition names the likely cause as likely', () => {
    const words = driftWords(verdictWith({ compositionBefore: null }), context);
    expect(plain(words)).toMatch(/; likely ratio mismatch of Hask\.$/);
  });

  it('past the near mark tells when it meets the pickup', () => {
    expect(driftWords(verdictWith({ shareOfPickup: 0.75 }), context)).toContain(
      '; past the near mark, pickup from January 2028 on;',
    );
  });

  it('no significant drift is no sentence', () => {
    expect(driftWords(verdictWith({ creep: null, creepAtReference: null }), context)).toBeUndefined();
  });
});

describe('where a mismatch is', () => {
  const said = (change: Parameters<typeof verdictWith>[0]) => plain(driftWords(verdictWith(change), context));

  it('is said of one terminal against the other where the two can’t be told apart', () => {
    const causePlace = { terminal: 'hask', against: 'skelder' };
    expect(said({ causePlace })).toMatch(
      /; ratio mismatch of Hask against Skelder moved, charging did not\.$/,
    );
    expect(said({ causePlace, compositionBefore: null })).toMatch(
      /; likely ratio mismatch of Hask against Skelder\.$/,
    );
  });

  it('is said of the first terminal where that is the one that moved', () => {
    const causePlace = { terminal: 'skelder', against: null };
    expect(said({ causePlace })).toMatch(/; ratio mismatch of Skelder moved, charging did not\.$/);
  });

  it('is said to be time where an angle is alike in all phases', () => {
    expect(said({ likelyCause: 'angle mismatch', causeIsTime: true, compositionBefore: null })).toMatch(
      /alike in all three phases: that is time, by the channel or a clock, rather than a transformer\.$/,
    );
  });
});

describe('a history that a mark parts', () => {
  it('is said to be since that mark', () => {
    const driftSince = { on: '2026-10-12', kind: 'settings changed' } as const;
    expect(plain(driftWords(verdictWith({ driftSince }), context))).toMatch(
      /\(412 A through\) since the settings change of 12 Oct 2026;/,
    );
  });
});

describe('utilisation at emergency rating', () => {
  const emergencyCreep = {
    verdict: 'creep',
    utilisationNow: 0.58,
    slopePerMonth: 0.021,
    slopeLowPerMonth: 0.015,
    slopeHighPerMonth: 0.027,
    near: { earliest: '2027-03-04', likely: '2027-04-20', latest: '2027-06-11' },
    over: { earliest: '2028-01-04', likely: '2028-06-20', latest: null },
  } as const;

  it('is told with its rise and its months where it rises, and not at all where it does not', () => {
    expect(plain(emergencyWords(verdictWith({ emergencyCreep }), context))).toBe(
      'Phase L2 would stand at 58 % of its threshold at emergency rating, rising 2.1 points a month, 95 % between 1.5 and 2.7; near mark in March to June 2027.',
    );
    expect(emergencyWords(verdictWith(), context)).toBeUndefined();
  });

  it('past the near mark tells when it would meet the threshold', () => {
    const past = { ...emergencyCreep, utilisationNow: 0.8 };
    expect(plain(emergencyWords(verdictWith({ emergencyCreep: past }), context))).toMatch(
      /; past the near mark, the threshold from January 2028 on\.$/,
    );
  });
});

describe('the months of a forecast', () => {
  it.each([
    [{ earliest: '2027-03-01', likely: null, latest: '2027-03-30' }, 'in March 2027'],
    [{ earliest: '2026-12-10', likely: null, latest: '2027-03-30' }, 'in December to March 2027'],
    [{ earliest: '2026-12-10', likely: null, latest: null }, 'from December on'],
    [{ earliest: null, likely: null, latest: null }, 'not within five years'],
  ])('%o', (dates, words) => expect(monthsWords(dates, AT_MS)).toBe(words));
});

describe('which causes moved', () => {
  const verdictBeside = (compositionBefore: CompositionOnWire) => ({ ...verdictWith(), compositionBefore });

  it('an interval that still touches the earlier one has not moved', () => {
    const before = separatedWith({ mismatches: [mismatchWith({ ratio: estimate(0.045, 0.003) })] });
    expect(movedCauses(verdictBeside(before), substations)).toEqual({ moved: [], still: ['charging'] });
  });

  it('the mismatch that moved most goes first, one that moved by a fraction of it is not named', () => {
    const sharp = (ratio: number, angleDeg: number) =>
      separatedWith({
        mismatches: [mismatchWith({ ratio: estimate(ratio, 0.0001), angleDeg: estimate(angleDeg, 0.001) })],
      });
    const movedFrom = (ratio: number, angleDeg: number) =>
      movedCauses(
        {
          ...verdictWith({ composition: sharp(0.049, -0.52), causePlace: null }),
          compositionBefore: sharp(ratio, angleDeg),
        },
        substations,
      )!.moved;
    expect(movedFrom(0.048, -2.52)).toEqual(['angle mismatch of Hask against Skelder']);
    expect(movedFrom(0.029, -2.52)).toEqual([
      'angle mismatch of Hask against Skelder',
      'ratio mismatch of Hask against Skelder',
    ]);
  });

  it('charging that moved is said to have moved', () => {
    const before = separatedWith({ chargingAmps: estimate(10, 0.5) });
    expect(movedCauses(verdictBeside(before), substations)).toEqual({ moved: ['charging'], still: [] });
  });

  it('a window that is not separable tells nothing', () => {
    expect(movedCauses(verdictBeside(notSeparable), substations)).toBeUndefined();
  });
});

describe('what stands above the polygon', () => {
  it('the title carries the 24-hour level, and none where there is none', () => {
    const words = { letter: 'L2', unit: 'amperes', ratingAmps: 800 } as const;
    expect(plain(whyTitle(verdictWith(), words))).toBe('Why phase L2 stands at 38 A');
    expect(whyTitle(verdictWith({ levelAmps: null }), words)).toBe('Why phase L2 stands where it does');
    expect(whyTitle(undefined, words)).toBe('Why phase L2 stands where it does');
  });

  it('a window across a step says so, one after it does not', () => {
    expect(stepInWindowWords(separatedWith(), STEP, SITE.timeZone)).toContain('the step of 22 Nov 2026');
    expect(stepInWindowWords(separatedWith({ from: '2026-11-23' }), STEP, SITE.timeZone)).toBeUndefined();
    expect(stepInWindowWords(separatedWith(), null, SITE.timeZone)).toBeUndefined();
  });

  it('intervals as wide as the differential are said to tell little', () => {
    expect(weakWords(separatedWith())).toBeUndefined();
    expect(weakWords(separatedWith({ chargingAmps: estimate(7, 30) }))).toContain(
      'Weakly told: the interval of charging is',
    );
    const wide = [mismatchWith({ ratio: estimate(0.05, 0.045), angleDeg: estimate(-0.5, 3) })];
    expect(weakWords(separatedWith({ mismatches: wide }))).toContain('the intervals of ratio and angle are');
  });

  it('every verdict against the class budget has its words', () => {
    for (const verdict of ['within', 'beyond', 'undecided', null] as const)
      expect(budgetWords(verdict)).toMatch(/class/);
  });
});
