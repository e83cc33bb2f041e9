import { dateText, timeText } from './figures';
import type { TrendWindow } from './trend-span';

export const REVIEW_PRESETS = ['1h', '24h', '7d', '14d'] as const;
export type ReviewPreset = (typeof REVIEW_PRESETS)[number];

/** The period of a review: one that ends now, or one between two instants. */
export type ReviewPeriod =
  | { readonly kind: 'preset'; readonly preset: ReviewPreset }
  | { readonly kind: 'between'; readonly fromMs: number; readonly toMs: number };

const HOUR_MS = 3_600_000;
const PRESET_MS: Readonly<Record<ReviewPreset, number>> = {
  '1h': HOUR_MS,
  '24h': 24 * HOUR_MS,
  '7d': 7 * 24 * HOUR_MS,
  '14d': 14 * 24 * HOUR_MS,
};
export const PRESET_WORDS: Readonly<Record<ReviewPreset, string>> = {
  '1h': '1 h',
  '24h': '24 h',
  '7d': '7 days',
  '14d': '14 days',
};
const DEFAULT: ReviewPeriod = { kind: 'preset', preset: '24h' };

/** The period that an address holds: `?from&to` where both are instants in order, else `?period`, else 24 hours. */
export function periodFromAddress(search: URLSearchParams): ReviewPeriod {
  const [fromMs, toMs] = ['from', 'to'].map((name) => Date.parse(search.get(name) ?? ''));
  if (fromMs !== undefined && toMs !== undefined && fromMs < toMs) return { kind: 'between', fromMs, toMs };
  const preset = REVIEW_PRESETS.find((each) => each === search.get('period'));
  return preset === undefined ? DEFAULT : { kind: 'preset', preset };
}

/** What an address keeps of a period; nothing for the usual one. */
export function periodInAddress(
  period: ReviewPeriod,
): Readonly<Record<'period' | 'from' | 'to', string | undefined>> {
  const none = { period: undefined, from: undefined, to: undefined };
  if (period.kind === 'preset')
    return { ...none, period: period.preset === '24h' ? undefined : period.preset };
  return { ...none, from: new Date(period.fromMs).toISOString(), to: new Date(period.toMs).toISOString() };
}

export function periodWindow(period: ReviewPeriod, nowMs: number): TrendWindow {
  if (period.kind === 'between') return { fromMs: period.fromMs, toMs: period.toMs };
  return { fromMs: nowMs - PRESET_MS[period.preset], toMs: nowMs };
}

/** The period in the middle of a sentence. */
export function periodWords(period: ReviewPeriod, timeZone: string): string {
  if (period.kind === 'preset') return `the last ${PRESET_WORDS[period.preset].replace(/^1 h$/, 'hour')}`;
  const [from, to] = [period.fromMs, period.toMs].map(
    (atMs) => `${dateText(atMs, timeZone)}, ${timeText(atMs, timeZone).slice(0, 5)}`,
  );
  return `${from} to ${to}`;
}
