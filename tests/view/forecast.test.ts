import { describe, expect, it } from 'vitest';
import { forecastWords, halfMonthWords } from '../../src/view/forecast';
import { AT_MS } from './sample-lines';

describe('a forecast in words', () => {
  it.each([
    [{ earliest: null, likely: null, latest: null }, 'not within five years'],
    [
      { earliest: '2029-02-03', likely: null, latest: null },
      'not likely within five years, at the earliest 3 Feb 2029',
    ],
    [
      { earliest: '2026-12-28', likely: '2027-01-10', latest: '2027-03-04' },
      'likely in the first half of January (28 Dec 2026 to 4 Mar 2027)',
    ],
    [
      { earliest: '2026-12-28', likely: '2027-01-16', latest: null },
      'likely in the second half of January (from 28 Dec 2026, latest beyond five years)',
    ],
  ])('%o', (dates, words) => expect(forecastWords(dates, AT_MS)).toBe(words));

  it('names the year when the month alone could be read as this or the next one', () => {
    expect(halfMonthWords('2028-01-10', AT_MS)).toBe('the first half of January 2028');
  });
});
