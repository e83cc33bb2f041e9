import type { Rung } from '../contract/lines';

/** How far back the standing trend looks. */
export const TREND_SPANS = ['hour', 'day', 'week', 'two months', 'two years'] as const;
export type TrendSpan = (typeof TREND_SPANS)[number];

/** What a span is drawn from: raw snapshots, or the rows of a rung. */
export type TrendSource = 'snapshots' | Rung;

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

const SPANS: Record<TrendSpan, { lengthMs: number; source: TrendSource; address: string }> = {
  hour: { lengthMs: HOUR_MS, source: 'snapshots', address: 'hour' },
  day: { lengthMs: DAY_MS, source: 'hour', address: 'day' },
  week: { lengthMs: 7 * DAY_MS, source: 'hour', address: 'week' },
  'two months': { lengthMs: 61 * DAY_MS, source: 'day', address: 'months' },
  'two years': { lengthMs: 731 * DAY_MS, source: 'day', address: 'years' },
};

export const spanLengthMs = (span: TrendSpan): number => SPANS[span].lengthMs;
export const spanSource = (span: TrendSpan): TrendSource => SPANS[span].source;
export const spanInAddress = (span: TrendSpan): string => SPANS[span].address;

/** The span as the page's address holds it (`?span=week`); two months where it says nothing known. */
export function spanFromAddress(value: string | null): TrendSpan {
  return TREND_SPANS.find((span) => SPANS[span].address === value) ?? 'two months';
}

export interface TrendWindow {
  readonly fromMs: number;
  readonly toMs: number;
}

/**
 * The window that ends now. Its beginning falls on a full hour for hour and day rows, so that the oldest row
 * is a whole one and the answer of the store stays the same for a while.
 */
export function trendWindow(span: TrendSpan, nowMs: number): TrendWindow {
  const fromMs = nowMs - spanLengthMs(span);
  const whole = spanSource(span) === 'snapshots' ? fromMs : Math.floor(fromMs / HOUR_MS) * HOUR_MS;
  return { fromMs: whole, toMs: nowMs };
}
