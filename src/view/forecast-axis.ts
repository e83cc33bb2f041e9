import type { ForecastDatesOnWire } from '../contract/warning';

const DAY_MS = 86_400_000;
const MONTH_NAMES = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** The time axis that all ranges of the page share, from today on. */
export interface ForecastAxis {
  readonly fromMs: number;
  readonly toMs: number;
  readonly ticks: readonly { readonly at: number; readonly label: string }[];
}

/** Spans to choose from, in months, with the months between two ticks. */
const SPANS = [
  { months: 6, every: 1 },
  { months: 12, every: 3 },
  { months: 24, every: 6 },
  { months: 60, every: 12 },
] as const;

const monthAfter = (ms: number, months: number): number => {
  const date = new Date(ms);
  return Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + months, 1);
};

/** The shortest span that holds every likely date; a range that goes on beyond it is drawn open. */
export function forecastAxis(dates: readonly (ForecastDatesOnWire | null)[], nowMs: number): ForecastAxis {
  const likelyMs = dates.flatMap((one) =>
    one === null || one.likely === null ? [] : [Date.parse(one.likely)],
  );
  const furthestMs = Math.max(nowMs, ...likelyMs);
  const span = SPANS.find(({ months }) => monthAfter(nowMs, months) >= furthestMs) ?? SPANS.at(-1)!;
  const axis = { fromMs: nowMs, toMs: monthAfter(nowMs, span.months) };
  const ticks = [];
  for (let months = 1; months < span.months; months += 1) {
    const ms = monthAfter(nowMs, months);
    const month = new Date(ms).getUTCMonth();
    if (month % span.every !== 0) continue;
    const place = placeOf(ms, axis);
    // too close to either end its word would not fit
    if (place < 0.06 || place > 0.95) continue;
    const year = new Date(ms).getUTCFullYear();
    ticks.push({ at: place, label: month === 0 ? `${year}` : MONTH_NAMES[month]! });
  }
  return { ...axis, ticks };
}

const placeOf = (ms: number, { fromMs, toMs }: Pick<ForecastAxis, 'fromMs' | 'toMs'>): number =>
  (ms - fromMs) / (toMs - fromMs);

/** A range on the axis, places from 0 to 1; `openEnd` when the latest date lies beyond the axis or five years. */
export interface ForecastRange {
  readonly from: number;
  readonly to: number;
  readonly likely: number | undefined;
  readonly openEnd: boolean;
}

/** Undefined where nothing of it lies on the axis. */
export function forecastRange(
  dates: ForecastDatesOnWire | null,
  axis: ForecastAxis,
): ForecastRange | undefined {
  if (dates === null) return undefined;
  const place = (day: string | null) => (day === null ? undefined : placeOf(Date.parse(day), axis));
  const likely = place(dates.likely);
  const from = place(dates.earliest) ?? likely;
  if (from === undefined || from > 1) return undefined;
  const to = place(dates.latest);
  const within = (at: number) => Math.min(1, Math.max(0, at));
  return {
    from: within(from),
    to: within(to ?? 1),
    likely: likely === undefined || likely > 1 ? undefined : within(likely),
    openEnd: to === undefined || to > 1,
  };
}

/** The day of an instant, for a form's least date. */
export const dayOf = (ms: number): string => new Date(ms - (ms % DAY_MS)).toISOString().slice(0, 10);
