/** How figures are written, everywhere: a fixed language so that server and browser agree, and never NaN. */

export const NOT_COMPUTABLE = 'not computable';
const LANGUAGE = 'en-GB';
/** no-break space: a figure stays with its unit */
const UNIT_SPACE = '\u00a0';

type Figure = number | null | undefined;
const isFigure = (value: Figure): value is number => typeof value === 'number' && Number.isFinite(value);

// built once: a format costs far more to build than to use, and a fleet's page writes thousands of figures
const WITH_DIGITS = [0, 1].map(
  (digits) =>
    new Intl.NumberFormat(LANGUAGE, {
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
      useGrouping: 'min2',
    }),
);
const UP_TO_ONE_DIGIT = new Intl.NumberFormat(LANGUAGE, { maximumFractionDigits: 1 });

const grouped = (value: number, digits: 0 | 1): string => WITH_DIGITS[digits]!.format(value);

/** "38 A", "4.2 A" below ten; 'not computable' for null. */
export function ampsText(amps: Figure): string {
  if (!isFigure(amps)) return NOT_COMPUTABLE;
  return `${grouped(amps, Math.abs(amps) < 9.95 ? 1 : 0)}${UNIT_SPACE}A`;
}

/** A ratio as whole per cent: 0.764 → "76 %". */
export function percentText(ratio: Figure): string {
  if (!isFigure(ratio)) return NOT_COMPUTABLE;
  return `${grouped(Math.round(ratio * 100), 0)}${UNIT_SPACE}%`;
}

/**
 * A ratio as per cent that never rounds across a mark: 0.9996 of a threshold is "99.9 %", not "100 %",
 * because a screen that says 100 says that the scheme would operate.
 */
export function percentOfMarkText(ratio: Figure, markRatio = 1): string {
  if (!isFigure(ratio)) return NOT_COMPUTABLE;
  const crossesByRounding = ratio < markRatio && Math.round(ratio * 100) >= Math.round(markRatio * 100);
  if (!crossesByRounding) return percentText(ratio);
  return `${grouped(Math.floor(ratio * 1000) / 10, 1)}${UNIT_SPACE}%`;
}

/** "110 kV" */
export const kilovoltsText = (kv: Figure): string =>
  isFigure(kv) ? `${UP_TO_ONE_DIGIT.format(kv)}${UNIT_SPACE}kV` : NOT_COMPUTABLE;

/** "18.4 km", "71 km" */
export const kilometresText = (km: Figure): string =>
  isFigure(km) ? `${UP_TO_ONE_DIGIT.format(km)}${UNIT_SPACE}km` : NOT_COMPUTABLE;

const SECOND_MS = 1_000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

/** A span in words, two units at most: "0.8 s", "42 s", "3 min 20 s", "2 h 5 min", "4 days". */
export function durationText(durationMs: Figure): string {
  if (!isFigure(durationMs)) return NOT_COMPUTABLE;
  const ms = Math.max(0, durationMs);
  const unit = (count: number, name: string) => `${count}${UNIT_SPACE}${name}`;
  const pair = (bigMs: number, [big, small]: readonly [string, string], smallMs: number) => {
    const bigCount = Math.floor(ms / bigMs);
    const smallCount = Math.floor((ms % bigMs) / smallMs);
    return smallCount === 0 ? unit(bigCount, big) : `${unit(bigCount, big)} ${unit(smallCount, small)}`;
  };
  if (ms < 9_950) return `${grouped(ms / SECOND_MS, 1)}${UNIT_SPACE}s`;
  if (ms < MINUTE_MS) return unit(Math.floor(ms / SECOND_MS), 's');
  if (ms < HOUR_MS) return pair(MINUTE_MS, ['min', 's'], SECOND_MS);
  if (ms < DAY_MS) return pair(HOUR_MS, ['h', 'min'], MINUTE_MS);
  const days = Math.floor(ms / DAY_MS);
  return unit(days, days === 1 ? 'day' : 'days');
}

/** "0.8 s ago"; 'never heard' for a value that has not come yet. */
export const ageText = (atMs: number | undefined, nowMs: number): string =>
  atMs === undefined ? 'never heard' : `${durationText(nowMs - atMs)} ago`;

const formats = new Map<string, Intl.DateTimeFormat>();

/** Building a format costs more than using it, and the Board shows a clock each second. */
function format(timeZone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${timeZone} ${JSON.stringify(options)}`;
  const known = formats.get(key);
  if (known !== undefined) return known;
  const made = new Intl.DateTimeFormat(LANGUAGE, { ...options, timeZone, hourCycle: 'h23' });
  formats.set(key, made);
  return made;
}

const instantMs = (instant: string | number): number =>
  typeof instant === 'number' ? instant : Date.parse(instant);

const part = (parts: readonly Intl.DateTimeFormatPart[], type: Intl.DateTimeFormatPartTypes): string =>
  parts.find((one) => one.type === type)?.value ?? '';

/** "14:32:08" in the site's time zone */
export function timeText(instant: string | number, timeZone: string): string {
  const ms = instantMs(instant);
  if (!Number.isFinite(ms)) return NOT_COMPUTABLE;
  const parts = format(timeZone, { hour: '2-digit', minute: '2-digit', second: '2-digit' }).formatToParts(ms);
  return `${part(parts, 'hour')}:${part(parts, 'minute')}:${part(parts, 'second')}`;
}

/** "CET": the zone's short name at the instant, summer time included */
export function zoneText(instant: string | number, timeZone: string): string {
  const ms = instantMs(instant);
  if (!Number.isFinite(ms)) return '';
  return part(format(timeZone, { timeZoneName: 'short' }).formatToParts(ms), 'timeZoneName');
}

/** "12 May 2026" in the site's time zone */
export function dateText(instant: string | number, timeZone: string): string {
  const ms = instantMs(instant);
  if (!Number.isFinite(ms)) return NOT_COMPUTABLE;
  const parts = format(timeZone, { day: 'numeric', month: 'short', year: 'numeric' }).formatToParts(ms);
  return `${part(parts, 'day')} ${part(parts, 'month')} ${part(parts, 'year')}`;
}

/** "14:32:08" when it is of the same site day as now, else "12 May 2026, 14:32" */
export function instantText(instant: string | number, nowMs: number, timeZone: string): string {
  const date = dateText(instant, timeZone);
  if (date === NOT_COMPUTABLE) return date;
  if (date === dateText(nowMs, timeZone)) return timeText(instant, timeZone);
  return `${date}, ${timeText(instant, timeZone).slice(0, 5)}`;
}
