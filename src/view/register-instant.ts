/** Wall times as people type them, in the site's time zone, and the instants they mean. */

export type TypedInstant = { ok: true; iso: string } | { ok: false; problem: string };

const FORM = /^(\d{4})-(\d{2})-(\d{2})[T ](\d{2}):(\d{2})(?::(\d{2}))?$/;
const MINUTE_MS = 60_000;

/**
 * The instant that a typed wall time such as `2026-03-01T10:00` means in a zone. An hour that the clocks show
 * twice means its first passing; one that they skip is refused.
 */
export function typedInstant(text: string, timeZone: string): TypedInstant {
  const match = FORM.exec(text.trim());
  if (match === null) return { ok: false, problem: 'Give a date and a time, such as 2026-03-01 10:00.' };
  const [year, month, day, hour, minute, second] = match.slice(1).map((digits) => Number(digits ?? 0));
  const wallMs = Date.UTC(year!, month! - 1, day!, hour!, minute!, second!);
  if (!isWallTime(wallMs, match)) return { ok: false, problem: 'The calendar has no such date and time.' };
  const iso = instantsOf(wallMs, timeZone).at(0);
  if (iso === undefined)
    return { ok: false, problem: 'The clocks skipped this hour when summer time began; give another.' };
  return { ok: true, iso };
}

/** An instant as a date-and-time field wants it: the site's wall time to the minute. */
export function wallTimeTyped(instant: string | number, timeZone: string): string {
  const atMs = typeof instant === 'number' ? instant : Date.parse(instant);
  return new Date(atMs + offsetMs(atMs, timeZone)).toISOString().slice(0, 16);
}

function isWallTime(wallMs: number, [, year, month, day, hour, minute]: RegExpExecArray): boolean {
  if (!Number.isFinite(wallMs)) return false;
  return new Date(wallMs).toISOString().startsWith(`${year}-${month}-${day}T${hour}:${minute}`);
}

/** The instants at which the zone's clocks show this wall time, earliest first: one, two, or none. */
function instantsOf(wallMs: number, timeZone: string): string[] {
  // Offsets of the day before and the day after are the two that can hold around any change of the clocks
  const dayMs = 24 * 60 * MINUTE_MS;
  const offsets = new Set([wallMs - dayMs, wallMs + dayMs].map((nearMs) => offsetMs(nearMs, timeZone)));
  return [...offsets]
    .map((offset) => wallMs - offset)
    .filter((atMs) => atMs + offsetMs(atMs, timeZone) === wallMs)
    .sort((one, other) => one - other)
    .map((atMs) => new Date(atMs).toISOString());
}

/** How far the zone's wall clock is ahead of UTC at an instant. */
function offsetMs(atMs: number, timeZone: string): number {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
  const parts = new Map(format.formatToParts(atMs).map(({ type, value }) => [type, Number(value)]));
  const of = (type: Intl.DateTimeFormatPartTypes) => parts.get(type) ?? 0;
  const wallMs = Date.UTC(of('year'), of('month') - 1, of('day'), of('hour'), of('minute'), of('second'));
  return wallMs - Math.floor(atMs / 1000) * 1000;
}
