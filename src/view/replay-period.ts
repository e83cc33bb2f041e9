import { REPLAY_DAYS_MOST } from '../contract/replay';
import { typedInstant } from './register-instant';

const DAY_MS = 86_400_000;

export const PERIODS = ['24h', '7d', '14d', 'typed'] as const;
export type PeriodChoice = (typeof PERIODS)[number];

export const PERIOD_OPTIONS: readonly { value: PeriodChoice; label: string }[] = [
  { value: '24h', label: 'Last 24 hours' },
  { value: '7d', label: '7 days' },
  { value: '14d', label: '14 days' },
  { value: 'typed', label: 'From – to' },
];
const DAYS: Readonly<Record<Exclude<PeriodChoice, 'typed'>, number>> = { '24h': 1, '7d': 7, '14d': 14 };

export const periodFromAddress = (value: string | null): PeriodChoice =>
  PERIODS.find((period) => period === value) ?? '7d';

export interface TypedPeriod {
  readonly choice: PeriodChoice;
  /** wall times in the site's time zone */
  readonly from: string;
  readonly to: string;
}

export type Period =
  | { readonly ok: true; readonly from: string; readonly to: string }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

/** The instants of a period as it is chosen, up to now; or what is wrong beside which field. */
export function periodOf(
  typed: TypedPeriod,
  { nowMs, timeZone }: { nowMs: number; timeZone: string },
): Period {
  if (typed.choice !== 'typed') {
    const from = new Date(nowMs - DAYS[typed.choice] * DAY_MS).toISOString();
    return { ok: true, from, to: new Date(nowMs).toISOString() };
  }
  const from = typedInstant(typed.from, timeZone);
  const to = typedInstant(typed.to, timeZone);
  if (!from.ok || !to.ok)
    return {
      ok: false,
      problems: { ...(from.ok ? {} : { from: from.problem }), ...(to.ok ? {} : { to: to.problem }) },
    };
  const spanMs = Date.parse(to.iso) - Date.parse(from.iso);
  if (spanMs <= 0) return { ok: false, problems: { to: 'The period begins before it ends.' } };
  if (spanMs > REPLAY_DAYS_MOST * DAY_MS)
    return { ok: false, problems: { from: `A replay covers at most ${REPLAY_DAYS_MOST} days.` } };
  return { ok: true, from: from.iso, to: to.iso };
}
