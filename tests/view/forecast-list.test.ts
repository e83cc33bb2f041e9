import { describe, expect, it } from 'vitest';
import type { ForecastLine } from '../../src/contract/forecast-list';
import type { StandingVerdict } from '../../src/contract/standing';
import { forecastAxis, forecastRange } from '../../src/view/forecast-axis';
import { forecastGroups, forecastRow, forecastSections } from '../../src/view/forecast-list';
import { forecastSearch, parseForecastAddress, WHOLE_FORECAST } from '../../src/view/forecast-query';
import { forecastSentence, phaseWords, unlistedWords } from '../../src/view/forecast-words';
import { ownerNames } from '../../src/view/owner-names';
import { madeUpVerdict } from '../store/made-up-fleet';
import { AT_MS, SITE } from './sample-lines';

const SUBSTATIONS = [
  { key: 'skelder', name: 'Skelder' },
  { key: 'low-pell', name: 'Low Pell' },
];

/** A phase that rises by 3.4 A a month through ratio mismatch at Low Pell, with what a test changes. */
function verdictWith(change: Partial<StandingVerdict> = {}): StandingVerdict {
  const near = { earliest: '2026-12-28', likely: '2027-01-20', latest: '2027-03-04' };
  const pickup = { earliest: '2027-06-01', likely: '2027-08-01', latest: null };
  const creep = {
    phase: 'b' as const,
    verdict: 'creep' as const,
    slopeAmpsPerMonth: 3.4,
    slopeLowAmpsPerMonth: 2.9,
    slopeHighAmpsPerMonth: 3.9,
    pTwoSided: 0.0004,
    days: 60,
    levelNowAmps: 37,
    near,
    pickup,
  };
  return {
    ...madeUpVerdict(1, 'a'),
    line: 'skelder-low-pell-2',
    phase: 'b',
    levelAmps: 37,
    pickupAmps: 60,
    shareOfPickup: 37 / 60,
    creep,
    creepAtReference: null,
    loadTakenOutBy: null,
    measuredCounts: true,
    composition: {
      kind: 'not separable',
      from: '2026-11-01',
      to: '2026-12-01',
      days: 30,
      snapshotCount: 1,
      reason: 'The load hardly changes.',
    },
    compositionBefore: null,
    likelyCause: 'ratio mismatch',
    causePlace: { terminal: 'low-pell', against: null },
    near,
    pickup,
    ...change,
  };
}

const lineOf = (
  key: string,
  verdicts: readonly StandingVerdict[],
  substations = SUBSTATIONS,
  owner: string | null = null,
): ForecastLine => ({
  key,
  name: key,
  owner,
  voltageKv: 110,
  substations,
  phases: verdicts.map((verdict) => ({
    verdict,
    creepVerdict: verdict.creep?.verdict ?? null,
    words: { lead: '', when: '', why: '' },
    history: undefined,
  })),
});

const within = (change: Partial<StandingVerdict> = {}) => {
  const none = { earliest: null, likely: null, latest: null };
  const base = verdictWith();
  return verdictWith({
    creep: { ...base.creep!, verdict: 'within margin', near: none },
    near: none,
    ...change,
  });
};
const beyond = verdictWith({ levelAmps: 48, shareOfPickup: 0.8, creep: null, near: null, pickup: null });
const rowOf = (line: ForecastLine) => forecastRow(line, SITE.nearRatio);

describe('where a line stands', () => {
  it('goes by its most urgent phase', () => {
    const row = rowOf(lineOf('one', [within({ phase: 'a' }), verdictWith(), { ...beyond, phase: 'c' }]));
    expect([row.place, row.phase.verdict.phase]).toEqual(['beyond', 'c']);
    expect(row.others.map(({ verdict }) => verdict.phase)).toEqual(['b', 'a']);
  });

  it('puts what is beyond the mark first, then by likely date, and what has none in reach last', () => {
    const near = (likely: string | null) =>
      verdictWith({ near: { earliest: '2026-12-20', likely, latest: null } });
    const rows = [
      rowOf(lineOf('late', [near('2027-09-01')])),
      rowOf(lineOf('margin', [within()])),
      rowOf(lineOf('never', [near(null)])),
      rowOf(lineOf('high', [beyond])),
      rowOf(lineOf('soon', [near('2026-12-24')])),
    ];
    const sections = forecastSections(rows, WHOLE_FORECAST);
    expect(sections.beyond.map(({ line }) => line.key)).toEqual(['high']);
    expect(sections.coming.map(({ line }) => line.key)).toEqual(['soon', 'late', 'never']);
    expect(sections['within margin'].map(({ line }) => line.key)).toEqual(['margin']);
    expect(forecastSentence({ beyondCount: 1, comingCount: 3 }, sections.coming, AT_MS)).toEqual({
      beyond: 'One line stands beyond the near mark',
      coming: 'Three lines are on the way there, the first likely in the second half of December',
      rest: undefined,
    });
  });

  it('groups a line under each of its ends, or under its cause', () => {
    const rows = [
      rowOf(lineOf('one', [verdictWith()])),
      rowOf(lineOf('two', [verdictWith({ likelyCause: 'not told' })])),
    ];
    expect(forecastGroups(rows, 'substation').map(({ name, rows: own }) => [name, own.length])).toEqual([
      ['Low Pell', 2],
      ['Skelder', 2],
    ]);
    expect(forecastGroups(rows, 'cause').map(({ name }) => name)).toEqual([
      'cause not told',
      'ratio mismatch',
    ]);
    expect(forecastGroups(rows, 'none')).toHaveLength(1);
  });

  it('groups and filters by owner, and says so where none is recorded', () => {
    const lines = [
      lineOf('one', [verdictWith()], SUBSTATIONS, 'Tarnside'),
      lineOf('two', [verdictWith()], SUBSTATIONS, 'Pellwater'),
      lineOf('three', [verdictWith()]),
      lineOf('four', [verdictWith()], SUBSTATIONS, 'Tarnside'),
    ];
    const rows = lines.map(rowOf);
    expect(forecastGroups(rows, 'owner').map(({ name, rows: own }) => [name, own.length])).toEqual([
      ['Pellwater', 1],
      ['Tarnside', 2],
      ['owner not recorded', 1],
    ]);
    expect(ownerNames(lines)).toEqual(['Pellwater', 'Tarnside']);
    const { coming } = forecastSections(rows, { ...WHOLE_FORECAST, owner: 'Tarnside' });
    expect(coming.map(({ line }) => line.key)).toEqual(['four', 'one']);
  });
});

