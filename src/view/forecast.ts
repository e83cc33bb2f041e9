import type { Creep, ForecastDatesOnWire } from '../contract/warning';
import { ampsText, dateText } from './figures';
import type { SiteCustom } from './site-custom';

export const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

/** "the first half of January", with the year when it is not this one's or the next month's to guess */
export function halfMonthWords(day: string, nowMs: number): string {
  const [year = 0, month = 1, dayOfMonth = 1] = day.split('-').map(Number);
  const half = dayOfMonth <= 15 ? 'first' : 'second';
  const monthsAhead =
    (year - new Date(nowMs).getUTCFullYear()) * 12 + month - 1 - new Date(nowMs).getUTCMonth();
  return `the ${half} half of ${MONTHS[month - 1]}${monthsAhead > 9 ? ` ${year}` : ''}`;
}

const dayText = (day: string): string => dateText(`${day}T12:00:00Z`, 'UTC');

/** "likely in the second half of January (28 Dec 2026 to 4 Mar 2027)"; an open end is said in words. */
export function forecastWords(dates: ForecastDatesOnWire, nowMs: number): string {
  if (dates.likely === null) {
    if (dates.earliest === null) return 'not within five years';
    return `not likely within five years, at the earliest ${dayText(dates.earliest)}`;
  }
  const likely = `likely in ${halfMonthWords(dates.likely, nowMs)}`;
  if (dates.earliest === null || dates.latest === null) {
    const from = dates.earliest === null ? '' : `from ${dayText(dates.earliest)}, `;
    return `${likely} (${from}latest beyond five years)`;
  }
  return `${likely} (${dayText(dates.earliest)} to ${dayText(dates.latest)})`;
}

/** "3.4 A a month (2.9 to 3.9)" */
export function slopeWords(creep: Creep): string {
  const figure = (amps: number) => ampsText(amps).replace(/\sA$/, '');
  return `${ampsText(creep.slopeAmpsPerMonth)} a month (${figure(creep.slopeLowAmpsPerMonth)} to ${figure(creep.slopeHighAmpsPerMonth)})`;
}

/** When the standing level meets the near mark and the pickup, as one or two sentences. */
export function creepForecastWords(
  creep: Creep,
  pickupAmps: number | null,
  { site, nowMs }: { site: SiteCustom; nowMs: number },
): string {
  const past = pickupAmps !== null && creep.levelNowAmps >= site.nearRatio * pickupAmps;
  if (past) return `It is past the near mark; pickup ${forecastWords(creep.pickup, nowMs)}.`;
  return `Near mark ${forecastWords(creep.near, nowMs)}.`;
}
