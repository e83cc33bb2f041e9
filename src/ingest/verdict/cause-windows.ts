import type { DayRange } from './composed-window';

/** What moved: it decides which days are held against which. */
export type Moved =
  | { readonly kind: 'nothing' }
  | { readonly kind: 'drift' }
  | { readonly kind: 'step'; readonly stepDay: number; readonly markDayBefore: number | undefined };

/** The composition of today is that of the last month. */
export const COMPOSED_DAYS = 30;
/** The one before is a month that ended two months ago. */
export const BEFORE_DAYS = 60;
/** With fewer days than this a window doesn't tell causes apart anyway. */
const DAYS_LEAST = 7;

/**
 * The days whose composition says what moved, and those it is held against; none of them across a mark. Of a drift the
 * last month against one two months earlier, or where the history since its mark is shorter, its end against its
 * beginning; of a step the month before against the month since.
 */
export function causeWindows(
  moved: Moved,
  { today, sinceDay }: { today: number; sinceDay: number },
): { readonly now: DayRange; readonly before: DayRange } | undefined {
  switch (moved.kind) {
    case 'nothing':
      return undefined;
    case 'drift':
      return driftWindows(today, sinceDay);
    case 'step': {
      const { stepDay, markDayBefore = -Infinity } = moved;
      const before = { from: Math.max(markDayBefore + 1, stepDay - COMPOSED_DAYS), to: stepDay };
      const now = { from: stepDay + 1, to: Math.min(today, stepDay + 1 + COMPOSED_DAYS) };
      return before.to - before.from < DAYS_LEAST || now.to - now.from < DAYS_LEAST
        ? undefined
        : { now, before };
    }
  }
}

function driftWindows(today: number, sinceDay: number): { now: DayRange; before: DayRange } | undefined {
  if (sinceDay <= today - BEFORE_DAYS - COMPOSED_DAYS)
    return {
      now: { from: today - COMPOSED_DAYS, to: today },
      before: { from: today - BEFORE_DAYS - COMPOSED_DAYS, to: today - BEFORE_DAYS },
    };
  const length = Math.min(COMPOSED_DAYS, Math.floor((today - sinceDay) / 2));
  if (length < DAYS_LEAST) return undefined;
  return {
    now: { from: today - length, to: today },
    before: { from: sinceDay, to: sinceDay + length },
  };
}