describe('the words for a planner', () => {
  const words = (verdict: StandingVerdict) =>
    phaseWords(
      { verdict, creepVerdict: verdict.creep?.verdict ?? null },
      { site: SITE, nowMs: AT_MS, substations: SUBSTATIONS },
    );

  it('say how fast, when, and the likely cause', () => {
    expect(words(verdictWith())).toEqual({
      lead: 'Phase L2 rises 3.4\u00a0A a month (2.9 to 3.9).',
      when: 'Near mark likely in the second half of January (28 Dec 2026 to 4 Mar 2027).',
      why: 'Likely cause: ratio mismatch of Low Pell.',
    });
  });

  it('say which cause moved and which did not, when both compositions tell', () => {
    const separated = (ratio: number) => {
      const { composition } = madeUpVerdict(1, 'b');
      if (composition.kind !== 'separated') throw new Error('The made-up phase is separable.');
      const [mismatch] = composition.mismatches;
      const estimate = { value: ratio, low: ratio - 0.002, high: ratio + 0.002 };
      return { ...composition, mismatches: [{ ...mismatch!, terminal: 'low-pell', ratio: estimate }] };
    };
    expect(
      words(verdictWith({ composition: separated(0.049), compositionBefore: separated(0.02) })).why,
    ).toBe('Ratio mismatch of Low Pell moved, charging did not.');
  });

  it('say that a date is not within five years, and that a level beyond the mark does not rise', () => {
    expect(words(within()).when).toBe('Near mark not within five years.');
    expect(words(beyond)).toMatchObject({
      lead: 'Phase L2 stands at 80\u00a0% of the pickup, beyond the near mark.',
      when: '48\u00a0A of 60\u00a0A; it does not rise further.',
    });
  });

  it('say that the causes cannot be told, and why', () => {
    expect(words(verdictWith({ likelyCause: 'not told', causePlace: null })).why).toBe(
      'The causes can’t be told apart: the load hardly changes.',
    );
  });

  it('count what is not listed', () => {
    expect(unlistedWords({ steadyCount: 21, unknownCount: 1, leftOutCount: 0 })).toEqual([
      '21 lines show no significant rise',
      'of one line nothing has been computed yet',
    ]);
  });
});

describe('the time axis', () => {
  it('is as long as the furthest likely date asks for', () => {
    const months = (likely: string | null) => {
      const { fromMs, toMs } = forecastAxis([{ earliest: null, likely, latest: null }], AT_MS);
      return Math.round((toMs - fromMs) / (30.44 * 86_400_000));
    };
    expect([null, '2027-01-20', '2027-09-01', '2028-06-01', '2031-01-01'].map(months)).toEqual([
      6, 6, 12, 24, 60,
    ]);
  });

  it('places a range, open where it goes on beyond, and nothing where all of it does', () => {
    const axis = { fromMs: Date.parse('2027-01-01'), toMs: Date.parse('2028-01-01'), ticks: [] };
    const range = forecastRange({ earliest: '2026-12-01', likely: '2027-07-02', latest: null }, axis)!;
    expect(range).toMatchObject({ from: 0, to: 1, openEnd: true });
    expect(range.likely).toBeCloseTo(0.5, 2);
    expect(forecastRange({ earliest: '2029-01-01', likely: null, latest: null }, axis)).toBeUndefined();
    expect(forecastRange({ earliest: null, likely: null, latest: null }, axis)).toBeUndefined();
  });
});

describe('the address of the forecast', () => {
  it('comes back as it was, and what is not understood counts as not chosen', () => {
    const address = {
      text: 'esk',
      substation: 'holm',
      cause: 'charging',
      owner: 'Pell Water & Sons',
      group: 'owner',
      sort: 'name',
    } as const;
    expect(parseForecastAddress(forecastSearch(address))).toEqual(address);
    expect(forecastSearch(WHOLE_FORECAST)).toBe('');
    expect(parseForecastAddress('?cause=weather&group=weather&owner=&sort=colour')).toEqual(WHOLE_FORECAST);
  });
});
