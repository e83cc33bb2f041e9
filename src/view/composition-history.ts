import type { LineComposition } from '../contract/composition';
import { inUnit, unitSign } from './line-unit';
import type { CurrentUnit } from './line-unit';
import type { LineTable } from './line-table';
import type { PhaseName } from './phase';
import type { TrendWindow } from './trend-span';

/** How far back the causes are shown by day. */
export const CAUSE_SPANS = ['30 days', '90 days', 'a year'] as const;
export type CauseSpan = (typeof CAUSE_SPANS)[number];

const DAYS: Readonly<Record<CauseSpan, number>> = { '30 days': 30, '90 days': 90, 'a year': 365 };
const DAY_MS = 86_400_000;

/** The span as the page's address holds it (`?causes=365`); 90 days where it says nothing known. */
export function causeSpanFromAddress(value: string | null): CauseSpan {
  return CAUSE_SPANS.find((span) => String(DAYS[span]) === value) ?? '90 days';
}

export const causeSpanInAddress = (span: CauseSpan): string | undefined =>
  span === '90 days' ? undefined : String(DAYS[span]);

/** Whole days, today included as far as it has come. */
export function causeWindow(span: CauseSpan, nowMs: number): TrendWindow {
  const today = Math.floor(nowMs / DAY_MS) * DAY_MS;
  return { fromMs: today - (DAYS[span] - 1) * DAY_MS, toMs: today + DAY_MS };
}

/** What is stacked, from below. Leakage is part of no stack: it is small or told in the table beside the polygon. */
export const STACKED_CAUSES = ['charging', 'ratio', 'angle', 'rest'] as const;
export type StackedCause = (typeof STACKED_CAUSES)[number];

/** One day of one phase, in the unit asked for: where each cause's share begins and ends, and the differential. */
export interface StackedDay {
  readonly startMs: number;
  readonly shares: Readonly<Record<StackedCause, { readonly low: number; readonly high: number }>>;
  readonly differential: number;
}

type History = LineComposition['history'];

/** The days of one phase, oldest first. */
export function stackedDays(history: History, phase: PhaseName, unitAmps = 1): StackedDay[] {
  return history
    .filter((row) => row.phase === phase)
    .map((row) => {
      let reached = 0;
      const share = (amps: number) => {
        const low = reached;
        reached += amps / unitAmps;
        return { low, high: reached };
      };
      return {
        startMs: Date.parse(`${row.day}T00:00:00Z`),
        shares: {
          charging: share(row.chargingAmps),
          ratio: share(row.ratioAmps),
          angle: share(row.angleAmps),
          rest: share(row.restAmps),
        },
        differential: row.differentialAmps / unitAmps,
      };
    })
    .sort((one, other) => one.startMs - other.startMs);
}

/** Days that follow each other; a day that is missing ends a stretch, and stays a gap. */
export function dayStretches(days: readonly StackedDay[]): StackedDay[][] {
  const found: StackedDay[][] = [];
  for (const day of days) {
    const open = found.at(-1);
    if (open !== undefined && day.startMs - open.at(-1)!.startMs < 1.5 * DAY_MS) open.push(day);
    else found.push([day]);
  }
  return found;
}

/** The outline of one cause over a stretch, as steps a day wide: along the upper edges and back along the lower ones. */
export function causeOutline(stretch: readonly StackedDay[], cause: StackedCause): [number, number][] {
  const edge = (side: 'low' | 'high') =>
    stretch.flatMap(({ startMs, shares }): [number, number][] => [
      [startMs, shares[cause][side]],
      [startMs + DAY_MS, shares[cause][side]],
    ]);
  return [...edge('high'), ...edge('low').reverse()];
}

/** The top of the tallest stack, or of the differential where that is higher; 1 where there is nothing. */
export const stackMost = (days: readonly StackedDay[]): number =>
  Math.max(0, ...days.flatMap(({ shares, differential }) => [shares.rest.high, differential])) || 1;

/** The figures behind the stack, newest first. */
export function causeTable(
  history: History,
  phase: PhaseName,
  {
    caption,
    letter,
    unit,
    ratingAmps,
  }: { caption: string; letter: string; unit: CurrentUnit; ratingAmps: number },
): LineTable {
  const shown = (amps: number) => inUnit(amps, unit, ratingAmps);
  const figure = (head: string) => ({
    kind: 'figure' as const,
    head: `${head}, ${unitSign(unit)}`,
    digits: unit === 'amperes' ? 1 : 4,
  });
  const rows = history
    .filter((row) => row.phase === phase)
    .sort((one, other) => (one.day < other.day ? 1 : -1));
  return {
    caption,
    columns: [
      { kind: 'text', head: 'day' },
      { kind: 'text', head: 'phase' },
      figure('charging'),
      figure('ratio mismatch'),
      figure('angle mismatch'),
      figure('rest'),
      figure('differential'),
    ],
    rows: rows.map((row) => [
      row.day,
      letter,
      shown(row.chargingAmps),
      shown(row.ratioAmps),
      shown(row.angleAmps),
      shown(row.restAmps),
      shown(row.differentialAmps),
    ]),
  };
}
