import { describe, expect, it } from 'vitest';
import {
  ageText,
  ampsText,
  dateText,
  durationText,
  instantText,
  kilometresText,
  kilovoltsText,
  percentOfMarkText,
  percentText,
  timeText,
  zoneText,
} from '../../src/view/figures';

const plain = (words: string) => words.replaceAll('\u00a0', ' ');

describe('figures', () => {
  it.each([ampsText, percentText, percentOfMarkText, kilovoltsText, kilometresText, durationText])(
    'what cannot be computed is said in words, never as NaN or 0',
    (text) => {
      for (const absent of [null, undefined, NaN, Infinity]) expect(text(absent)).toBe('not computable');
    },
  );

  it('amperes below ten carry a decimal', () => {
    expect([9.94, 9.96, 38.2, 12345].map((amps) => plain(ampsText(amps)))).toEqual([
      '9.9 A',
      '10 A',
      '38 A',
      '12,345 A',
    ]);
  });

  it('a ratio just under a mark is never rounded onto it', () => {
    expect(plain(percentOfMarkText(0.9996))).toBe('99.9 %');
    expect(plain(percentOfMarkText(1))).toBe('100 %');
    expect(plain(percentOfMarkText(0.764))).toBe('76 %');
    expect(plain(percentOfMarkText(0.699, 0.7))).toBe('69.9 %');
  });

  it.each([
    [800, '0.8 s'],
    [42_400, '42 s'],
    [200_000, '3 min 20 s'],
    [240_000, '4 min'],
    [7_500_000, '2 h 5 min'],
    [86_400_000, '1 day'],
    [4 * 86_400_000, '4 days'],
    [-300, '0.0 s'],
  ])('a span of %d ms reads %s', (ms, words) => expect(plain(durationText(ms))).toBe(words));

  it('a value that has not come yet has no age', () => {
    expect(ageText(undefined, 0)).toBe('never heard');
    expect(plain(ageText(1_000, 3_500))).toBe('2.5 s ago');
  });
});

describe('instants', () => {
  const winter = '2026-12-01T13:32:08.000Z';
  const summer = '2026-07-01T13:32:08.000Z';

  it('stand in the time zone of the site, summer time included', () => {
    expect(timeText(winter, 'Europe/Berlin')).toBe('14:32:08');
    expect(timeText(summer, 'Europe/Berlin')).toBe('15:32:08');
    expect([zoneText(winter, 'Europe/Berlin'), zoneText(summer, 'Europe/Berlin')]).toEqual(['CET', 'CEST']);
    expect(timeText('2026-12-01T23:30:00.000Z', 'Europe/Berlin')).toBe('00:30:00');
  });

  it('carry their date once it is another day at the site', () => {
    const justAfterMidnight = Date.parse('2026-12-01T23:10:00.000Z');
    expect(instantText('2026-12-01T23:01:00.000Z', justAfterMidnight, 'Europe/Berlin')).toBe('00:01:00');
    expect(instantText(winter, justAfterMidnight, 'Europe/Berlin')).toBe('1 Dec 2026, 14:32');
  });

  it('that are no instants are said in words', () => {
    expect(timeText('', 'UTC')).toBe('not computable');
    expect(dateText(NaN, 'UTC')).toBe('not computable');
  });
});
