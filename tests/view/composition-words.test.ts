import { describe, expect, it } from 'vitest';
import type { StepOnWire } from '../../src/contract/standing';
import {
  budgetWords,
  driftWords,
  monthsWords,
  movedCauses,
  stepWords,
} from '../../src/view/composition-words';
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
  terminal: 'hask',
  channelPathChanged: true,
};

describe('a step in words', () => {
  it('says when by the site’s clock, how far, which term moved and that the channel’s path did', () => {
    expect(plain(stepWords(STEP, context))).toBe(
      'On 22 Nov 2026 at 14:00 the level stepped from 28 to 60 A; the angle mismatch of Hask moved, and the channel’s path changed at the same time: that points to the channel.',
    );
  });

  it('says that a cause can’t be told where none was', () => {
    const untold = { ...STEP, cause: 'not told', terminal: null, channelPathChanged: false } as const;
    expect(plain(stepWords(untold, context))).toMatch(/to 60 A; which cause moved can’t be told\.$/);
  });
});

describe('a drift as a planner needs it', () => {
  it('goes by one and the same load, names the months and what moved', () => {
    expect(plain(driftWords(verdictWith(), context))).toBe(
      'Phase L2 rises 0.9 A a month, 95 % between 0.6 and 1.2 at one and the same load (412 A through); near mark in March to June 2027; ratio mismatch of Hask moved, charging did not.',
    );
  });

  it('as measured says that the load is in it', () => {
    const words = driftWords(verdictWith({ creepAtReference: null }), context);
    expect(plain(words)).toMatch(
      /^Phase L2 rises 3\.4 A a month, 95 % between 2\.9 and 3\.9 as measured, load included;/,
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

describe('the months of a forecast', () => {
  it.each([
    [{ earliest: '2027-03-01', likely: null, latest: '2027-03-30' }, 'in March 2027'],
    [{ earliest: '2026-12-10', likely: null, latest: '2027-03-30' }, 'in December to March 2027'],
    [{ earliest: '2026-12-10', likely: null, latest: null }, 'from December on'],
    [{ earliest: null, likely: null, latest: null }, 'not within five years'],
  ])('%o', (dates, words) => expect(monthsWords(dates, AT_MS)).toBe(words));
});

describe('which causes moved', () => {
  it('an interval that still touches the earlier one has not moved', () => {
    const before = separatedWith({ mismatches: [mismatchWith({ ratio: estimate(0.045, 0.003) })] });
    expect(movedCauses(separatedWith(), before, substations)).toEqual({ moved: [], still: ['charging'] });
  });

  it('charging that moved is said to have moved', () => {
    const before = separatedWith({ chargingAmps: estimate(10, 0.5) });
    expect(movedCauses(separatedWith(), before, substations)).toEqual({ moved: ['charging'], still: [] });
  });

  it('a window that is not separable tells nothing', () => {
    expect(movedCauses(separatedWith(), notSeparable, substations)).toBeUndefined();
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
