import { expect, test } from 'vitest';
import { hoursAtLoad, loadResponse } from '../../../src/standing/load-response';
import type { HourlyLevel, LoadResponse } from '../../../src/standing/load-response';
import { stepVerdict } from '../../../src/standing/step';
import type { HourlyValue } from '../../../src/standing/step';
import { reportedHour } from './line-sums';
import { drawnTruth, measuredHours, uniform } from './seeded-line';
import type { LineTruth, Pair } from './seeded-line';

const LINES = 100;
const TRIAL_MS = 120_000;
const WINDOW_HOURS = 96 + 336;
/** Hours that the load response is taken from: the product holds those of 60 days. */
const RESPONSE_HOURS = 60 * 24;
const BEFORE_HOURS = 40 * 24;

const hoursOf = (truth: LineTruth, hours: number): HourlyLevel[] =>
  Array.from(measuredHours(truth, hours), (each) => reportedHour(each, 'half the sum'));

const truthOf = (seed: number): LineTruth => drawnTruth(seed, uniform(seed * 32452843 + 17));

/** The series that a look after so many hours has. */
type Series = (count: number) => readonly HourlyValue[];

const asMeasured =
  (hours: readonly HourlyLevel[]): Series =>
  (count) =>
    hours
      .slice(Math.max(0, count - WINDOW_HOURS), count)
      .map(({ hour, levelAmps }) => ({ hour, value: levelAmps }));

/** The response is one of whole weeks: computed anew when one is over. */
function atOneLoad(hours: readonly HourlyLevel[]): Series {
  let week = -1;
  let response: LoadResponse | undefined;
  return (count) => {
    if (week !== Math.floor(count / 168)) {
      week = Math.floor(count / 168);
      response = loadResponse(hours.slice(Math.max(0, 168 * week - RESPONSE_HOURS), 168 * week));
    }
    const window = hours.slice(Math.max(0, count - WINDOW_HOURS), count);
    return response === undefined ? [] : hoursAtLoad(window, response);
  };
}

const SERIES = { 'as measured': asMeasured, 'at one load': atOneLoad } as const;
type Levels = keyof typeof SERIES;
const LEVELS: readonly Levels[] = ['as measured', 'at one load'];

/** Whether a step is told at any of these looks. */
function isTold(series: Series, looks: { from: number; to: number; every: number }): boolean {
  for (let count = looks.from; count <= looks.to; count += looks.every) {
    if (stepVerdict(series(count)).kind === 'step') return true;
  }
  return false;
}

/** In how many of the lines a step is told, by the levels it is looked for in. */
function tally(
  hoursOfLine: (seed: number) => readonly HourlyLevel[],
  looksOf: (seed: number, hours: number) => Parameters<typeof isTold>[1],
): Record<Levels, number> {
  const told = { 'as measured': 0, 'at one load': 0 };
  for (let seed = 1; seed <= LINES; seed++) {
    const hours = hoursOfLine(seed);
    for (const levels of LEVELS) {
      if (isTold(SERIES[levels](hours), looksOf(seed, hours.length))) told[levels]++;
    }
  }
  return told;
}

const momentOf = (seed: number): number => BEFORE_HOURS + 24 * uniform(seed + 77)();

function steppedHours(seed: number, change: Pair): HourlyLevel[] {
  const moment = momentOf(seed);
  const sign = seed % 2 === 0 ? 1 : -1;
  const mismatchChange = (hour: number) => {
    const share = sign * Math.max(0, Math.min(1, hour + 1 - moment));
    return { re: change.re * share, im: change.im * share };
  };
  return hoursOf({ ...truthOf(seed), mismatchChange }, Math.ceil(moment) + 48);
}

test(
  'of a level known by its magnitude alone a step is told more often at one load, and none of a settled line',
  () => {
    const within48h = (change: Pair) =>
      tally(
        (seed) => steppedHours(seed, change),
        (seed, to) => ({ from: Math.ceil(momentOf(seed)), to, every: 1 }),
      );
    const ratio = within48h({ re: 0.02, im: 0 });
    const angle = within48h({ re: 0, im: Math.PI / 180 });
    const wrong = tally(
      (seed) => hoursOf(truthOf(seed + 9000), 730 * 24),
      (_, to) => ({ from: RESPONSE_HOURS, to, every: 96 }),
    );
    console.table(
      LEVELS.map((levels) => ({
        levels,
        lines: LINES,
        '2 % ratio within 48 h': ratio[levels] / LINES,
        '1° within 48 h': angle[levels] / LINES,
        'wrong in two years': wrong[levels],
      })),
    );
    expect(angle['at one load']).toBeGreaterThan(angle['as measured']);
    expect(angle['at one load'] / LINES).toBeGreaterThanOrEqual(0.7);
    expect(ratio['at one load']).toBeGreaterThan(ratio['as measured']);
    for (const levels of LEVELS) expect(wrong[levels]).toBe(0);
  },
  TRIAL_MS,
);
