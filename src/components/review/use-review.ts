import { useQuery } from '@tanstack/react-query';
import { useCallback, useMemo, useState } from 'react';
import type { LineDetail } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import type { MismatchBasis } from '../../view/review-basis';
import { reviewCompositions } from '../../view/review-composition';
import { expectedLevels } from '../../view/review-expected';
import type { ReviewLine } from '../../view/review-line';
import { INFEEDS, reviewLoadability, reviewSensitivity } from '../../view/review-margins';
import { reviewSnapshot } from '../../view/review-now';
import { periodInAddress, periodWindow } from '../../view/review-period';
import type { ReviewPeriod } from '../../view/review-period';
import { fetchReviewCloud } from '../line/line-requests';

/** The period of the page, kept in its address. */
export function usePeriod(initial: ReviewPeriod): [ReviewPeriod, (period: ReviewPeriod) => void] {
  const [period, setPeriod] = useState(initial);
  const choose = useCallback((next: ReviewPeriod) => {
    setPeriod(next);
    const url = new URL(window.location.href);
    for (const [name, kept] of Object.entries(periodInAddress(next))) {
      if (kept === undefined) url.searchParams.delete(name);
      else url.searchParams.set(name, kept);
    }
    window.history.replaceState(window.history.state, '', url);
  }, []);
  return [period, choose];
}

/** Where the snapshots of the period lay: counted on the server once for each period. */
export function useCloud(key: string, period: ReviewPeriod, nowMs: number) {
  return useQuery({
    queryKey: ['review', key, periodInAddress(period)],
    queryFn: ({ signal }) => fetchReviewCloud({ key, signal }, periodWindow(period, nowMs)),
    staleTime: 5 * 60_000,
  });
}

interface Reviewed {
  readonly review: ReviewLine;
  readonly detail: LineDetail;
  readonly inForce: SettingsVersion | undefined;
}

interface MarginChoices {
  readonly basis: MismatchBasis;
  readonly lagDeg: number;
}

/** What follows from constants, from the newest findings and from one snapshot: of the minute, since it takes a while to compute. */
export function useFigures({ review, detail, inForce }: Reviewed, { basis, lagDeg }: MarginChoices) {
  const standing = useMemo(() => {
    if (inForce === undefined) return undefined;
    const results = detail.result?.terminals ?? [];
    const snapshot = reviewSnapshot(review, inForce, results);
    const compositions = reviewCompositions(detail.standing);
    const input = { line: review, recorded: inForce, snapshot, compositions };
    const expected = expectedLevels({
      ...input,
      results,
      lastDay: detail.line.lastDay,
      throughAmps: detail.line.throughAmps,
    });
    const seen = INFEEDS.map((fedFrom) => ({ fedFrom, figures: reviewSensitivity(input, fedFrom) }));
    return { input, expected, seen };
  }, [review, detail, inForce]);
  const load = useMemo(
    () => (standing === undefined ? undefined : reviewLoadability(standing.input, { basis, lagDeg })),
    [standing, basis, lagDeg],
  );
  return standing === undefined || load === undefined ? undefined : { ...standing, load };
}

export type ReviewFigures = NonNullable<ReturnType<typeof useFigures>>;
