/** A mark of a time axis, labelled in the site's time zone. */
export interface TimeTick {
  readonly atMs: number;
  readonly label: string;
}

const MINUTE_MS = 60_000;
const DAY_MINUTES = 24 * 60;
/** Spacings a reader counts in, in minutes. */
const STEPS = [
  5,
  10,
  15,
  30,
  60,
  120,
  180,
  360,
  720,
  DAY_MINUTES,
  2 * DAY_MINUTES,
  7 * DAY_MINUTES,
  14 * DAY_MINUTES,
];
/** Beyond days a reader counts in months. */
const MONTH_STEPS = [1, 2, 3, 6, 12];
const MONTH_MINUTES = 30.4 * DAY_MINUTES;

interface WallTime {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
}

/**
 * Ticks at round times of the site's day, at most `most` of them, the closest spacing that allows that. Days
 * begin at the site's midnight, also in the week in which the clocks change; months on their first day.
 */
export function timeTicks(
  { fromMs, toMs }: { fromMs: number; toMs: number },
  { timeZone, most }: { timeZone: string; most: number },
): TimeTick[] {
  const minutes = (toMs - fromMs) / MINUTE_MS;
  const step = STEPS.find((each) => minutes / each <= most);
  if (step === undefined) return monthTicks({ fromMs, toMs }, { timeZone, most });
  const instants =
    step < DAY_MINUTES
      ? hourTicks(fromMs, toMs, { step, timeZone })
      : dayTicks(fromMs, toMs, { step, timeZone });
  return instants.map((atMs) => ({ atMs, label: tickLabel(atMs, timeZone) }));
}

function hourTicks(
  fromMs: number,
  toMs: number,
  { step, timeZone }: { step: number; timeZone: string },
): number[] {
  // Walking in the smallest step keeps wall times round across a change of the clocks and in any zone.
  const strideMs = STEPS[0]! * MINUTE_MS;
  const found: number[] = [];
  for (let atMs = Math.ceil(fromMs / strideMs) * strideMs; atMs <= toMs; atMs += strideMs) {
    const wall = wallTime(atMs, timeZone);
    if ((wall.hour * 60 + wall.minute) % step === 0) found.push(atMs);
  }
  return found;
}

function dayTicks(
  fromMs: number,
  toMs: number,
  { step, timeZone }: { step: number; timeZone: string },
): number[] {
  const days = step / DAY_MINUTES;
  const last = wallTime(toMs, timeZone);
  const found: number[] = [];
  // Counted back from today, so that today's midnight is always one of them.
  for (let back = 0; ; back += days) {
    const atMs = instantOf({ ...last, day: last.day - back, hour: 0, minute: 0 }, timeZone);
    if (atMs < fromMs) return found.reverse();
    found.push(atMs);
  }
}

function monthTicks(
  { fromMs, toMs }: { fromMs: number; toMs: number },
  { timeZone, most }: { timeZone: string; most: number },
): TimeTick[] {
  const months = (toMs - fromMs) / MINUTE_MS / MONTH_MINUTES;
  const step = MONTH_STEPS.find((each) => months / each <= most) ?? MONTH_STEPS[MONTH_STEPS.length - 1]!;
  const first = wallTime(fromMs, timeZone);
  const found: TimeTick[] = [];
  for (let month = first.month; ; month += 1) {
    const wall = { year: first.year + Math.floor((month - 1) / 12), month: ((month - 1) % 12) + 1 };
    const atMs = instantOf({ ...wall, day: 1, hour: 0, minute: 0 }, timeZone);
    if (atMs > toMs) return found;
    if (atMs < fromMs || (wall.month - 1) % step !== 0) continue;
    found.push({ atMs, label: monthLabel(wall, found.length === 0) });
  }
}

/** The year where it begins, and on the first tick, which would hang in the air without it. */
const monthLabel = ({ year, month }: { year: number; month: number }, isFirst: boolean): string =>
  month === 1 || isFirst ? `${MONTHS[month - 1]} ${year}` : MONTHS[month - 1]!;

function tickLabel(atMs: number, timeZone: string): string {
  const { day, month, hour, minute } = wallTime(atMs, timeZone);
  if (hour === 0 && minute === 0) return `${day} ${MONTHS[month - 1]}`;
  return `${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

const formats = new Map<string, Intl.DateTimeFormat>();

function wallTime(atMs: number, timeZone: string): WallTime {
  let format = formats.get(timeZone);
  if (format === undefined) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
    });
    formats.set(timeZone, format);
  }
  const parts = new Map(format.formatToParts(atMs).map(({ type, value }) => [type, Number(value)]));
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.get(type) ?? 0;
  return {
    year: part('year'),
    month: part('month'),
    day: part('day'),
    hour: part('hour'),
    minute: part('minute'),
  };
}

/** The instant of a wall time; days may run over or under their month. */
function instantOf({ year, month, day, hour, minute }: WallTime, timeZone: string): number {
  const asUtcMs = Date.UTC(year, month - 1, day, hour, minute);
  // Twice: the offset at the first guess may be that of the other side of a change of the clocks.
  const guessMs = asUtcMs - offsetMs(asUtcMs, timeZone);
  return asUtcMs - offsetMs(guessMs, timeZone);
}

function offsetMs(atMs: number, timeZone: string): number {
  const { year, month, day, hour, minute } = wallTime(atMs, timeZone);
  return Date.UTC(year, month - 1, day, hour, minute) - Math.floor(atMs / MINUTE_MS) * MINUTE_MS;
}
